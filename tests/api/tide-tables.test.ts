import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { problem } from '#shared/contracts/problem.ts';
import { seeSession } from '#shared/contracts/sessions.ts';
import { acceptTable, seeTables, tablePreview } from '#shared/contracts/tide-tables.ts';
import { tideCurve } from '#shared/domain/tides/prediction.ts';
import type { TideCurve } from '#shared/domain/tides/tide-curve.ts';
import type { PersonId, ShoreId, SlotKindId } from '#shared/kernel/ids.ts';
import { clockAt, dayAt, fromIso, instantOf } from '#shared/kernel/time.ts';
import { given } from '../support/given.ts';
import { startTestApp } from '../support/test-app.ts';
import type { Requests, TestApp } from '../support/test-app.ts';

const stationId = 'ticon/north_shields-nsh-gbr-bodc';
const zone = 'Europe/London';
const minuteMs = 60_000;

let app: TestApp;
let make: ReturnType<typeof given>;
let coordinator: Requests;
let coordinatorId: PersonId;
let shoreId: ShoreId;
let guide: SlotKindId;
let curve: TideCurve;

beforeAll(async () => {
  app = await startTestApp();
  make = given(app.ctx);
  coordinatorId = await make.person({ roles: ['coordinator'] });
  coordinator = await app.as(coordinatorId);
  shoreId = await make.shore('Gull Ledges', { tideStationId: stationId });
  guide = await make.slotKind();
  const found = await app.ctx.tides.stations.find(stationId);
  if (!found.isGranted) throw new Error('The station cannot be used');
  const predicted = tideCurve(found.value);
  if (!predicted.isGranted) throw new Error('The station cannot be predicted');
  curve = predicted.value;
});
afterAll(async () => {
  await app.close();
});

/** A printed table of the station from May to July 2027, as its zone, units and lateness would have it. */
function printed(
  more: { readonly in?: string; readonly laterMinutes?: number; readonly factor?: number } = {},
): string {
  const { in: printedIn = zone, laterMinutes = 0, factor = 1 } = more;
  const rows = curve
    .extremes(instantOf('2027-05-01', '00:00', zone), instantOf('2027-08-01', '00:00', zone))
    .map(({ at, kind, heightM }) => {
      const shown = Math.round(at / minuteMs) * minuteMs + laterMinutes * minuteMs;
      const height = (heightM * factor).toFixed(2);
      return `${dayAt(shown, printedIn)},${clockAt(shown, printedIn)},${height},${kind === 'high' ? 'H' : 'L'}`;
    });
  return ['Date,Time,Height,High/Low', ...rows].join('\n');
}

function wish(text: string, more: object = {}) {
  return { stationId, name: 'Harbour table 2027', zone, units: 'm', text, ...more };
}

async function preview(text: string, more: object = {}) {
  const reply = await coordinator.post('/api/tide-tables/preview', wish(text, more));
  expect(reply.status).toBe(200);
  return tablePreview.parse(reply.body);
}

async function tables() {
  return seeTables.reply.parse((await coordinator.get('/api/tide-tables')).body).tables;
}

