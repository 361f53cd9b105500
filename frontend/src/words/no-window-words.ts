import type { NoWindowView } from '#shared/contracts/shores.ts';
import { clockAt, fromIso } from '#shared/kernel/time.ts';
import { hoursAndMinutes } from './duration-words.ts';
import { clockOfWater, metres } from './tide-words.ts';

type TooShort = Extract<NoWindowView, { why: 'too-short' }>;
type Cut = TooShort['cuts'][number];
type Limit = Cut['by'];

/**
 * Why a low water gives no working window, with the figures that decided, on the clock of the
 * shore's zone: 'low water 14:03, 2.0 m, above 1.3 m'. It begins small and ends without a full
 * stop, to stand in a row or after a colon.
 */
export function sayNoWindow(reason: NoWindowView, zone: string): string {
  if (reason.why === 'no-low-water') return 'no low water this day';
  const clock = (iso: string): string => clockAt(fromIso(iso), zone);
  const low = `low water ${clockOfWater(fromIso(reason.lowWaterAt), zone)}`;
  switch (reason.why) {
    case 'too-high': {
      const [heightM, levelM] = apart(reason.lowWaterHeightM, reason.workingLevelM);
      return `${low}, ${heightM} m, above ${levelM} m`;
    }
    case 'dark': {
      const { lowWaterAt, lightFromAt, lightToAt } = reason;
      if (lightFromAt === null || lightToAt === null) return `${low}, dark all day`;
      return fromIso(lowWaterAt) < fromIso(lightFromAt)
        ? `${low}, dark until ${clock(lightFromAt)} with its margin`
        : `${low}, dark from ${clock(lightToAt)} with its margin`;
    }
    case 'out-of-hours': {
      const { lowWaterAt, earliestAt, latestAt } = reason;
      if (earliestAt !== null && fromIso(lowWaterAt) < fromIso(earliestAt)) {
        return `${low}, before ${clock(earliestAt)}`;
      }
      return latestAt === null ? `${low}, outside the hours` : `${low}, after ${clock(latestAt)}`;
    }
    case 'cut-off-at-low-water':
      return `${low} with ${metres(reason.surgeM)} m of surge reaches the cut-off level of ${metres(reason.cutOffLevelM)} m`;
    case 'off-the-shore-before-low-water':
      return `off the shore by ${clock(reason.offTheShoreBy)}, before low water at ${clockOfWater(fromIso(reason.lowWaterAt), zone)}`;
    case 'too-short': {
      const left = hoursAndMinutes(reason.lengthMinutes);
      const cuts = cutsInWords(reason.cuts, clock);
      return `${low} leaves ${left}${cuts}, less than ${hoursAndMinutes(reason.minimumMinutes)}`;
    }
  }
}

const startWords: Record<Limit, ((clock: string) => string) | null> = {
  'low-water-time': null,
  'working-level': (clock) => `once the water is low enough at ${clock}`,
  daylight: (clock) => `in the light from ${clock}`,
  hours: (clock) => `after ${clock}`,
  'cut-off-level': (clock) => `once the way off is clear at ${clock}`,
};

const offWords: Record<Limit, ((clock: string) => string) | null> = {
  'low-water-time': null,
  'working-level': (clock) => `before the water is too high at ${clock}`,
  daylight: (clock) => `in the light to ${clock}`,
  hours: (clock) => `before ${clock}`,
  'cut-off-level': (clock) => `before ${clock}, when the cut-off level is near`,
};

/** What took from the time before and after low water; nothing where that alone is too short. */
function cutsInWords(cuts: readonly Cut[], clock: (iso: string) => string): string {
  const said = cuts.flatMap(({ edge, by, at }) => {
    if (edge === 'end') return [];
    const words = (edge === 'start' ? startWords : offWords)[by];
    return words === null ? [] : [words(clock(at))];
  });
  return said.length === 0 ? '' : ` ${said.join(' and ')}`;
}

/** Two heights to one decimal, or to two where one would make them look the same. */
function apart(heightM: number, levelM: number): readonly [string, string] {
  const pair = [metres(heightM), metres(levelM)] as const;
  if (pair[0] !== pair[1]) return pair;
  return [heightM, levelM].map((m) => m.toFixed(2).replace('-', '−')) as [string, string];
}
