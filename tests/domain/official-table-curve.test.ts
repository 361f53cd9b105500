import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { compareWithPrediction } from '#shared/domain/tides/official-table-comparison.ts';
import { curveByTable } from '#shared/domain/tides/official-table-curve.ts';
import type { TableEvent } from '#shared/domain/tides/official-table-reading.ts';
import { sessionsMovedBy } from '#shared/domain/tides/official-table-sessions.ts';
import { readOfficialTable } from '#shared/domain/tides/official-table.ts';
import type { TideExtreme } from '#shared/domain/tides/tide-curve.ts';
import { fromIso } from '#shared/kernel/time.ts';
import { exampleCurve, plainLines, tableOf } from './official-table-example.ts';

const MINUTE_MS = 60_000;
const HOUR_MS = 60 * MINUTE_MS;
const DAY_MS = 24 * HOUR_MS;

const curve = exampleCurve();
const yearAt = fromIso('2027-01-01T00:00Z');
const year = tableOf(curve, yearAt, fromIso('2028-01-01T00:00Z'));

describe('a table held against the prediction', () => {
  it('agrees when it is the prediction, rounded', () => {
    const compared = compareWithPrediction(year, curve);
    expect(compared).toMatchObject({
      verdict: 'agrees',
      constantMinutes: null,
      constantM: null,
      missing: [],
      extra: [],
    });
    expect(compared.worstMinutes).toBeLessThanOrEqual(0.5);
    expect(compared.worstM).toBeLessThanOrEqual(0.0051);
  });

  it('in GMT but given as local time is an hour early from spring to autumn', () => {
    const read = readOfficialTable(plainLines(year, 'UTC').join('\n'), { zone: 'Europe/London' });
    if (!read.isGranted) throw new Error(JSON.stringify(read.reasons));
    const compared = compareWithPrediction(read.value.events, curve);
    expect([compared.verdict, compared.constantMinutes]).toEqual(['zone-mistake', -60]);
    const { fromAt = 0, toAt = 0 } = compared.constantWithin ?? {};
    expect(Math.abs(fromAt - fromIso('2027-03-28T01:00Z'))).toBeLessThan(DAY_MS);
    expect(Math.abs(toAt - fromIso('2027-10-31T01:00Z'))).toBeLessThan(DAY_MS);
  });

  it('in local time but given as GMT is an hour late from spring to autumn', () => {
    const read = readOfficialTable(plainLines(year, 'Europe/London').join('\n'), { zone: 0 });
    if (!read.isGranted) throw new Error(JSON.stringify(read.reasons));
    const compared = compareWithPrediction(read.value.events, curve);
    expect([compared.verdict, compared.constantMinutes]).toEqual(['zone-mistake', 60]);
    expect(compared.constantWithin).not.toBeNull();
  });

  it.each([60, -60, 330, -480, 600])('%i minutes off all year is a zone mistake', (minutes) => {
    const late = year.map((event) => ({ ...event, at: event.at + minutes * MINUTE_MS }));
    expect(compareWithPrediction(late, curve)).toMatchObject({
      verdict: 'zone-mistake',
      constantMinutes: minutes,
      constantWithin: null,
    });
  });

  it('that is higher throughout has another datum', () => {
    const higher = changed(({ heightM }) => heightM + 0.6);
    const compared = compareWithPrediction(higher, curve);
    expect(compared.verdict).toBe('datum');
    expect(compared.constantM).toBeCloseTo(0.6, 2);
  });

  it.each([1 / 0.3048, 0.3048, 100])('with heights %f times as large has other units', (times) => {
    const compared = compareWithPrediction(
      changed(({ heightM }) => heightM * times),
      curve,
    );
    expect(compared.verdict).toBe('units');
  });

  it('with highs below its lows has its marks exchanged', () => {
    const exchanged = year.map((event) => ({
      ...event,
      kind: event.kind === 'high' ? ('low' as const) : ('high' as const),
    }));
    expect(compareWithPrediction(exchanged, curve).verdict).toBe('swapped');
  });

  it('is of another place when it is none of these', () => {
    const elsewhere = year.map((event) => ({ ...event, at: event.at + 46 * MINUTE_MS }));
    expect(compareWithPrediction(elsewhere, curve)).toMatchObject({
      verdict: 'other-place',
      constantMinutes: null,
    });
  });

  it('names what it lacks and what it has beyond the prediction', () => {
    const gone = year[100];
    const added: TableEvent = {
      at: (year[201]?.at ?? 0) + 90 * MINUTE_MS,
      kind: 'high',
      heightM: 4,
      row: 999,
    };
    const table = [...year.filter((event) => event !== gone), added].sort((a, b) => a.at - b.at);
    const compared = compareWithPrediction(table, curve);
    expect(compared.verdict).toBe('agrees');
    expect(compared.missing.map(({ at }) => Math.round(at / MINUTE_MS) * MINUTE_MS)).toEqual([
      gone?.at,
    ]);
    expect(compared.extra).toEqual([added]);
  });
});

