import { DayWater } from '#frontend/components/day-water.tsx';
import type { WaterLevel } from '#frontend/components/level-lines.tsx';
import { TideHero } from '#frontend/components/tide-hero.tsx';
import type { WaterAxis } from '#frontend/components/water-curve.ts';
import { readCurve } from '#frontend/components/water-curve.ts';
import { sayNoWindow } from '#frontend/words/no-window-words.ts';
import { sentenceCase } from '#frontend/words/number-words.ts';
import { metres } from '#frontend/words/tide-words.ts';
import type { DayOfWater } from '#shared/contracts/shores.ts';
import { addDays, formatDay, fromIso, startOfDay } from '#shared/kernel/time.ts';
import type { ShoreWater } from './shores.queries.ts';

const ROOM_M = 0.3;

/**
 * The water of a day with the levels of its shore: the working window in sand, or in words why
 * that day has none.
 */
export function ShoreCurve(props: {
  readonly day: DayOfWater;
  readonly settings: Pick<ShoreWater, 'zone' | 'workingLevelM' | 'cutOffLevelM'>;
  readonly shoreName: string;
}) {
  const { day, settings, shoreName } = props;
  const { zone } = settings;
  const levels: WaterLevel[] = [
    { name: 'cut-off level', heightM: settings.cutOffLevelM },
    { name: 'working level', heightM: settings.workingLevelM },
  ];
  const water = {
    curve: readCurve(day.curve),
    axis: axisWith(day.axis, levels),
    dayFromAt: startOfDay(day.on, zone),
    dayUntilAt: startOfDay(addDays(day.on, 1), zone),
    zone,
    sunriseAt: day.sunriseAt === null ? null : fromIso(day.sunriseAt),
    sunsetAt: day.sunsetAt === null ? null : fromIso(day.sunsetAt),
  };
  if (day.window !== null) {
    return (
      <TideHero
        shoreName={shoreName}
        levels={levels}
        facts={{
          ...water,
          crewMeetsAt: fromIso(day.window.crewMeetsAt),
          partyMeetsAt: fromIso(day.window.partyMeetsAt),
          startsAt: fromIso(day.window.startsAt),
          lowWaterAt: fromIso(day.window.lowWaterAt),
          lowWaterHeightM: day.window.lowWaterHeightM,
          clearByAt: fromIso(day.window.lowerShoreClearBy),
          offByAt: fromIso(day.window.offTheShoreBy),
          isStoodDown: false,
        }}
      />
    );
  }
  const reasons = day.reasons.map((reason) => sayNoWindow(reason, zone));
  return (
    <>
      <DayWater
        facts={{
          ...water,
          lows: readCurve(day.extremes.filter(({ kind }) => kind === 'low')),
        }}
        levels={levels}
        label={`Water line for ${formatDay(day.on, 'long')} at ${shoreName}. No working window: ${reasons.join('; ')}.`}
      />
      <p className="mt-2 text-ui font-semibold">No working window this day.</p>
      <ul className="text-ui">
        {reasons.map((reason) => (
          <li key={reason} className="tabular-nums">
            {sentenceCase(reason)}.
          </li>
        ))}
      </ul>
    </>
  );
}

/** The dashed lines in words, for drawings too narrow to carry them. */
export function LevelsInWords(props: {
  readonly settings: Pick<ShoreWater, 'workingLevelM' | 'cutOffLevelM'>;
}) {
  const { workingLevelM, cutOffLevelM } = props.settings;
  return (
    <p className="mt-1 text-sm text-barnacle">
      {`Dashed: cut-off level ${metres(cutOffLevelM)} m, working level ${metres(workingLevelM)} m.`}
    </p>
  );
}

/** The axis, high and deep enough for the levels too. */
function axisWith(axis: WaterAxis, levels: readonly WaterLevel[]): WaterAxis {
  const heights = levels.map(({ heightM }) => heightM);
  return {
    bottomM: Math.min(axis.bottomM, ...heights.map((heightM) => heightM - ROOM_M)),
    topM: Math.max(axis.topM, ...heights.map((heightM) => heightM + ROOM_M)),
  };
}
