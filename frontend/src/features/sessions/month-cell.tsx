import { useLayoutEffect, useRef } from 'react';
import { clockOfWater, metres } from '#frontend/words/tide-words.ts';
import type { CalendarSession } from '#shared/contracts/sessions.ts';
import type { Instant } from '#shared/kernel/time.ts';
import { formatDay, fromIso } from '#shared/kernel/time.ts';
import type { DayFacts, DayScale } from './month-days.ts';
import { dayInWords, positionOf, waterShare } from './month-days.ts';
import { floorShare } from './week-floor.tsx';

/** How far into its day a session's stake stands, in hundredths, and how high the water is there. */
export function stakeOf(
  scale: DayScale,
  session: CalendarSession,
): { leftPercent: number; bottomShare: number } {
  const at = positionOf(scale, fromIso(session.lowWaterAt ?? session.startsAt));
  return {
    leftPercent: Math.round((at % 1) * 1000) / 10,
    bottomShare: floorShare(waterShare(scale, at)),
  };
}

/** One day of the month: its date and low water, the stake of its sessions, today's dot. */
export function MonthCell(props: {
  readonly day: DayFacts;
  readonly scale: DayScale;
  readonly isOfMonth: boolean;
  readonly isFirstCell: boolean;
  /** The moment, on today's cell only. */
  readonly nowAt: Instant | null;
}) {
  const { day, scale, isOfMonth, isFirstCell, nowAt } = props;
  const standing = day.sessions.filter(({ state }) => state !== 'stood-down');
  const last = standing[standing.length - 1];
  const hasName = isFirstCell || day.on.endsWith('-01');
  const [date, month] = formatDay(day.on, 'dayMonth').split(' ');
  const low = day.home?.daylightLow ?? null;
  const isToday = nowAt !== null;
  const words = useRef<HTMLSpanElement>(null);
  useLayoutEffect(() => {
    // FullCalendar names the cell by its date alone, which would hide the words in it.
    words.current?.closest('.fc-daygrid-day-number')?.removeAttribute('aria-label');
  }, []);
  return (
    <>
      <span ref={words} className="sr-only">
        {dayInWords(day, scale.zone)}
      </span>
      <span className="month-date" aria-hidden>
        <span className={isOfMonth && !isToday ? 'text-ink' : 'text-barnacle'}>
          <span
            className={`text-ui ${isToday ? 'font-semibold text-deep' : isOfMonth ? 'font-semibold' : ''}`}
          >
            {date}
          </span>
          {hasName && <span className="text-ink"> {month?.slice(0, 3)}</span>}
        </span>
        {low !== null && (
          <span className="whitespace-nowrap text-barnacle tabular-nums">
            <span className={day.sessions.length > 0 ? 'font-semibold text-ink' : undefined}>
              {clockOfWater(fromIso(low.at), scale.zone)}
            </span>{' '}
            {metres(low.heightM)}
          </span>
        )}
      </span>
      {isToday && (
        <span className="block text-xs font-semibold text-deep" aria-hidden>
          Today
        </span>
      )}
      {last !== undefined && <Stake scale={scale} session={last} isYours={isYours(last)} />}
      {nowAt !== null && scale.axis !== null && <NowDot scale={scale} nowAt={nowAt} />}
    </>
  );
}

function Stake(props: {
  readonly scale: DayScale;
  readonly session: CalendarSession;
  readonly isYours: boolean;
}) {
  const { leftPercent, bottomShare } = stakeOf(props.scale, props.session);
  const colour = props.session.hasEnded ? 'bg-edge' : props.isYours ? 'bg-kelp' : 'bg-ink';
  return (
    <span
      className={`absolute top-10 -ml-px w-0.5 ${colour}`}
      style={{
        left: `${leftPercent}%`,
        bottom: `calc(var(--spacing-floor) * ${bottomShare.toFixed(3)})`,
      }}
      aria-hidden
    />
  );
}

function NowDot({ scale, nowAt }: { scale: DayScale; nowAt: Instant }) {
  const at = positionOf(scale, nowAt);
  const share = floorShare(waterShare(scale, at));
  return (
    <span
      className="absolute -mb-1.5 -ml-1.5 size-3 rounded-full border-2 border-foam bg-ink"
      style={{
        left: `${(at % 1) * 100}%`,
        bottom: `calc(var(--spacing-floor) * ${share.toFixed(3)})`,
      }}
      aria-hidden
    />
  );
}

function isYours(session: CalendarSession): boolean {
  return session.slots.some((slot) => slot.isYours);
}

/** Springs and neaps of a week, at its left. */
export function WeekGutter({ days }: { days: readonly DayFacts[] }) {
  return (
    <span className="week-gutter" aria-hidden>
      {days.flatMap(({ mark }) =>
        mark === null
          ? []
          : [
              <span key={mark.on} className="block">
                <b>{mark.kind}</b>
                <span className="block text-barnacle">{metres(mark.rangeM)} m</span>
              </span>,
            ],
      )}
    </span>
  );
}
