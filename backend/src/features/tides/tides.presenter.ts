import type { z } from 'zod';
import type { StationFacts } from '#backend/platform/tides/tide-stations.ts';
import type { curvePoint, extreme, tideSource, waterAxis } from '#shared/contracts/wire.ts';
import type { TideExtreme, TideHeight } from '#shared/domain/tides/tide-curve.ts';
import { toIso } from '#shared/kernel/time.ts';

/** Drawings begin this far under the lowest astronomical tide. */
const floorM = 0.3;

/** A millimetre is finer than any drawing or sentence needs. */
export function presentHeightM(heightM: number): number {
  return Math.round(heightM * 1000) / 1000;
}

export function presentCurve(points: readonly TideHeight[]): z.input<typeof curvePoint>[] {
  return points.map(({ at, heightM }) => ({ at: toIso(at), heightM: presentHeightM(heightM) }));
}

export function presentExtreme(one: TideExtreme): z.input<typeof extreme> {
  return { at: toIso(one.at), kind: one.kind, heightM: presentHeightM(one.heightM) };
}

export function presentAxis(shore: {
  readonly lowestTideM: number;
  readonly highestTideM: number;
}): z.input<typeof waterAxis> {
  return {
    bottomM: presentHeightM(shore.lowestTideM - floorM),
    topM: presentHeightM(shore.highestTideM),
  };
}

export function presentSource(station: StationFacts): z.input<typeof tideSource> {
  return {
    stationId: station.id,
    stationName: station.name,
    latitude: station.latitude,
    longitude: station.longitude,
    datum: station.datum,
    attribution: station.attribution,
  };
}
