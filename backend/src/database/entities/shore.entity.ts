import { EntitySchema } from 'typeorm';
import type { ShoreId } from '#shared/kernel/ids.ts';
import type { ClockTime } from '#shared/kernel/time.ts';

/** A shore that the group works on. Heights are above the chart datum of its tide station. */
export interface ShoreRow {
  id: ShoreId;
  name: string;
  /** Order in lists; the first is the home shore. */
  position: number;
  zone: string;
  latitude: number;
  longitude: number;
  tideStationId: string;
  highLaterMinutes: number;
  highHigherM: number;
  lowLaterMinutes: number;
  lowHigherM: number;
  lowestTideM: number;
  highestTideM: number;
  workingLevelM: number;
  cutOffLevelM: number;
  minutesBeforeLow: number;
  minutesAfterLow: number;
  daylightMarginMinutes: number;
  minimumMinutes: number;
  earliestClock: ClockTime;
  latestClock: ClockTime;
  crewMeetsMinutes: number;
  partyMeetsMinutes: number;
  meetingPlace: string;
  hazards: string;
  waysOff: string;
  phoneSignal: string;
  emergencyWords: string;
  ratioPreset: 'schools' | 'families' | 'strict';
}

export const ShoreEntity = new EntitySchema<ShoreRow>({
  name: 'shore',
  columns: {
    id: { type: 'uuid', primary: true },
    name: { type: 'text' },
    position: { type: 'integer' },
    zone: { type: 'text' },
    latitude: { type: 'double precision' },
    longitude: { type: 'double precision' },
    tideStationId: { name: 'tide_station_id', type: 'text' },
    highLaterMinutes: { name: 'high_later_minutes', type: 'integer', default: 0 },
    highHigherM: { name: 'high_higher_m', type: 'double precision', default: 0 },
    lowLaterMinutes: { name: 'low_later_minutes', type: 'integer', default: 0 },
    lowHigherM: { name: 'low_higher_m', type: 'double precision', default: 0 },
    lowestTideM: { name: 'lowest_tide_m', type: 'double precision' },
    highestTideM: { name: 'highest_tide_m', type: 'double precision' },
    workingLevelM: { name: 'working_level_m', type: 'double precision' },
    cutOffLevelM: { name: 'cut_off_level_m', type: 'double precision' },
    minutesBeforeLow: { name: 'minutes_before_low', type: 'integer' },
    minutesAfterLow: { name: 'minutes_after_low', type: 'integer' },
    daylightMarginMinutes: { name: 'daylight_margin_minutes', type: 'integer' },
    minimumMinutes: { name: 'minimum_minutes', type: 'integer' },
    earliestClock: { name: 'earliest_clock', type: 'text' },
    latestClock: { name: 'latest_clock', type: 'text' },
    crewMeetsMinutes: { name: 'crew_meets_minutes', type: 'integer' },
    partyMeetsMinutes: { name: 'party_meets_minutes', type: 'integer' },
    meetingPlace: { name: 'meeting_place', type: 'text' },
    hazards: { type: 'text', default: '' },
    waysOff: { name: 'ways_off', type: 'text', default: '' },
    phoneSignal: { name: 'phone_signal', type: 'text', default: '' },
    emergencyWords: { name: 'emergency_words', type: 'text', default: '' },
    ratioPreset: { name: 'ratio_preset', type: 'text', default: 'families' },
  },
});
