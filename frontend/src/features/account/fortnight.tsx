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
import { listed } from '#frontend/words/number-words.ts';
import type { CalendarDay, Instant } from '#shared/kernel/time.ts';
import { dayAt, formatDay, fromIso } from '#shared/kernel/time.ts';
import type { FrontDoorView } from './account.queries.ts';

type Fortnight = NonNullable<FrontDoorView['fortnight']>;

const TALL_PX = 330;
const LOW_PX = 200;
/** The width of a day under which its words would touch the next day's. */
const LEAST_DAY_PX = 66;
const DAYS = 14;
const HALF_DAY_MS = 12 * 3_600_000;

/** The home shore's water for a fortnight, the sessions' posts standing in it. */
export function FortnightWater({ fortnight }: { fortnight: Fortnight }) {
  const [ref, widthPx] = useMeasuredWidth<HTMLElement>();
  const scale = textScale();
  const hasWords = widthPx !== null && widthPx / DAYS >= LEAST_DAY_PX * scale;
  return (
    <figure ref={ref} className="mt-8 min-h-48">
      {widthPx !== null && widthPx > 0 && (
        <Drawing fortnight={fortnight} widthPx={widthPx} hasWords={hasWords} scale={scale} />
      )}
      <figcaption className="bg-shallow px-4 pb-2 text-xs wide:px-page">
        {`Tides predicted from ${fortnight.source.stationName}, heights above ${fortnight.source.datum}. ${fortnight.source.attribution} Predictions are predictions: the official tide table and the shore leader on the spot decide.`}
      </figcaption>
    </figure>
  );
}

function Drawing(props: {
  readonly fortnight: Fortnight;
  readonly widthPx: number;
  readonly hasWords: boolean;
  readonly scale: number;
}) {
  const { fortnight, widthPx, hasWords, scale } = props;
  const { zone, sessions, neaps } = fortnight;
  const curve = readCurve(fortnight.curve);
  const first = curve[0];
  const last = curve[curve.length - 1];
  if (first === undefined || last === undefined) return null;
  const wordsPx = hasWords ? 44 * scale : 0;
  const heightPx = (hasWords ? TALL_PX - 60 : LOW_PX) + wordsPx;
  const plot: Plot = {
    fromAt: first.at,
    untilAt: last.at,
    widthPx,
    topPx: wordsPx + (hasWords ? 34 : 24),
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
      aria-label={spoken(fortnight)}
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
        oneADay(fortnight).map(({ on, at }) => (
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
  const beside = cutCurve(curve, at - HALF_DAY_MS, at + HALF_DAY_MS);
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

/** The first session of each day: two posts of one day share their words. */
function oneADay({ sessions, zone }: Fortnight): { on: CalendarDay; at: Instant }[] {
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

function spoken({ sessions, zone, neaps }: Fortnight): string {
  const days = sessions.map(({ lowWaterAt }) => {
    const at = fromIso(lowWaterAt);
    return `${formatDay(dayAt(at, zone), 'long')}, low water ${clockOfWater(at, zone)}`;
  });
  const open = days.length === 0 ? 'No session in it.' : `Sessions on ${listed(days)}.`;
  const quiet = neaps.map(({ at }) => formatDay(dayAt(fromIso(at), zone), 'long'));
  return `The water for fourteen days. ${open}${quiet.length === 0 ? '' : ` Neaps on ${listed(quiet)}.`}`;
}
