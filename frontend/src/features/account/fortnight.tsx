import { TideCredit } from '#frontend/components/tide-credit.tsx';
import { useMeasuredWidth } from '#frontend/components/use-measured-width.ts';
import type { Plot, WaterPoint } from '#frontend/components/water-curve.ts';
import {
  cutCurve,
  heightAt,
  linePath,
  readCurve,
  sandPath,
  waterPath,
  xOf,
  yOf,
} from '#frontend/components/water-curve.ts';
import { textScale } from '#frontend/components/root-font.ts';
import { clockOfWater } from '#frontend/words/tide-words.ts';
import { counted, listed } from '#frontend/words/number-words.ts';
import type { CalendarDay, Instant } from '#shared/kernel/time.ts';
import { dayAt, formatDay, fromIso } from '#shared/kernel/time.ts';
import type { FrontDoorView } from './account.queries.ts';

type Fortnight = NonNullable<FrontDoorView['fortnight']>;

const HEIGHT_PX = 330;
/** The width of a day under which its words would touch the next day's. */
const LEAST_DAY_PX = 66;
const LEAST_DAYS = 4;
const DAY_MS = 86_400_000;

/** The home shore's water for a fortnight, the sessions' posts standing in it. */
export function FortnightWater({ fortnight }: { fortnight: Fortnight }) {
  const [ref, widthPx] = useMeasuredWidth<HTMLElement>();
  return (
    <figure ref={ref} className="mt-8 min-h-48">
      {widthPx !== null && widthPx > 0 && <Drawing fortnight={fortnight} widthPx={widthPx} />}
      <figcaption className="bg-shallow px-4 pb-2 wide:px-page">
        <TideCredit shown="The water" source={fortnight.source} />
      </figcaption>
    </figure>
  );
}

function Drawing({ fortnight, widthPx }: { fortnight: Fortnight; widthPx: number }) {
  const scale = textScale();
  const { zone } = fortnight;
  const curve = readCurve(fortnight.curve);
  const span = spanShown(fortnight, curve, widthPx / (LEAST_DAY_PX * scale));
  if (span === null) return null;
  const isShown = (iso: string): boolean =>
    fromIso(iso) > span.fromAt && fromIso(iso) < span.untilAt;
  const sessions = fortnight.sessions.filter(({ lowWaterAt }) => isShown(lowWaterAt));
  const neaps = fortnight.neaps.filter(({ at }) => isShown(at));
  const hasWords = widthPx / span.days >= LEAST_DAY_PX * scale;
  const wordsPx = hasWords ? 44 * scale : 0;
  const heightPx = HEIGHT_PX - 60 + wordsPx;
  const plot: Plot = {
    ...span,
    widthPx,
    topPx: wordsPx + 34,
    basePx: heightPx - 24,
    axis: fortnight.axis,
  };
  const sandPx = plot.topPx - 8;
  const postPx = plot.topPx - 22;
  return (
    <svg
      className="block max-w-none"
      viewBox={`0 0 ${widthPx} ${heightPx}`}
      width={widthPx}
      height={heightPx}
      role="img"
      aria-label={spoken(span.days, sessions, neaps, zone)}
    >
      <path className="fill-shallow" d={waterPath(plot, curve, heightPx)} />
      {sessions.map(({ startsAt, offTheShoreBy }) => (
        <path
          key={startsAt}
          className="fill-sand"
          d={sandPath(plot, curve, fromIso(startsAt), fromIso(offTheShoreBy), sandPx)}
        />
      ))}
      <path
        className="fill-none stroke-deep"
        strokeWidth="2.25"
        strokeLinejoin="round"
        d={linePath(plot, curve)}
      />
      {sessions.map(({ startsAt, lowWaterAt }) => {
        const at = fromIso(lowWaterAt);
        const heightM = heightAt(curve, at);
        if (heightM === null) return null;
        return (
          <path
            key={startsAt}
            className="stroke-ink"
            strokeWidth="2"
            d={`M${xOf(plot, at)} ${postPx}V${yOf(plot, heightM)}`}
          />
        );
      })}
      {hasWords &&
        oneADay(sessions, zone).map(({ on, at }) => (
          <TwoLines
            key={on}
            x={xOf(plot, at)}
            y={postPx - 8}
            scale={scale}
            above={shortDay(on)}
            below={clockOfWater(at, zone)}
            isStrong
          />
        ))}
      {hasWords &&
        neaps.map(({ at }) => {
          const x = xOf(plot, fromIso(at));
          if (x < LEAST_DAY_PX / 2 || x > widthPx - LEAST_DAY_PX / 2) return null;
          return (
            <TwoLines
              key={at}
              x={x}
              y={highestBeside(plot, curve, fromIso(at)) - 14 * scale}
              scale={scale}
              above={shortDay(dayAt(fromIso(at), zone))}
              below="neaps"
              isStrong={false}
            />
          );
        })}
    </svg>
  );
}

