import type { Read } from '#backend/database/transaction.ts';
import type { TideDifferences } from '#shared/domain/tides/differences.ts';
import type { ShoreRules } from '#shared/domain/tides/shore-water.ts';
import type { ShoreId } from '#shared/kernel/ids.ts';

/** A shore with its settings; heights above the chart datum of its tide station, in metres. */
export interface Shore extends ShoreRules {
  readonly id: ShoreId;
  readonly name: string;
  readonly tideStationId: string;
  readonly differences: TideDifferences;
  readonly lowestTideM: number;
  readonly highestTideM: number;
  readonly meetingPlace: string;
  readonly hazards: string;
  readonly waysOff: string;
  readonly phoneSignal: string;
  readonly emergencyWords: string;
  readonly ratioPreset: 'schools' | 'families' | 'strict';
}

const shoreSql = `
  SELECT json_build_object(
      'id', id, 'name', name, 'zone', zone, 'latitude', latitude, 'longitude', longitude,
      'tideStationId', tide_station_id,
      'differences', json_build_object(
        'high', json_build_object('laterMinutes', high_later_minutes, 'heightFactor', 1,
          'higherM', high_higher_m),
        'low', json_build_object('laterMinutes', low_later_minutes, 'heightFactor', 1,
          'higherM', low_higher_m)),
      'lowestTideM', lowest_tide_m, 'highestTideM', highest_tide_m,
      'workingLevelM', working_level_m, 'cutOffLevelM', cut_off_level_m,
      'minutesBeforeLow', minutes_before_low, 'minutesAfterLow', minutes_after_low,
      'daylightMarginMinutes', daylight_margin_minutes, 'minimumMinutes', minimum_minutes,
      'earliestClock', earliest_clock, 'latestClock', latest_clock,
      'crewMeetsMinutes', crew_meets_minutes, 'partyMeetsMinutes', party_meets_minutes,
      'meetingPlace', meeting_place, 'hazards', hazards, 'waysOff', ways_off,
      'phoneSignal', phone_signal, 'emergencyWords', emergency_words,
      'ratioPreset', ratio_preset) AS shore
    FROM shore`;

/** Every shore in the group's order. The first is the home shore. */
export async function readShores(read: Read): Promise<readonly Shore[]> {
  const rows: { shore: Shore }[] = await read.query(`${shoreSql} ORDER BY position, name`);
  return rows.map((row) => row.shore);
}

/** One shore; null when there is none of this id. */
export async function readShore(read: Read, id: ShoreId): Promise<Shore | null> {
  const rows: { shore: Shore }[] = await read.query(`${shoreSql} WHERE id = $1`, [id]);
  return rows[0]?.shore ?? null;
}
