import { clockAt } from '#shared/kernel/time.ts';
import { clockOfWater, metres } from '#frontend/words/tide-words.ts';
import { listed, sentenceCase } from '#frontend/words/number-words.ts';
import { HeroAxes } from './hero-axes.tsx';
import type { HeroFacts, HeroLabel, HeroLabelKey, HeroLayout } from './hero-layout.ts';
import { isNarrowHero, layoutHero } from './hero-layout.ts';
import type { LabelSize } from './label-box.ts';
import type { WaterLevel } from './level-lines.tsx';
import { LevelLines, levelsWidthPx } from './level-lines.tsx';
import { textScale } from './root-font.ts';
import { useMeasuredWidth } from './use-measured-width.ts';
import { heightAt, linePath, sandPath, waterPath, xOf, yOf } from './water-curve.ts';

const HOUR_MS = 3_600_000;
const textLooks: Record<LabelSize, string> = {
  axis: 'text-xs',
  post: 'text-ui',
  off: 'text-md',
  low: 'text-xl tracking-title',
};

/**
 * The large water line of a session's day: when the lower shore is clear and when everyone is off
 * the shore, on the water that makes it so. Redrawn at the width it has; text is never scaled.
 */
export function TideHero(props: {
  readonly facts: HeroFacts;
  readonly shoreName: string;
  /** Heights to be shown over the water; they lie within the axis. */
  readonly levels?: readonly WaterLevel[];
}) {
  const { facts, shoreName, levels = [] } = props;
  const [ref, widthPx] = useMeasuredWidth<HTMLElement>();
  const scale = textScale();
  const rightPx = widthPx === null ? 0 : levelsWidthPx(levels, isNarrowHero(widthPx, scale), scale);
  const layout =
    widthPx === null || widthPx <= rightPx
      ? null
      : layoutHero(
          facts,
          widthPx - rightPx,
          scale,
          levels.map(({ heightM }) => heightM),
        );
  return (
    <figure ref={ref} className="min-h-56">
      {layout !== null && (
        <>
          <HeroDrawing
            facts={facts}
            layout={layout}
            levels={levels}
            rightPx={rightPx}
            label={spoken(facts, shoreName)}
          />
          <UnplacedTimes facts={facts} keys={layout.unplaced} />
        </>
      )}
    </figure>
  );
}

function HeroDrawing({
  facts,
  layout,
  levels,
  rightPx,
  label,
}: {
  readonly facts: HeroFacts;
  readonly layout: HeroLayout;
  readonly levels: readonly WaterLevel[];
  readonly rightPx: number;
  readonly label: string;
}) {
  const { plot, leftPx, heightPx } = layout;
  const { curve } = facts;
  const ceilingPx = plot.topPx - 4;
  const floorPx = plot.basePx + 4;
  const sand = sandPath(plot, curve, facts.startsAt, facts.offByAt, ceilingPx);
  const widthPx = plot.widthPx + leftPx + rightPx;
  return (
    <svg
      className="block max-w-none"
      viewBox={`${-leftPx} 0 ${widthPx} ${heightPx}`}
      width={widthPx}
      height={heightPx}
      role="img"
      aria-label={label}
    >
      <HeroAxes facts={facts} layout={layout} />
      <path className="fill-shallow" d={waterPath(plot, curve, floorPx)} />
      <path
        className={facts.isStoodDown ? 'fill-none stroke-edge' : 'fill-sand'}
        strokeDasharray={facts.isStoodDown ? '4 4' : undefined}
        d={sand}
      />
      {facts.axis.bottomM < 0 && (
        <path
          className="stroke-edge"
          strokeDasharray="2 3"
          d={`M0 ${yOf(plot, 0)}H${plot.widthPx}`}
        />
      )}
      <path
        className="fill-none stroke-deep"
        strokeWidth="2.25"
        strokeLinejoin="round"
        d={linePath(plot, curve)}
      />
      <LevelLines plot={plot} levels={levels} isNarrow={layout.isNarrow} scale={textScale()} />
      {facts.isStoodDown ? (
        <FallenPost facts={facts} layout={layout} />
      ) : (
        <Posts facts={facts} layout={layout} />
      )}
      {layout.labels.map((placed) => (
        <HeroText key={placed.key} label={placed} />
      ))}
      <path className="stroke-edge" strokeWidth="1.25" d={`M0 ${floorPx}H${plot.widthPx}`} />
    </svg>
  );
}

