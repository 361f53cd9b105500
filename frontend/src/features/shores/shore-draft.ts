import type { ShoreSettings } from '#shared/contracts/shores.ts';
import { DEFAULT_WINDOW_SETTINGS } from '#shared/domain/tides/working-window.ts';
import type { ClockTime } from '#shared/kernel/time.ts';
import type { Position, ShoreWater } from './shores.queries.ts';

const decimals = [
  'latitude',
  'longitude',
  'differences.high.higherM',
  'differences.low.higherM',
  'workingLevelM',
  'cutOffLevelM',
] as const;

const wholes = [
  'differences.high.laterMinutes',
  'differences.low.laterMinutes',
  'minutesBeforeLow',
  'minutesAfterLow',
  'daylightMarginMinutes',
  'minimumMinutes',
  'crewMeetsMinutes',
  'partyMeetsMinutes',
] as const;

const texts = [
  'name',
  'zone',
  'tideStationId',
  'earliestClock',
  'latestClock',
  'meetingPlace',
  'hazards',
  'waysOff',
  'phoneSignal',
  'emergencyWords',
  'ratioPreset',
] as const;

type NumberPath = (typeof decimals)[number] | (typeof wholes)[number];

/** A field of a shore, by its path in the settings. */
export type DraftPath = NumberPath | (typeof texts)[number];

/** A shore as it is being written: what stands in each field, just as it was typed. */
export type ShoreDraft = Readonly<Record<DraftPath, string>>;

/** What is wrong, beside the field that it is about. */
export type DraftErrors = Readonly<Partial<Record<DraftPath, string>>>;

const paths: readonly string[] = [...decimals, ...wholes, ...texts];

/** Whether the form has a field of that path. */
export function isDraftPath(path: string): path is DraftPath {
  return paths.includes(path);
}

const DAY_HOURS = { earliest: '07:00', latest: '18:00' };

/** A shore of which nothing is known: the rules' usual margins, no levels and no place. */
export function emptyDraft(): ShoreDraft {
  const usual = DEFAULT_WINDOW_SETTINGS;
  return {
    name: '',
    zone: '',
    latitude: '',
    longitude: '',
    tideStationId: '',
    'differences.high.laterMinutes': '0',
    'differences.high.higherM': '0',
    'differences.low.laterMinutes': '0',
    'differences.low.higherM': '0',
    workingLevelM: '',
    cutOffLevelM: '',
    minutesBeforeLow: String(usual.beforeLowWaterMinutes),
    minutesAfterLow: String(usual.afterLowWaterMinutes),
    daylightMarginMinutes: String(usual.daylightMarginMinutes),
    minimumMinutes: String(usual.minimumMinutes),
    earliestClock: DAY_HOURS.earliest,
    latestClock: DAY_HOURS.latest,
    crewMeetsMinutes: String(usual.crewMeetsBeforeMinutes),
    partyMeetsMinutes: String(usual.partyMeetsBeforeMinutes),
    meetingPlace: '',
    hazards: '',
    waysOff: '',
    phoneSignal: '',
    emergencyWords: '',
    ratioPreset: '',
  };
}

/** The settings of a shore, to be changed. */
export function draftOf(settings: ShoreSettings): ShoreDraft {
  const { differences, ...flat } = settings;
  const draft: Record<string, string> = {};
  for (const [name, value] of Object.entries(flat)) draft[name] = String(value);
  for (const side of ['high', 'low'] as const) {
    draft[`differences.${side}.laterMinutes`] = String(differences[side].laterMinutes);
    draft[`differences.${side}.higherM`] = String(differences[side].higherM);
  }
  return { ...emptyDraft(), ...draft };
}

export interface DraftRead {
  /** Null where something could not be read. */
  readonly settings: ShoreSettings | null;
  readonly errors: DraftErrors;
}

/**
 * The settings that a draft says, or what of it cannot be sent at all: figures that are no numbers
 * and choices that nobody made. Whether the settings are good is for the server to judge.
 */
