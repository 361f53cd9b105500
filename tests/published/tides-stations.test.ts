import { stations as everyStation, stationsById } from '@neaps/tide-database';
import { describe, expect, it } from 'vitest';
import { greenwichPhaseDeg } from '#backend/platform/tides/greenwich-phase.ts';
import { tideStations } from '#backend/platform/tides/tide-stations.ts';
import type { StationRecord } from '#backend/platform/tides/tide-stations.ts';
import { tideCurve } from '#shared/domain/tides/prediction.ts';
import { fromIso } from '#shared/kernel/time.ts';

// The open tide database, release 2026-09-24: NOAA (public domain), TICON-4 (CC BY 4.0, some CC
// BY-NC) and the Norwegian Mapping Authority (CC BY 4.0). Counted over the stations it accepts.
const tideStationsOfSource = everyStation.filter(({ kind }) => kind === 'tide');
const stations = tideStations();

describe('the stations of the tide database', () => {
  it('are served but for those without a free licence, a datum, or a known constituent', async () => {
    const counts: Record<string, number> = {};
    for (const { id } of tideStationsOfSource) {
      const answer = await stations.find(id);
      const whys = answer.isGranted ? ['served'] : answer.reasons.map(({ why }) => why);
      for (const why of new Set(whys)) counts[why] = (counts[why] ?? 0) + 1;
    }
    expect(tideStationsOfSource).toHaveLength(6135);
    expect(counts).toEqual({
      served: 5808,
      'not-for-commercial-use': 282,
      'licence-not-clear': 10,
      // The ten of doubtful licence, and one whose datum is named but has no figure.
      'no-chart-datum': 11,
      'unknown-constituent': 34,
    });
  });

  it('number 5,843 with a free licence, of which 5,809 have no unknown constituent', async () => {
    let free = 0;
    let known = 0;
    for (const { id } of tideStationsOfSource) {
      const answer = await stations.find(id);
      const whys = new Set<string>(answer.isGranted ? [] : answer.reasons.map(({ why }) => why));
      if (whys.has('not-for-commercial-use') || whys.has('licence-not-clear')) continue;
      free += 1;
      if (!whys.has('unknown-constituent')) known += 1;
    }
    expect([free, known]).toEqual([5843, 5809]);
  });

  it('carry the credit that must be shown, their zone, position and datum', async () => {
    expect(await granted('ticon/brighton-btn-gbr-cco')).toMatchObject({
      name: 'Teignmouth Pier',
      latitude: expect.closeTo(50.81, 2) as number,
      longitude: expect.closeTo(-0.1, 2) as number,
      zone: 'Europe/London',
      datum: 'LAT',
      licence: 'cc-by-4.0',
      attribution: expect.stringContaining('TICON-4') as string,
    });
  });

  it('are refused by name when there is none, or when they measure currents', async () => {
    const current = everyStation.find(({ kind }) => kind === 'current');
    const whys = [];
    for (const id of ['noaa/none', current?.id ?? '']) {
      const answer = await stations.find(id);
      whys.push(answer.isGranted ? 'granted' : answer.reasons[0].why);
    }
    expect(whys).toEqual(['no-such-station', 'not-a-tide-station']);
  });

  it('are offered nearest first, and only those that can be served', async () => {
    // Lake Champlain to the Bay of Fundy: free, unfree and unclear stations lie side by side.
    const offered = await stations.nearest(45.3, -66, 40);
    const distances = offered.map(({ distanceKm }) => distanceKm);
    expect(offered).toHaveLength(40);
    expect(distances).toEqual([...distances].sort((a, b) => a - b));
    for (const { station } of offered) {
      expect((await stations.find(station.id)).isGranted).toBe(true);
    }
  });
});

describe('the phases of TICON-4', () => {
  it.each([
    // Anchorage gauge 9455920, as NOAA analysed it.
    ['M2', 'ticon/anchorage-9455920-usa-noaa', 105.2, 2],
    ['M1', 'ticon/anchorage-9455920-usa-noaa', 40.2, 15],
    ['2MK5', 'ticon/anchorage-9455920-usa-noaa', 256.3, 15],
    ['2MO5', 'ticon/anchorage-9455920-usa-noaa', 268.3, 15],
    ['2MS6', 'ticon/anchorage-9455920-usa-noaa', 59.4, 5],
    // Trondheim, as the Norwegian Mapping Authority analysed it.
    ['SGM', 'ticon/trondheim-trd-nor-nhs', 293, 15],
    ['2MK5', 'ticon/trondheim-trd-nor-nhs', 7, 15],
    ['MKS2', 'ticon/bodo-boo-nor-nhs', 318, 15],
    // Its SK3, whose argument has 90 degrees more than R3.
    ['R3', 'ticon/trondheim-trd-nor-nhs', 114 - 90, 15],
  ])('are made those of another analysis of the gauge: %s, %s', (name, id, phaseDeg, within) => {
    const station = stationsById.get(id);
    const line = station?.harmonic_constituents.find((other) => other.name === name);
    if (station === undefined || line === undefined) throw new Error(`No ${name} at ${id}`);
    const read = greenwichPhaseDeg(station.source.name, name, line.phase);
    const apart = (((read - phaseDeg) % 360) + 540) % 360;
    expect(Math.abs(apart - 180)).toBeLessThan(within);
  });
});

describe('stations by their differences from a reference station', () => {
  const subordinates = tideStationsOfSource.filter(({ type }) => type === 'subordinate');

  it('keep within the bounds that the source gives for them', async () => {
    const chosen = subordinates.filter((_, place) => place % 60 === 0);
    for (const { id } of chosen) {
      const bounds = stationsById.get(id)?.astronomical_bounds;
      if (bounds === undefined) continue;
      const curve = tideCurve(await granted(id));
      if (!curve.isGranted) throw new Error(id);
      const heights = curve.value
        .extremes(fromIso('2027-01-01T00:00Z'), fromIso('2028-01-01T00:00Z'))
        .map(({ heightM }) => heightM);
      expect(Math.min(...heights), id).toBeGreaterThan(bounds.lat - 0.06);
      expect(Math.max(...heights), id).toBeLessThan(bounds.hat + 0.06);
    }
    expect(chosen.length).toBeGreaterThan(30);
  });
});

async function granted(id: string): Promise<StationRecord> {
  const answer = await stations.find(id);
  if (!answer.isGranted) throw new Error(JSON.stringify(answer.reasons));
  return answer.value;
}
