import { tideCurve } from '#shared/domain/tides/prediction.ts';
import type { TideCurve } from '#shared/domain/tides/tide-curve.ts';
import type { StationFacts, TideStations } from './tide-stations.ts';

/** The tide of a station: its curve, and what must be said with every figure of it. */
export interface StationTide {
  readonly station: StationFacts;
  readonly curve: TideCurve;
}

export interface Tides {
  readonly stations: TideStations;
  /** The tide of a station; null when the station cannot be used. Kept after the first question. */
  at(stationId: string): Promise<StationTide | null>;
}

/** The tides of some stations, each worked out once. */
export function tidesOf(stations: TideStations): Tides {
  const known = new Map<string, Promise<StationTide | null>>();
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
  };
}