/** A fortnight's table whose every event is moved a little, with some lines left out. */
const tables = fc
  .record({
    fromDay: fc.integer({ min: 5, max: 340 }),
    moves: fc.array(
      fc.record({
        minutes: fc.integer({ min: -25, max: 25 }),
        cm: fc.integer({ min: -20, max: 20 }),
        isThere: fc.integer({ min: 0, max: 9 }).map((chance) => chance > 0),
      }),
      { minLength: 60, maxLength: 60 },
    ),
  })
  .map(({ fromDay, moves }): TableEvent[] => {
    const fromAt = yearAt + fromDay * DAY_MS;
    return tableOf(curve, fromAt, fromAt + 14 * DAY_MS).flatMap((event, place) => {
      const { minutes = 0, cm = 0, isThere = true } = moves[place] ?? {};
      const heightM = event.heightM + cm / 100;
      return isThere ? [{ ...event, at: event.at + minutes * MINUTE_MS, heightM }] : [];
    });
  });

describe('the curve bent to a table', () => {
  it('passes through every event of the table, and turns there', () => {
    fc.assert(
      fc.property(tables, (table) => {
        const bent = curveByTable(curve, table);
        for (const event of table) {
          expect(bent.heightAtM(event.at)).toBeCloseTo(event.heightM, 9);
          expect(bent.extremes(event.at, event.at + 1)).toEqual([plain(event)]);
        }
      }),
      { numRuns: 40 },
    );
  });

  it('has no other highs and lows where the table lacks none', () => {
    const bent = curveByTable(curve, year);
    const from = year[0]?.at ?? 0;
    const to = year.at(-1)?.at ?? 0;
    expect(bent.extremes(from, to + 1)).toEqual(year.map(plain));
  });

  it('alternates high and low, and only rises or only falls between them', () => {
    fc.assert(
      fc.property(tables, fc.integer({ min: 0, max: 80 }), (table, skip) => {
        const bent = curveByTable(curve, table);
        const [first, last] = [table[0]?.at ?? 0, table.at(-1)?.at ?? 0];
        const turns = bent.extremes(first - 5 * DAY_MS, last + 5 * DAY_MS);
        turns.slice(1).forEach((turn, place) => {
          const before = turns[place] ?? turn;
          expect(turn.at).toBeGreaterThan(before.at);
          expect(turn.kind).not.toBe(before.kind);
          expect(Math.sign(turn.heightM - before.heightM)).toBe(turn.kind === 'high' ? 1 : -1);
        });
        const [from, to] = turns.slice(skip % (turns.length - 1));
        if (from === undefined || to === undefined) throw new Error('No rise or fall');
        const sign = to.kind === 'high' ? 1 : -1;
        let heightM = from.heightM;
        for (let at = from.at; at <= to.at; at += MINUTE_MS) {
          const nextM = bent.heightAtM(at);
          expect(sign * (nextM - heightM)).toBeGreaterThanOrEqual(-1e-9);
          expect(sign * (to.heightM - nextM)).toBeGreaterThanOrEqual(-1e-9);
          heightM = nextM;
        }
      }),
      { numRuns: 60 },
    );
  });

  it('nowhere jumps, not even where the table begins and ends', () => {
    fc.assert(
      fc.property(tables, fc.double({ min: 0, max: 1, noNaN: true }), (table, share) => {
        const bent = curveByTable(curve, table);
        const first = (table[0]?.at ?? 0) - 6 * DAY_MS;
        const at = Math.round(first + share * 26 * DAY_MS);
        const turns = bent.extremes(at - DAY_MS, at + DAY_MS).map((turn) => turn.at);
        for (const place of [at, ...turns]) {
          // 8 m in 2 hours would be the fastest tide on earth: 1.1 mm in a second.
          const stepM = bent.heightAtM(place + 500) - bent.heightAtM(place - 500);
          expect(Math.abs(stepM)).toBeLessThan(0.0012);
        }
      }),
      { numRuns: 100 },
    );
  });

  it('is the plain curve from three days before the table and after it', () => {
    const late = year.slice(100, 200).map((event) => ({ ...event, at: event.at + 20 * MINUTE_MS }));
    const bent = curveByTable(curve, late);
    const first = (late[0]?.at ?? 0) - 3 * DAY_MS;
    const last = (late.at(-1)?.at ?? 0) + 3 * DAY_MS;
    for (let hour = 0; hour < 100; hour += 1) {
      for (const at of [first - hour * HOUR_MS, last + hour * HOUR_MS]) {
        expect(bent.heightAtM(at)).toBe(curve.heightAtM(at));
      }
    }
    expect(bent.extremes(yearAt, first)).toEqual(curve.extremes(yearAt, first));
    expect(bent.extremes(last, last + 9 * DAY_MS)).toEqual(curve.extremes(last, last + 9 * DAY_MS));
  });

  it('keeps the shape of the prediction, which is no cosine', () => {
    const [low, high] = year.slice(year.findIndex(({ kind }) => kind === 'low'));
    if (low === undefined || high === undefined) throw new Error('No rise');
    const higher = changed(({ heightM }) => heightM * 1.1);
    const bent = curveByTable(curve, higher);
    const quarterAt = low.at + (high.at - low.at) / 4;
    const share = (at: number, of: typeof curve): number =>
      (of.heightAtM(at) - of.heightAtM(low.at)) / (of.heightAtM(high.at) - of.heightAtM(low.at));
    expect(share(quarterAt, bent)).toBeCloseTo(share(quarterAt, curve), 2);
    expect(Math.abs(share(quarterAt, bent) - (1 - Math.cos(Math.PI / 4)) / 2)).toBeGreaterThan(
      0.02,
    );
  });

  it('takes a high and low of the table that are not predicted', () => {
    const place = year.findIndex((event, at) => at > 50 && event.kind === 'high');
    const [high, low] = year.slice(place);
    if (high === undefined || low === undefined) throw new Error('No fall');
    const at = (share: number): number => Math.round(high.at + share * (low.at - high.at));
    const middleM = (high.heightM + low.heightM) / 2;
    const own: TableEvent[] = [
      { at: at(0.4), kind: 'low', heightM: middleM, row: 901 },
      { at: at(0.6), kind: 'high', heightM: middleM + 0.1, row: 902 },
    ];
    const bent = curveByTable(curve, [...year, ...own]);
    expect(bent.extremes(high.at, low.at + 1)).toEqual([high, ...own, low].map(plain));
    expect(bent.heightAtM(at(0.6))).toBeCloseTo(middleM + 0.1, 9);
  });

  it('without a table is the plain curve', () => {
    expect(curveByTable(curve, [])).toBe(curve);
  });
});