function Posts({ facts, layout }: { facts: HeroFacts; layout: HeroLayout }) {
  const { plot, labels } = layout;
  const y = (at: number): number => yOf(plot, heightAt(facts.curve, at) ?? facts.axis.bottomM);
  const [startX, clearX, offX] = [facts.startsAt, facts.clearByAt, facts.offByAt].map((at) =>
    xOf(plot, at),
  );
  const ticks = labels.flatMap(({ key }) => {
    if (key === 'party-meets') return [facts.partyMeetsAt];
    return key === 'crew-meets' ? [facts.crewMeetsAt] : [];
  });
  return (
    <>
      <path
        className="stroke-sand-edge"
        strokeWidth="1.25"
        d={`M${startX} ${plot.topPx - 4}V${y(facts.startsAt)}`}
      />
      <path
        className="stroke-ink"
        strokeWidth="1.25"
        d={`M${clearX} ${layout.clearPostTopPx}V${y(facts.clearByAt)}`}
      />
      <circle
        className="fill-foam stroke-ink"
        strokeWidth="1.75"
        cx={clearX}
        cy={y(facts.clearByAt)}
        r="3.4"
      />
      <path
        className="stroke-ink"
        strokeWidth="2.25"
        d={`M${offX} ${layout.offPostTopPx}V${y(facts.offByAt)}`}
      />
      <circle className="fill-ink" cx={offX} cy={y(facts.offByAt)} r="4.2" />
      {ticks.map((at) => (
        <path
          key={at}
          className="stroke-ink"
          strokeWidth="1.5"
          d={`M${xOf(plot, at)} ${y(at) - 6}v12`}
        />
      ))}
    </>
  );
}

/** The post of a session that is stood down lies on the water where it stood. */
function FallenPost({ facts, layout }: { facts: HeroFacts; layout: HeroLayout }) {
  const { plot, isNarrow } = layout;
  const footM = heightAt(facts.curve, facts.offByAt) ?? facts.axis.bottomM;
  const headAt = facts.offByAt - (isNarrow ? 1.5 : 1.35) * HOUR_MS;
  const headM = heightAt(facts.curve, headAt) ?? footM;
  return (
    <>
      <path
        className="stroke-barnacle"
        strokeWidth="2.25"
        d={`M${xOf(plot, facts.offByAt) - 4} ${yOf(plot, footM) - 3}L${xOf(plot, headAt)} ${yOf(plot, headM) - 4}`}
      />
      <circle className="fill-barnacle" cx={xOf(plot, facts.offByAt)} cy={yOf(plot, footM)} r="4" />
    </>
  );
}

function HeroText({ label }: { label: HeroLabel }) {
  const isQuiet = label.key === 'sunrise' || label.key === 'sunset' || label.key === 'stood-down';
  return (
    <text
      className={`tabular-nums ${textLooks[label.size]} ${isQuiet ? 'fill-barnacle' : 'fill-ink'}`}
      x={label.x}
      y={label.y}
      textAnchor={label.anchor}
    >
      {label.parts.map(({ text, isStrong }) => (
        <tspan key={text} className={isStrong ? 'font-semibold' : undefined}>
          {text}
        </tspan>
      ))}
    </text>
  );
}

/** The times that found no place in the drawing, in words under it. */
function UnplacedTimes({ facts, keys }: { facts: HeroFacts; keys: readonly HeroLabelKey[] }) {
  const clock = (at: number) => clockAt(at, facts.zone);
  const said: Partial<Record<HeroLabelKey, string>> = {
    'off-by': `off the shore by ${clock(facts.offByAt)}`,
    'clear-by': `lower shore clear by ${clock(facts.clearByAt)}`,
    'low-water': `low water ${clockOfWater(facts.lowWaterAt, facts.zone)}`,
    'low-height': `low water is ${metres(facts.lowWaterHeightM)} m`,
    starts: `on the shore ${clock(facts.startsAt)}`,
    'crew-meets': `crew meet ${clock(facts.crewMeetsAt)}`,
    'party-meets': `party meets ${clock(facts.partyMeetsAt)}`,
  };
  const order: readonly HeroLabelKey[] = [
    'crew-meets',
    'party-meets',
    'starts',
    'low-water',
    'low-height',
    'clear-by',
    'off-by',
  ];
  const words = order.flatMap((key) => (keys.includes(key) ? [said[key] ?? ''] : []));
  if (words.length === 0) return null;
  return (
    <figcaption className="mt-2 text-ui tabular-nums">{sentenceCase(listed(words))}.</figcaption>
  );
}

function spoken(facts: HeroFacts, shoreName: string): string {
  const clock = (at: number) => clockAt(at, facts.zone);
  const low = `Water line for the day at ${shoreName}. Low water ${clockOfWater(facts.lowWaterAt, facts.zone)}, ${metres(facts.lowWaterHeightM)} metres.`;
  if (facts.isStoodDown) return `${low} Stood down.`;
  return `${low} Working window ${clock(facts.startsAt)} to ${clock(facts.offByAt)}. Lower shore clear by ${clock(facts.clearByAt)}. Off the shore by ${clock(facts.offByAt)}.`;
}