describe('an official table', () => {
  it('is read, held against the prediction, and shown round each clock change', async () => {
    const seen = await preview(printed());
    expect(seen.eventCount).toBeGreaterThan(350);
    expect(seen).toMatchObject({
      firstOn: '2027-05-01',
      lastOn: '2027-07-31',
      refusal: null,
      problems: [],
      mayAccept: true,
      movedSessions: [],
    });
    expect(seen.comparison).toMatchObject({ verdict: 'agrees' });
    expect(seen.comparison?.worstMinutes).toBeLessThan(1);
    expect(await tables()).toEqual([]);
  });

  it.each<[string, () => string, object, string]>([
    ['printed in GMT, read as local time', () => printed({ in: 'UTC' }), {}, 'zone-mistake'],
    ['in feet, read as metres', () => printed({ factor: 1 / 0.3048 }), {}, 'units'],
    ['of another place', () => printed({ laterMinutes: 137 }), {}, 'other-place'],
  ])('%s is named as a mistake and not accepted', async (_words, text, more, verdict) => {
    const seen = await preview(text(), more);
    expect(seen.comparison?.verdict ?? seen.refusal).toBe(verdict);
    expect(seen.mayAccept).toBe(false);
    const reply = await coordinator.post('/api/tide-tables', {
      ...wish(text(), more),
      leavesOutProblems: true,
      movesSessionIds: [],
    });
    expect(problem.parse(reply.body)).toMatchObject({ status: 409, code: 'table-refused' });
    expect(await tables()).toEqual([]);
  });

  it('with seven bad rows of some four hundred lists them, and is accepted only when a person leaves them out', async () => {
    const lines = printed().split('\n');
    for (const row of [20, 60, 100, 140, 180, 220, 260]) {
      lines[row] = (lines[row] ?? '').replace(/,\d\d:\d\d,/, ',25:99,');
    }
    const text = lines.join('\n');
    const seen = await preview(text);
    expect(new Set(seen.problems.map(({ row }) => row))).toEqual(
      new Set([21, 61, 101, 141, 181, 221, 261]),
    );
    const body = { ...wish(text), movesSessionIds: [] };
    const refused = await coordinator.post('/api/tide-tables', {
      ...body,
      leavesOutProblems: false,
    });
    expect(refused.status).toBe(409);
    expect(await tables()).toEqual([]);
  });

  it.each<[string, string]>([
    ['an empty file', ''],
    ['a heading alone', 'Date,Time,Height\n'],
    ['a spreadsheet file', 'PK\u0003\u0004\u0014\u0000'],
    ['prose', 'Tides are caused by the moon.\nThey come twice a day.'],
  ])('%s gets a sentence and nothing is written', async (_words, text) => {
    const seen = await preview(text);
    expect(seen.refusal).not.toBeNull();
    expect(seen.mayAccept).toBe(false);
    expect(await tables()).toEqual([]);
  });

  it('with time and height the wrong way round in some rows names them, and in its heading says so', async () => {
    const lines = printed().split('\n');
    lines[9] = (lines[9] ?? '').replace(/,(\d\d:\d\d),(-?[\d.]+),/, ',$2,$1,');
    const rows = await preview(lines.join('\n'));
    expect(rows.problems.map(({ row }) => row)).toEqual([10]);
    const heading = await preview(printed().replace('Time,Height', 'Height,Time'));
    expect(heading.problems).toMatchObject([
      { row: 1, message: expect.stringContaining('time and height the other way round') as string },
    ]);
    expect(await tables()).toEqual([]);
  });

  it('of 30 MB is refused before it is read', async () => {
    const reply = await coordinator.post('/api/tide-tables/preview', wish('x'.repeat(30_000_000)));
    expect(problem.parse(reply.body)).toMatchObject({ status: 413, code: 'too-large' });
    const characters = await coordinator.post(
      '/api/tide-tables/preview',
      wish('x'.repeat(5_000_001)),
    );
    expect(problem.parse(characters.body).fields).toMatchObject([{ field: 'text' }]);
  });

  it('in force bends the water, is named as its source, moves only confirmed sessions, and can be taken back', async () => {
    const low = curve
      .extremes(instantOf('2027-06-05', '06:00', zone), instantOf('2027-06-05', '18:00', zone))
      .find(({ kind }) => kind === 'low');
    const lowWaterAt = Math.round((low?.at ?? 0) / minuteMs) * minuteMs;
    const laterMinutes = (lowWaterAt - instantOf('2027-06-05', '10:22', zone)) / minuteMs;
    const moving = await make.session(shoreId, '2027-06-05', [guide], { laterMinutes });
    const staying = await make.session(shoreId, '2027-06-05', [guide], { laterMinutes });
    const text = printed({ laterMinutes: 9 });

    const seen = await preview(text);
    expect(seen.comparison?.verdict).toBe('agrees');
    expect(new Set(seen.movedSessions.map(({ sessionId }) => sessionId))).toEqual(
      new Set([moving.id, staying.id]),
    );
    expect(seen.movedSessions[0]?.movedMinutes).toBe(9);

    const accepted = acceptTable.reply.parse(
      (
        await coordinator.post('/api/tide-tables', {
          ...wish(text),
          leavesOutProblems: false,
          movesSessionIds: [moving.id],
        })
      ).body,
    );
    expect(accepted.moved).toBe(1);
    const page = async (id: string) =>
      seeSession.reply.parse((await coordinator.get(`/api/sessions/${id}`)).body);
    const moved = await page(moving.id);
    expect(fromIso(moved.lowWaterAt ?? '')).toBe(lowWaterAt + 9 * minuteMs);
    expect(moved.water?.source.table).toBe('Harbour table 2027');
    const lows = moved.water?.extremes.filter(({ kind }) => kind === 'low').map(({ at }) => at);
    expect(lows).toContain(moved.lowWaterAt);
    expect(fromIso((await page(staying.id)).lowWaterAt ?? '')).toBe(lowWaterAt);

    const again = await coordinator.post('/api/tide-tables', {
      ...wish(text),
      leavesOutProblems: false,
      movesSessionIds: [],
    });
    expect(problem.parse(again.body).title).toContain('Another table is in force');

    expect((await coordinator.post(`/api/tide-tables/${accepted.id}/take-back`)).status).toBe(200);
    expect((await page(moving.id)).water?.source.table).toBeNull();
    expect((await coordinator.post(`/api/tide-tables/${accepted.id}/take-back`)).status).toBe(404);
    expect((await tables())[0]?.takenBackAt).not.toBeNull();
  });

  it('that would put somebody on two sessions at once leaves everything as it was', async () => {
    const low = curve
      .extremes(instantOf('2027-07-04', '06:00', zone), instantOf('2027-07-04', '18:00', zone))
      .find(({ kind }) => kind === 'low');
    const lowWaterAt = Math.round((low?.at ?? 0) / minuteMs) * minuteMs;
    const laterMinutes = (lowWaterAt - instantOf('2027-07-04', '10:22', zone)) / minuteMs;
    const moving = await make.session(shoreId, '2027-07-04', [guide], { laterMinutes });
    // Its crew meets five minutes after the first session ends: the move would make them overlap.
    const other = await make.session(shoreId, '2027-07-04', [guide], {
      laterMinutes: laterMinutes + 200,
    });
    const volunteer = await app.as(await make.person());
    for (const { slots } of [moving, other]) {
      const reply = await volunteer.post(`/api/slots/${slots[0] ?? ''}/claim`);
      expect(reply.status).toBe(200);
    }
    const reply = await coordinator.post('/api/tide-tables', {
      ...wish(printed({ laterMinutes: 12 })),
      leavesOutProblems: false,
      movesSessionIds: [moving.id],
    });
    expect(problem.parse(reply.body).title).toContain('two sessions at once');
    const sessions = await app.ctx.reading<{ at: string }[]>((read) =>
      read.query('SELECT epoch_ms(low_water_at) AS at FROM session WHERE id = $1', [moving.id]),
    );
    expect(Number(sessions[0]?.at)).toBe(lowWaterAt);
    expect((await tables()).filter(({ takenBackAt }) => takenBackAt === null)).toEqual([]);
  });
});

describe("NOAA's own annual table of Seattle, 2017", () => {
  it('is read as it is: 1,411 events, no row amiss', async () => {
    // tests/published/data/SOURCES.md names where it comes from.
    const file = join(
      import.meta.dirname,
      '..',
      'published',
      'data',
      'noaa-annual-table-seattle-2017.txt',
    );
    const seen = await preview(readFileSync(file, 'utf8'), {
      stationId: 'noaa/9447130',
      zone: 'America/Los_Angeles',
      units: null,
    });
    expect(seen.eventCount).toBe(1411);
    expect(seen.problems).toEqual([]);
    expect(seen.comparison?.verdict).toBe('agrees');
    expect(seen.clockChanges.filter(({ isChangeDay }) => isChangeDay).map(({ on }) => on)).toEqual([
      '2017-03-12',
      '2017-11-05',
    ]);
  });
});