describe('the sessions that a table moves', () => {
  it('are those moved by more than 5 minutes, the most moved first', () => {
    const lows = year.filter(({ kind }) => kind === 'low').slice(40, 44);
    const byMinutes = [5, -6, 20, 0];
    const table = year.map((event) => {
      const place = lows.indexOf(event);
      const minutes = byMinutes[place] ?? 0;
      return { ...event, at: event.at + minutes * MINUTE_MS, heightM: event.heightM + 0.1 };
    });
    const sessions = lows.map(({ at }, place) => ({ id: `session ${place}`, lowWaterAt: at }));
    const moved = sessionsMovedBy(sessions, curve, curveByTable(curve, table));
    expect(moved.map(({ id, laterMinutes }) => [id, laterMinutes])).toEqual([
      ['session 2', 20],
      ['session 1', -6],
    ]);
    expect(moved[0]?.higherM).toBeCloseTo(0.1, 1);
    expect(moved[0]?.newLowWaterAt).toBe((lows[2]?.at ?? 0) + 20 * MINUTE_MS);
  });

  it('are listed first when they have no low water left', () => {
    const still = { ...curve, extremes: (): TideExtreme[] => [] };
    const low = year.find(({ kind }) => kind === 'low');
    expect(sessionsMovedBy([{ id: 'a', lowWaterAt: low?.at ?? 0 }], curve, still)).toEqual([
      { id: 'a', lowWaterAt: low?.at, newLowWaterAt: null, laterMinutes: null, higherM: null },
    ]);
  });
});

function changed(height: (event: TableEvent) => number): TableEvent[] {
  return year.map((event) => ({ ...event, heightM: height(event) }));
}

function plain({ at, kind, heightM }: TableEvent): TideExtreme {
  return { at, kind, heightM };
}
