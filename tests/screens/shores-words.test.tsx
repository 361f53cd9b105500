import { describe, expect, it } from 'vitest';
import type { z } from 'zod';
import { sayNoWindow } from '#frontend/words/no-window-words.ts';
import type { noWindowReason } from '#shared/contracts/shores.ts';
import { zone } from './made-up-replies.ts';
import { reason } from './made-up-shores.ts';

type Written = z.input<typeof noWindowReason>;

/** London in May is an hour ahead of UTC. */
const at = (utcClock: string): string => `2027-05-09T${utcClock}:00.000Z`;
const cuts = {
  start: { edge: 'start', by: 'hours', at: at('06:00') },
  dawn: { edge: 'start', by: 'daylight', at: at('04:40') },
  low: { edge: 'start', by: 'working-level', at: at('06:20') },
  clear: { edge: 'start', by: 'cut-off-level', at: at('06:20') },
  reach: { edge: 'start', by: 'low-water-time', at: at('06:00') },
  end: { edge: 'end', by: 'hours', at: at('07:00') },
  off: { edge: 'off-the-shore', by: 'cut-off-level', at: at('07:36') },
  dusk: { edge: 'off-the-shore', by: 'daylight', at: at('19:20') },
  high: { edge: 'off-the-shore', by: 'working-level', at: at('07:36') },
  late: { edge: 'off-the-shore', by: 'hours', at: at('07:36') },
  after: { edge: 'off-the-shore', by: 'low-water-time', at: at('07:36') },
} as const;

const sayings: readonly (readonly [string, Written])[] = [
  ['no low water this day', { why: 'no-low-water', on: '2027-05-09' }],
  [
    'low water 14:03, 2.0 m, above 1.3 m',
    { why: 'too-high', lowWaterAt: at('13:03'), lowWaterHeightM: 2.04, workingLevelM: 1.3 },
  ],
  [
    'low water 14:03, 1.32 m, above 1.30 m',
    { why: 'too-high', lowWaterAt: at('13:03'), lowWaterHeightM: 1.32, workingLevelM: 1.3 },
  ],
  [
    'low water 20:14, dark from 19:50 with its margin',
    { why: 'dark', lowWaterAt: at('19:14'), lightFromAt: at('04:40'), lightToAt: at('18:50') },
  ],
  [
    'low water 05:14, dark until 05:40 with its margin',
    { why: 'dark', lowWaterAt: at('04:14'), lightFromAt: at('04:40'), lightToAt: at('18:50') },
  ],
  [
    'low water 12:10, dark all day',
    { why: 'dark', lowWaterAt: at('11:10'), lightFromAt: null, lightToAt: null },
  ],
  [
    'low water 06:39, before 07:00',
    {
      why: 'out-of-hours',
      lowWaterAt: at('05:39'),
      earliestAt: at('06:00'),
      latestAt: at('17:00'),
    },
  ],
  [
    'low water 18:20, after 18:00',
    { why: 'out-of-hours', lowWaterAt: at('17:20'), earliestAt: null, latestAt: at('17:00') },
  ],
  [
    'low water 12:10 with 0.3 m of surge reaches the cut-off level of 2.4 m',
    {
      why: 'cut-off-at-low-water',
      lowWaterAt: at('11:10'),
      lowWaterHeightM: 2.15,
      surgeM: 0.3,
      cutOffLevelM: 2.4,
    },
  ],
  [
    'off the shore by 11:50, before low water at 12:10',
    {
      why: 'off-the-shore-before-low-water',
      lowWaterAt: at('11:10'),
      offTheShoreBy: at('10:50'),
    },
  ],
  [
    'low water 07:46 leaves 1:16 after 07:00, less than 1:30',
    tooShort([cuts.start, cuts.end, cuts.after]),
  ],
  [
    'low water 07:46 leaves 1:16 in the light from 05:40 and before 08:36, less than 1:30',
    tooShort([cuts.dawn, cuts.late]),
  ],
  [
    'low water 07:46 leaves 1:16 once the water is low enough at 07:20 and before the water is too high at 08:36, less than 1:30',
    tooShort([cuts.low, cuts.high]),
  ],
  [
    'low water 07:46 leaves 1:16 once the way off is clear at 07:20 and before 08:36, when the cut-off level is near, less than 1:30',
    tooShort([cuts.clear, cuts.off]),
  ],
  [
    'low water 07:46 leaves 1:16 in the light to 20:20, less than 1:30',
    tooShort([cuts.reach, cuts.dusk]),
  ],
  ['low water 07:46 leaves 1:16, less than 1:30', tooShort([cuts.reach, cuts.end, cuts.after])],
];

function tooShort(some: Extract<Written, { why: 'too-short' }>['cuts']): Written {
  return {
    why: 'too-short',
    lowWaterAt: at('06:46'),
    lengthMinutes: 76,
    minimumMinutes: 90,
    cuts: some,
  };
}

describe('why a day has no working window', () => {
  it.each(sayings)('says: %s', (sentence, written) => {
    expect(sayNoWindow(reason(written), zone)).toBe(sentence);
  });
});
