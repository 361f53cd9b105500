import type * as TideDatabase from '@neaps/tide-database';
import type { Station } from '@neaps/tide-database';
import type { TideDifferences } from '#shared/domain/tides/differences.ts';
import { tideCurve } from '#shared/domain/tides/prediction.ts';
import type {
  CurveRefusal,
  StationConstituent,
  TideStation,
} from '#shared/domain/tides/prediction.ts';
import { granted, refused } from '#shared/kernel/result.ts';
import type { Verdict } from '#shared/kernel/result.ts';
import { greenwichPhaseDeg } from './greenwich-phase.ts';

/** A tide station as it is offered to choose from. */
export interface StationFacts {
  readonly id: string;
  /** As the source has it. A few stations carry their neighbour's: show id and position with it. */
  readonly name: string;
  /** Degrees north and east. */
  readonly latitude: number;
  readonly longitude: number;
  /** IANA name of the station's time zone. */
  readonly zone: string;
  /**
   * What heights are above, by the source's name for it: 'MLLW', 'LAT', 'MSL'. In the United
   * Kingdom, Ireland and France it is a computed lowest astronomical tide, not the official chart
   * datum, which has to be said wherever such heights are shown.
   */
  readonly datum: string;
  /** The credit that must be shown with everything predicted for the station. */
  readonly attribution: string;
  /** 'public domain', 'cc-by-4.0'. */
  readonly licence: string;
}

/** A tide station with what its tide is predicted from. */
export interface StationRecord extends StationFacts, TideStation {}

/** A station and how far away it lies, along the surface of the earth. */
export interface StationNearby {
  readonly station: StationFacts;
  readonly distanceKm: number;
}

/** Why a station cannot be used here. */
export type StationRefusal =
  | { readonly why: 'no-such-station'; readonly id: string }
  | { readonly why: 'not-a-tide-station'; readonly id: string }
  /** Doubtful to its own source: a double of another gauge, datums that cannot be. */
  | { readonly why: 'doubtful-station'; readonly id: string; readonly doubt: string }
  | { readonly why: 'not-for-commercial-use'; readonly id: string; readonly licence: string }
  /** Marked with a licence for programs, which says nothing of the figures. */
  | { readonly why: 'licence-not-clear'; readonly id: string; readonly licence: string }
  /** Heights would silently be above something else. */
  | { readonly why: 'no-chart-datum'; readonly id: string }
  | CurveRefusal;

/** The tide stations of the world that may be used here, and what their tides are predicted from. */
export interface TideStations {
  /** The station of that id; refused with its reason if it is none, or not to be used. */
  readonly find: (id: string) => Promise<Verdict<StationRecord, StationRefusal>>;
  /** The nearest stations that find would grant, at most so many, the nearest first. */
  readonly nearest: (
    latitude: number,
    longitude: number,
    count: number,
  ) => Promise<StationNearby[]>;
}

type Database = typeof TideDatabase;
type Offsets = NonNullable<Station['offsets']>;

/**
 * Tide stations from the open tide database, 31 MB that are read at the first question (0.7 s and
 * 110 MB of memory) and kept. Heights and times of a station that has no constituents of its own
 * follow from those of its reference station by the published differences.
 */
export function tideStations(): TideStations {
  let loading: Promise<Database> | undefined;
  const load = (): Promise<Database> => {
    loading ??= import('@neaps/tide-database');
    return loading;
  };
  return {
    find: async (id) => {
      const { stationsById } = await load();
      const station = stationsById.get(id);
      return station === undefined ? refused({ why: 'no-such-station', id }) : recordOf(station);
    },
    nearest: async (latitude, longitude, count) => {
      const { near } = await load();
      const isServed = (station: Station) => recordOf(station).isGranted;
      return near({ latitude, longitude, maxResults: count, filter: isServed }).map(
        ([station, distanceKm]) => ({ station: summaryOf(station), distanceKm }),
      );
    },
  };
}

function recordOf(station: Station): Verdict<StationRecord, StationRefusal> {
  const { id, license, quality, chart_datum: datum } = station;
  if (station.kind !== 'tide') return refused({ why: 'not-a-tide-station', id });
  const reasons: StationRefusal[] = [];
  if (quality?.accepted === false) {
    reasons.push({ why: 'doubtful-station', id, doubt: quality.reason ?? 'no reason given' });
  }
  if (!license.commercial_use) {
    reasons.push({ why: 'not-for-commercial-use', id, licence: license.type });
  } else if (license.type === 'MIT') {
    reasons.push({ why: 'licence-not-clear', id, licence: license.type });
  }
  const datumM = datum === undefined ? undefined : station.datums[datum];
  const meanSeaM = station.datums['MSL'];
  if (datumM === undefined || meanSeaM === undefined) reasons.push({ why: 'no-chart-datum', id });
  const record: StationRecord = {
    ...summaryOf(station),
    constituents: constituentsOf(station),
    meanLevelM: (meanSeaM ?? 0) - (datumM ?? 0),
    ...(station.offsets === undefined ? {} : { differences: differencesOf(station.offsets) }),
  };
  const curve = tideCurve(record);
  if (!curve.isGranted) reasons.push(...curve.reasons);
  const [first, ...rest] = reasons;
  return first === undefined ? granted(record) : refused(first, ...rest);
}

function summaryOf(station: Station): StationFacts {
  return {
    id: station.id,
    name: station.name,
    latitude: station.latitude,
    longitude: station.longitude,
    zone: station.timezone,
    datum: station.chart_datum ?? 'none',
    attribution: station.attribution,
    licence: station.license.type,
  };
}

function constituentsOf({ source, harmonic_constituents }: Station): StationConstituent[] {
  return harmonic_constituents.map(({ name, amplitude, phase }) => ({
    name,
    amplitudeM: amplitude,
    phaseDeg: greenwichPhaseDeg(source.name, name, phase),
  }));
}

function differencesOf({ height, time }: Offsets): TideDifferences {
  const difference = (kind: 'high' | 'low') => ({
    laterMinutes: time[kind],
    heightFactor: height.type === 'ratio' ? height[kind] : 1,
    higherM: height.type === 'fixed' ? height[kind] : 0,
  });
  return { high: difference('high'), low: difference('low') };
}
