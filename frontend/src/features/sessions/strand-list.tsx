import { Link } from 'react-router-dom';
import { daySpan } from '#frontend/words/day-words.ts';
import { clockOfWater, metres } from '#frontend/words/tide-words.ts';
import type { CalendarSession } from '#shared/contracts/sessions.ts';
import type { CalendarDay } from '#shared/kernel/time.ts';
import { formatDay, fromIso } from '#shared/kernel/time.ts';
import { CoverLine } from './cover-line.tsx';
import type { DayFacts } from './month-days.ts';
import { coverOf, sessionInWords } from './session-words.ts';
import { timesOf } from './session-times.ts';
import type { StrandRow } from './strand-rows.ts';
import { strandRows } from './strand-rows.ts';

const SEA_UNITS = 104;

/** The days down the strand, the sea at their left; sessions hang from their day's strandline. */
export function StrandList(props: {
  readonly days: readonly DayFacts[];
  readonly today: CalendarDay;
  readonly zone: string;
}) {
  const rows = strandRows(props.days, props.today);
  return (
    <ol>
      {rows.map((row, index) => (
        <li key={keyOf(row)} className="relative pl-28.5">
          <Sea
            row={row}
            before={rows[index - 1]?.edge ?? row.edge}
            after={rows[index + 1]?.edge ?? row.edge}
          />
          <RowWords row={row} today={props.today} zone={props.zone} />
        </li>
      ))}
    </ol>
  );
}

function keyOf(row: StrandRow): string {
  if (row.kind === 'day') return row.day.on;
  return row.kind === 'run' ? `run-${row.from}` : `month-${row.on}`;
}

/** The sea beside one row. Its edge runs on from the row above and into the row below. */
function Sea({ row, before, after }: { row: StrandRow; before: number; after: number }) {
  const top = round((before + row.edge) / 2);
  const foot = round((row.edge + after) / 2);
  const edge = round(row.edge);
  const bend =
    row.kind === 'run'
      ? `C${top} 26 ${edge} 22 ${edge} 50S${foot} 76 ${foot} 100`
      : `Q${edge} 50 ${foot} 100`;
  return (
    <svg
      className="absolute top-0 left-0 h-full w-sea"
      viewBox={`0 0 ${SEA_UNITS} 100`}
      preserveAspectRatio="none"
      aria-hidden
    >
      <path className="fill-shallow" d={`M0 0H${top}${bend}V101H0Z`} />
      <path
        className="fill-none stroke-deep"
        strokeWidth="2"
        vectorEffect="non-scaling-stroke"
        d={`M${top} 0${bend}`}
      />
    </svg>
  );
}

function RowWords({ row, today, zone }: { row: StrandRow; today: CalendarDay; zone: string }) {
  if (row.kind === 'month') {
    return <h2 className="relative pt-3.5 pb-1 text-md">{formatDay(row.on, 'monthYear')}</h2>;
  }
  if (row.kind === 'run') {
    return (
      <div className="relative py-2 pr-4 text-ui">
        <FromSea edge={row.edge} />
        <p className="text-sm text-barnacle">{daySpan(row.from, row.to)}</p>
        <p>{row.words}</p>
      </div>
    );
  }
  return row.day.sessions.length === 0 ? (
    <EmptyDay day={row.day} edge={row.edge} isToday={row.day.on === today} zone={zone} />
  ) : (
    <SessionDay day={row.day} edge={row.edge} isToday={row.day.on === today} zone={zone} />
  );
}

interface DayProps {
  readonly day: DayFacts;
  readonly edge: number;
  readonly isToday: boolean;
  readonly zone: string;
}

function EmptyDay({ day, edge, isToday, zone }: DayProps) {
  return (
    <div className="relative min-h-8 py-1 pr-4 text-sm text-barnacle">
      <FromSea edge={edge} />
      <LowWater day={day} zone={zone} isShort />
      <p>
        {formatDay(day.on, 'short')}{' '}
        {isToday ? <b className="text-deep">today</b> : <span className="ml-1.5">no session</span>}
      </p>
    </div>
  );
}

function SessionDay({ day, edge, isToday, zone }: DayProps) {
  return (
    <div className="relative pt-1.5 pr-4 pb-3">
      <LowWater day={day} zone={zone} />
      <h3 className="pb-2 text-ui">
        {formatDay(day.on, 'short')} {isToday && <span className="text-deep">today</span>}
      </h3>
      <span
        className="strandline absolute right-4 -mt-1.5"
        style={{ left: atEdge(edge) }}
        aria-hidden
      />
      {day.sessions.map((session, index) => (
        <Hanging key={session.id} session={session} isLast={index === day.sessions.length - 1} />
      ))}
    </div>
  );
}

/** A session on its thread, with a foot at the end of it. */
function Hanging({ session, isLast }: { session: CalendarSession; isLast: boolean }) {
  const cover = coverOf(session.slots);
  const isDown = session.state === 'stood-down';
  const thread = cover.isYours ? 'bg-kelp' : 'bg-ink';
  return (
    <Link
      to={`/sessions/${session.id}`}
      aria-label={`${sessionInWords(session)}, ${timesOf(session)}`}
      className="relative ml-1.5 block min-h-target py-2 pl-4 text-ink no-underline"
    >
      <span
        className={`absolute -top-1 left-0 w-0.5 ${thread} ${isLast ? 'bottom-3' : '-bottom-1'}`}
      />
      <span className={`absolute bottom-3 left-0 h-0.5 w-2.5 ${thread}`} />
      <span className="flex flex-wrap items-baseline justify-between gap-x-2.5">
        <b className={isDown ? 'line-through' : undefined}>
          {session.shoreName}
          {cover.isYours && <span className="text-kelp"> you</span>}
        </b>
        <span className="text-ui text-barnacle tabular-nums">{timesOf(session)}</span>
      </span>
      <span className="text-ui">
        <CoverLine state={session.state} hasEnded={session.hasEnded} cover={cover} />
      </span>
    </Link>
  );
}

/** The day's low water, in the sea beside it. */
function LowWater({
  day,
  zone,
  isShort = false,
}: {
  day: DayFacts;
  zone: string;
  isShort?: boolean;
}) {
  const low = day.home?.daylightLow ?? null;
  if (low === null) return null;
  return (
    <p className="absolute -left-24.5 leading-tight text-barnacle tabular-nums">
      <span className="sr-only">Low water </span>
      <span className={isShort ? undefined : 'text-ui font-semibold text-ink'}>
        {clockOfWater(fromIso(low.at), zone)}
      </span>
      {!isShort && <span className="block text-ui">{metres(low.heightM)} m</span>}
    </p>
  );
}

function FromSea({ edge }: { edge: number }) {
  return (
    <span
      className="absolute top-4 h-px bg-edge"
      style={{
        left: atEdge(edge),
        width: `calc(var(--spacing-sea) * ${(SEA_UNITS + 1 - edge) / SEA_UNITS})`,
      }}
      aria-hidden
    />
  );
}

/** A place on the sea's edge, seen from the words of a row, which begin at 28.5 steps of space. */
function atEdge(edge: number): string {
  return `calc(var(--spacing-sea) * ${(edge / SEA_UNITS).toFixed(4)} - var(--spacing) * 28.5)`;
}

function round(value: number): number {
  return Math.round(value * 10) / 10;
}