/** The y of the highest water within half a day of a moment. */
function highestBeside(plot: Plot, curve: readonly WaterPoint[], at: Instant): number {
  const beside = cutCurve(curve, at - DAY_MS / 2, at + DAY_MS / 2);
  return yOf(plot, Math.max(...beside.map(({ heightM }) => heightM)));
}

function TwoLines(props: {
  readonly x: number;
  readonly y: number;
  readonly scale: number;
  readonly above: string;
  readonly below: string;
  readonly isStrong: boolean;
}) {
  const { x, y, scale, above, below, isStrong } = props;
  return (
    <>
      <text
        className={`text-ui ${isStrong ? 'fill-ink font-semibold' : 'fill-barnacle'}`}
        x={x}
        y={y - 18 * scale}
        textAnchor="middle"
      >
        {above}
      </text>
      <text className="fill-barnacle text-sm tabular-nums" x={x} y={y} textAnchor="middle">
        {below}
      </text>
    </>
  );
}

/**
 * The whole fortnight, or on a narrow page as many of its days as have room for their words,
 * beginning the day before the first session.
 */
function spanShown(
  { sessions }: Fortnight,
  curve: readonly WaterPoint[],
  room: number,
): { fromAt: Instant; untilAt: Instant; days: number } | null {
  const first = curve[0];
  const last = curve[curve.length - 1];
  if (first === undefined || last === undefined) return null;
  const all = Math.round((last.at - first.at) / DAY_MS);
  const days = Math.min(all, Math.max(LEAST_DAYS, Math.floor(room)));
  const earliest = sessions.map(({ lowWaterAt }) => fromIso(lowWaterAt) - 1.5 * DAY_MS);
  const latestFromAt = last.at - days * DAY_MS;
  const fromAt = days === all ? first.at : Math.max(first.at, Math.min(latestFromAt, ...earliest));
  return { fromAt, untilAt: days === all ? last.at : fromAt + days * DAY_MS, days };
}

/** The first session of each day: two posts of one day share their words. */
function oneADay(
  sessions: Fortnight['sessions'],
  zone: string,
): { on: CalendarDay; at: Instant }[] {
  const days = new Map<CalendarDay, Instant>();
  for (const { lowWaterAt } of sessions) {
    const at = fromIso(lowWaterAt);
    const on = dayAt(at, zone);
    if (!days.has(on)) days.set(on, at);
  }
  return [...days].map(([on, at]) => ({ on, at }));
}

function shortDay(on: CalendarDay): string {
  return formatDay(on, 'short').split(' ').slice(0, 2).join(' ');
}

function spoken(
  days: number,
  sessions: Fortnight['sessions'],
  neaps: Fortnight['neaps'],
  zone: string,
): string {
  const open = sessions.map(({ lowWaterAt }) => {
    const at = fromIso(lowWaterAt);
    return `${formatDay(dayAt(at, zone), 'long')}, low water ${clockOfWater(at, zone)}`;
  });
  const quiet = neaps.map(({ at }) => formatDay(dayAt(fromIso(at), zone), 'long'));
  return [
    `The water for ${counted(days, 'day')}.`,
    open.length === 0 ? 'No session in them.' : `Sessions on ${open.join('; ')}.`,
    ...(quiet.length === 0 ? [] : [`Neaps on ${listed(quiet)}.`]),
  ].join(' ');
}