export function readDraft(draft: ShoreDraft): DraftRead {
  const errors: Partial<Record<DraftPath, string>> = {};
  const figures = figuresOf(draft, errors);
  if (draft.tideStationId === '') errors.tideStationId = 'Choose a tide station.';
  const { ratioPreset } = draft;
  if (!isPreset(ratioPreset)) {
    errors.ratioPreset = 'Choose one.';
    return { settings: null, errors };
  }
  if (Object.keys(errors).length > 0) return { settings: null, errors };
  const { name, meetingPlace, hazards, waysOff, phoneSignal, emergencyWords } = draft;
  return {
    settings: {
      ...waterOf(draft, figures),
      name,
      meetingPlace,
      hazards,
      waysOff,
      phoneSignal,
      emergencyWords,
      ratioPreset,
    },
    errors,
  };
}

/** What of a draft decides the water and its days; null while a part of that is missing. */
export function readWater(draft: ShoreDraft): ShoreWater | null {
  const errors: Partial<Record<DraftPath, string>> = {};
  const figures = figuresOf(draft, errors);
  const isWhole = [draft.zone, draft.tideStationId, draft.earliestClock, draft.latestClock].every(
    (text) => text.trim() !== '',
  );
  return isWhole && Object.keys(errors).length === 0 ? waterOf(draft, figures) : null;
}

/** Where the shore lies; null while that cannot be read. */
export function readPosition(draft: ShoreDraft): Position | null {
  const latitude = decimalOf(draft.latitude);
  const longitude = decimalOf(draft.longitude);
  return latitude === null || longitude === null ? null : { latitude, longitude };
}

function waterOf(draft: ShoreDraft, figures: Record<NumberPath, number>): ShoreWater {
  const difference = (side: 'high' | 'low') => ({
    laterMinutes: figures[`differences.${side}.laterMinutes`],
    higherM: figures[`differences.${side}.higherM`],
  });
  return {
    zone: draft.zone.trim(),
    latitude: figures.latitude,
    longitude: figures.longitude,
    tideStationId: draft.tideStationId,
    differences: { high: difference('high'), low: difference('low') },
    workingLevelM: figures.workingLevelM,
    cutOffLevelM: figures.cutOffLevelM,
    minutesBeforeLow: figures.minutesBeforeLow,
    minutesAfterLow: figures.minutesAfterLow,
    daylightMarginMinutes: figures.daylightMarginMinutes,
    minimumMinutes: figures.minimumMinutes,
    // The server says what is amiss with a clock that is none.
    earliestClock: draft.earliestClock as ClockTime,
    latestClock: draft.latestClock as ClockTime,
    crewMeetsMinutes: figures.crewMeetsMinutes,
    partyMeetsMinutes: figures.partyMeetsMinutes,
  };
}

function figuresOf(
  draft: ShoreDraft,
  errors: Partial<Record<DraftPath, string>>,
): Record<NumberPath, number> {
  const figures: Partial<Record<NumberPath, number>> = {};
  for (const path of decimals) {
    const figure = decimalOf(draft[path]);
    if (figure === null) errors[path] = 'Write a number, like 1.3.';
    figures[path] = figure ?? NaN;
  }
  for (const path of wholes) {
    const figure = decimalOf(draft[path]);
    if (figure === null || !Number.isInteger(figure)) errors[path] = 'Write whole minutes.';
    figures[path] = figure ?? NaN;
  }
  return figures as Record<NumberPath, number>;
}

/** A number as people write it: with a comma for the point, or a true minus; null for none. */
function decimalOf(text: string): number | null {
  const plain = text.trim().replace(',', '.').replace('−', '-');
  return /^[+-]?\d+(?:\.\d+)?$/.test(plain) ? Number(plain) : null;
}

function isPreset(text: string): text is ShoreSettings['ratioPreset'] {
  return text === 'schools' || text === 'families' || text === 'strict';
}
