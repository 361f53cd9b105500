import { describe, expect, it } from 'vitest';
import { tableRequest, tideTable } from '#backend/features/tides/tide-table.ts';
import { tideStations } from '#backend/platform/tides/tide-stations.ts';
import { fromIso } from '#shared/kernel/time.ts';

const WORDS = { '--station': 'noaa/9411340', '--from': '2026-10-10', '--to': '2026-10-11' };

describe('the command for a tide table', () => {
  it('takes a date alone as its midnight in UTC, and a time with its offset', () => {
    expect(tableRequest(words({ '--to': '2026-10-10T13:00+01:00' }))).toEqual({
      isGranted: true,
      value: {
        stationId: 'noaa/9411340',
        fromAt: fromIso('2026-10-10T00:00Z'),
        toAt: fromIso('2026-10-10T12:00Z'),
      },
    });
  });

  it.each([
    ['a time without its offset', { '--from': '2026-10-10T00:00' }, "not '2026-10-10T00:00'"],
    ['a day that does not exist', { '--to': '2026-02-30' }, "not '2026-02-30'"],
    ['an end that is no later', { '--to': '2026-10-10' }, 'must be later'],
    ['more than twenty years', { '--to': '2046-11-10' }, 'more than 20 years'],
    ['no station', { '--station': '' }, 'all needed'],
    ['an option that is none', { '--zone': 'UTC' }, '--zone'],
  ])('refuses %s in a sentence', (_, change, sentence) => {
    const answer = tableRequest(words(change));
    expect(answer.isGranted ? 'granted' : answer.reasons.join()).toContain(sentence);
  });

  it('gives the highs and lows of the span in order, in UTC and metres', async () => {
    // NOAA, Santa Barbara 9411340: low waters of 10 October 2026 at 10:32 and 23:20 UTC.
    const request = tableRequest(words({}));
    if (!request.isGranted) throw new Error(request.reasons.join());
    const table = await tideTable(request.value, tideStations());
    const lines = table.isGranted ? table.value : [];
    expect(lines.map(({ kind }) => kind)).toEqual(['high', 'low', 'high', 'low']);
    expect(lines[1]?.at).toMatch(/^2026-10-10T10:3[12]:\d\d\.\d{3}Z$/);
    expect(lines[1]?.heightM).toBeCloseTo(0.309, 2);
  });

  it('refuses a station that is none', async () => {
    const request = { stationId: 'noaa/none', fromAt: 0, toAt: 1 };
    expect(await tideTable(request, tideStations())).toEqual({
      isGranted: false,
      reasons: [{ why: 'no-such-station', id: 'noaa/none' }],
    });
  });
});

function words(change: Record<string, string>): string[] {
  return Object.entries({ ...WORDS, ...change }).flat();
}
