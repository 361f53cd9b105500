import { tideCurve } from '#shared/domain/tides/prediction.ts';
import type { TideCurve } from '#shared/domain/tides/tide-curve.ts';
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
  /** A curve worked out from others, made once for each key and kept while it is in use. */
  curve(key: string, make: () => Promise<TideCurve>): Promise<TideCurve>;
}

/** More curves than a group has shores and tables; the one asked for longest ago goes first. */
const keptCurves = 60;

/** The tides of some stations, each worked out once. */
export function tidesOf(stations: TideStations): Tides {
  const known = new Map<string, Promise<StationTide | null>>();
  const curves = new Map<string, Promise<TideCurve>>();
  const workOut = async (stationId: string): Promise<StationTide | null> => {
    const found = await stations.find(stationId);
    if (!found.isGranted) return null;
    const curve = tideCurve(found.value);
    return curve.isGranted ? { station: found.value, curve: curve.value } : null;
  };
  return {
    stations,
    at(stationId) {
      const tide = known.get(stationId) ?? workOut(stationId);
      known.set(stationId, tide);
      return tide;
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
