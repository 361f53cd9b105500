import type { Clock } from '#backend/platform/clock/clock.ts';
import { astronomicalRange } from '#shared/domain/tides/astronomical-range.ts';
import type { AstronomicalRange } from '#shared/domain/tides/astronomical-range.ts';
import { tideCurve } from '#shared/domain/tides/prediction.ts';
import type { TideCurve } from '#shared/domain/tides/tide-curve.ts';
import { dayAt, yearOf } from '#shared/kernel/time.ts';
import type { StationFacts, TideStations } from './tide-stations.ts';

/** The predicted tide of a station: its curve, and what must be said with every figure of it. */
export interface StationTide {
  readonly station: StationFacts;
  readonly curve: TideCurve;
}

export interface Tides {
  readonly stations: TideStations;
  /** The predicted tide of a station; null when the station cannot be used. */
  at(stationId: string): Promise<StationTide | null>;
  /** Its lowest and highest astronomical tide; null when the station cannot be used. */
  rangeAt(stationId: string): Promise<AstronomicalRange | null>;
  /** A curve worked out from others, made once for each key and kept while it is in use. */
  curve(key: string, make: () => Promise<TideCurve>): Promise<TideCurve>;
}

/** More curves than a group has shores and tables; the one asked for longest ago goes first. */
const keptCurves = 60;

/** The tides of some stations, each worked out once; ranges are those of 19 years from this one. */
export function tidesOf(stations: TideStations, clock: Clock): Tides {
  const known = new Map<string, Promise<StationTide | null>>();
  const ranges = new Map<string, AstronomicalRange>();
  const curves = new Map<string, Promise<TideCurve>>();
  const workOut = async (stationId: string): Promise<StationTide | null> => {
    const found = await stations.find(stationId);
    if (!found.isGranted) return null;
    const curve = tideCurve(found.value);
    return curve.isGranted ? { station: found.value, curve: curve.value } : null;
  };
  const at = (stationId: string): Promise<StationTide | null> => {
    const tide = known.get(stationId) ?? workOut(stationId);
    known.set(stationId, tide);
    return tide;
  };
  return {
    stations,
    at,
    async rangeAt(stationId) {
      const tide = await at(stationId);
      if (tide === null) return null;
      const year = yearOf(dayAt(clock.now(), 'UTC'));
      const key = `${stationId} ${year}`;
      const range = ranges.get(key) ?? astronomicalRange(tide.curve, year);
      ranges.set(key, range);
      return range;
    },
    curve(key, make) {
      const curve = curves.get(key) ?? make();
      curves.delete(key);
      curves.set(key, curve);
      curve.catch(() => curves.delete(key));
      const oldest = curves.keys().next().value;
      if (curves.size > keptCurves && oldest !== undefined) curves.delete(oldest);
      return curve;
    },
  };
}
