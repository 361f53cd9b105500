import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { problem } from '#shared/contracts/problem.ts';
import { findStations, previewShore, seeShores, shoreView } from '#shared/contracts/shores.ts';
import type { ShoreSettings } from '#shared/contracts/shores.ts';
import { fromIso } from '#shared/kernel/time.ts';
import { given } from '../support/given.ts';
import { startTestApp } from '../support/test-app.ts';
import type { Requests, TestApp } from '../support/test-app.ts';

let app: TestApp;
let make: ReturnType<typeof given>;
let coordinator: Requests;
let volunteer: Requests;

beforeAll(async () => {
  app = await startTestApp();
  make = given(app.ctx);
  coordinator = await app.as(await make.person({ roles: ['coordinator'] }));
  volunteer = await app.as(await make.person());
});
afterAll(async () => {
  await app.close();
});

const settings: ShoreSettings = {
  name: 'Gull Ledges',
  zone: 'Europe/London',
  latitude: 55.06,
  longitude: -1.18,
  tideStationId: 'ticon/north_shields-nsh-gbr-bodc',
  differences: {
    high: { laterMinutes: 0, higherM: 0 },
    low: { laterMinutes: 0, higherM: 0 },
  },
  workingLevelM: 1.5,
  cutOffLevelM: 2.6,
  minutesBeforeLow: 120,
  minutesAfterLow: 30,
  daylightMarginMinutes: 30,
  minimumMinutes: 90,
  earliestClock: '07:00',
  latestClock: '18:00',
  crewMeetsMinutes: 45,
  partyMeetsMinutes: 20,
  meetingPlace: 'Blue hut at the head of the slipway',
  hazards: 'Weed on the lower ledges',
  waysOff: 'Slipway; steps at the north end',
  phoneSignal: 'None below the steps',
  emergencyWords: 'Dial the emergency number of your country and ask for the coastguard.',
  ratioPreset: 'families',
};
const { name, meetingPlace, hazards, waysOff, phoneSignal, emergencyWords, ratioPreset, ...water } =
  settings;

describe('a shore', () => {
  it('is made, shown as it was set up, and changed', async () => {
    const made = shoreView.parse((await coordinator.post('/api/shores', settings)).body);
    expect(made.settings).toEqual(settings);
    expect(made.source?.attribution).toContain('CC BY 4.0');
    expect(made.mayChange).toBe(true);
    const changed = await coordinator.put(`/api/shores/${made.id}`, {
      ...settings,
      workingLevelM: 1.2,
    });
    expect(shoreView.parse(changed.body).settings.workingLevelM).toBe(1.2);
    const seen = shoreView.parse((await volunteer.get(`/api/shores/${made.id}`)).body);
    expect(seen).toMatchObject({ mayChange: false, settings: { workingLevelM: 1.2 } });
    const list = seeShores.reply.parse((await volunteer.get('/api/shores')).body);
    expect(list.shores.map(({ name }) => name)).toEqual(['Gull Ledges']);
    expect(list.mayMake).toBe(false);
    const trail = await app.ctx.reading<{ action: string; details: object }[]>((read) =>
      read.query('SELECT action, details FROM trail WHERE record_id = $1 ORDER BY seq', [made.id]),
    );
    expect(trail[1]).toEqual({
      action: 'shore.changed',
      details: { workingLevelM: 1.2, 'workingLevelM before': 1.5 },
    });
  });

  it.each<[string, Partial<Record<keyof ShoreSettings, unknown>>, string]>([
    ['a name that another shore has', { name: 'Gull Ledges' }, 'name'],
    ['no name', { name: '  ' }, 'name'],
    [
      'a station that may not be used for its licence',
      { name: 'A', tideStationId: 'ticon/exmouthtg-exm-gbr-cmems' },
      'tideStationId',
    ],
    ['a station that does not exist', { name: 'B', tideStationId: 'nowhere' }, 'tideStationId'],
    ['a zone that does not exist', { name: 'C', zone: 'Europe/Skerrow' }, 'zone'],
    ['hours the wrong way round', { name: 'D', earliestClock: '19:00' }, 'latestClock'],
    ['a latitude off the earth', { name: 'E', latitude: 91 }, 'latitude'],
  ])('is refused beside the field with %s', async (_words, change, field) => {
    const reply = await coordinator.post('/api/shores', { ...settings, ...change });
    expect(reply.status).toBe(400);
    expect(problem.parse(reply.body).fields).toMatchObject([{ where: 'body', field }]);
  });

  it('is previewed before it is saved: a day with its window, and the usable days of the year', async () => {
    const ask = async (change: Partial<typeof water>) =>
      previewShore.reply.parse(
        (
          await coordinator.post('/api/shores/preview', {
            settings: { ...water, ...change },
            on: null,
          })
        ).body,
      );
    const preview = await ask({});
    expect(preview.day.window).not.toBeNull();
    expect(preview.usableDays).toBeGreaterThan(30);
    const lower = await ask({ workingLevelM: 0.8 });
    expect(lower.usableDays).toBeLessThan(preview.usableDays);
    const later = await ask({
      differences: { ...water.differences, low: { laterMinutes: 40, higherM: 0.2 } },
    });
    const lowOf = ({ day }: typeof preview) =>
      day.extremes.filter(({ kind }) => kind === 'low').map(({ at }) => fromIso(at));
    const same = await ask({});
    expect(lowOf(same)).toEqual(lowOf(preview));
    expect(later.day.extremes.length).toBeGreaterThan(2);
  });

  it('is not previewed or changed by a volunteer', async () => {
    expect((await volunteer.post('/api/shores', settings)).status).toBe(403);
    expect(
      (await volunteer.post('/api/shores/preview', { settings: water, on: null })).status,
    ).toBe(403);
  });
});

describe('what is wrong with a shore', () => {
  it.each([
    [{ latitude: 91 }, 'At most 90.'],
    [{ latitude: 'north' }, 'Write a number.'],
    [{ crewMeetsMinutes: -1 }, 'At least 0.'],
    [{ ratioPreset: 'none' }, 'Choose one of those offered.'],
    [{ meetingPlace: 'x'.repeat(501) }, 'Write at most 500 characters.'],
    [{ zone: 'Europe/Skerrow' }, 'Write a time zone like Europe/London'],
  ])('is said in plain words, the contract’s own first: %j', async (change, message) => {
    const reply = await coordinator.post('/api/shores', { ...settings, name: 'Z', ...change });
    expect(problem.parse(reply.body).fields?.map((field) => field.message)).toEqual([message]);
  });
});

describe('tide stations', () => {
  it('are offered nearest first, each with its credit, none without a licence for it', async () => {
    const reply = await coordinator.get('/api/tide-stations?latitude=55.06&longitude=-1.18');
    const { stations } = findStations.reply.parse(reply.body);
    expect(stations[0]?.stationId).toBe('ticon/north_shields-nsh-gbr-bodc');
    const distances = stations.map(({ distanceKm }) => distanceKm);
    expect(distances).toEqual([...distances].sort((a, b) => a - b));
    expect(stations.every(({ attribution }) => attribution.length > 0)).toBe(true);
    expect(
      stations.map(({ stationId }) => stationId).filter((id) => id.endsWith('-cmems')),
    ).toEqual([]);
  });
});
