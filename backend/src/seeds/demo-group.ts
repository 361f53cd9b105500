import type { ShoreWish } from '#backend/features/shores/save-shore.ts';
import type { CalendarDay } from '#shared/kernel/time.ts';

/** The tide station whose tides the invented shores borrow. */
export const demoTideStationId = 'ticon/north_shields-nsh-gbr-bodc';
export const demoZone = 'Europe/London';

const same = { laterMinutes: 0, heightFactor: 1, higherM: 0 };
const common = {
  zone: demoZone,
  tideStationId: demoTideStationId,
  differences: { high: same, low: same },
  minutesBeforeLow: 120,
  minutesAfterLow: 30,
  daylightMarginMinutes: 30,
  minimumMinutes: 90,
  earliestClock: '07:00',
  latestClock: '19:00',
  crewMeetsMinutes: 45,
  partyMeetsMinutes: 20,
  emergencyWords:
    'Demo: in an emergency, dial the emergency number of your country and ask for the coastguard.',
} as const;

/** Invented shores; their positions lie offshore in the North Sea, where nobody can go by mistake. */
export const demoShores: readonly ShoreWish[] = [
  {
    ...common,
    name: 'Gull Ledges',
    latitude: 55.06,
    longitude: -1.18,
    workingLevelM: 2.0,
    cutOffLevelM: 3.1,
    meetingPlace: 'Blue hut at the head of the slipway. The slip itself stays clear.',
    hazards: 'Weed on the lower ledges. A gully fills behind the outer ledge first.',
    waysOff: 'Slipway; iron steps at the north end.',
    phoneSignal: 'Good at the hut, none below the steps.',
    ratioPreset: 'families',
  },
  {
    ...common,
    name: 'Kettle Reef',
    latitude: 55.09,
    longitude: -1.15,
    workingLevelM: 1.8,
    cutOffLevelM: 2.9,
    meetingPlace: 'Grass above the steps, by the notice board.',
    hazards: 'Loose boulders under the cliff: keep ten metres away from it.',
    waysOff: 'Concrete steps; the ramp at the south end until half tide.',
    phoneSignal: 'Weak throughout. Take the radio.',
    ratioPreset: 'schools',
  },
  {
    ...common,
    name: 'Skerrow Flat',
    latitude: 55.03,
    longitude: -1.22,
    workingLevelM: 2.2,
    cutOffLevelM: 3.3,
    meetingPlace: 'Gate at the end of the dune path.',
    hazards: 'Soft sand along the stream. The flat covers quickly from both sides.',
    waysOff: 'Straight back to the gate. No other.',
    phoneSignal: 'Good.',
    ratioPreset: 'strict',
  },
];

/** Days on which no school comes, by month and day; the demo's terms are the same every year. */
const schoolHolidays: readonly (readonly [from: string, to: string])[] = [
  ['01-01', '01-04'],
  ['02-15', '02-19'],
  ['04-01', '04-14'],
  ['05-28', '06-04'],
  ['07-20', '09-03'],
  ['10-25', '10-31'],
  ['12-18', '12-31'],
];

export function isSchoolHoliday(on: CalendarDay): boolean {
  const monthDay = on.slice(5);
  return schoolHolidays.some(([from, to]) => from <= monthDay && monthDay <= to);
}

/** Two season plans round today; weekdays as RFC 5545 and ISO 8601 number them. */
export const demoPlans = [
  {
    name: 'Saturday families',
    shoreName: 'Gull Ledges',
    pattern: 'FREQ=WEEKLY;BYDAY=SA',
    earliestClock: '07:00',
    latestClock: '18:00',
    slots: { 'Shore leader': 1, 'Back marker': 1, 'Pool guide': 2 },
    isInTerm: false,
    weekdays: [6],
  },
  {
    name: 'School mornings',
    shoreName: 'Kettle Reef',
    pattern: 'FREQ=WEEKLY;BYDAY=TU,TH',
    earliestClock: '08:30',
    latestClock: '15:30',
    slots: { 'Shore leader': 1, 'Back marker': 1, 'Pool guide': 1 },
    isInTerm: true,
    weekdays: [2, 4],
  },
] as const;

/** Validity in months and notice days; the words say what to do about it. */
export const demoCompetencies = [
  {
    name: 'Tide safety',
    validityMonths: 24,
    noticeDays: 90,
    howToGet:
      'Ask a trainer for the next tide safety evening: two hours, with a walk at low water.',
  },
  {
    name: 'First aid outdoors',
    validityMonths: 36,
    noticeDays: 90,
    howToGet: 'Take a 16-hour outdoor first aid course, then send the certificate to a trainer.',
  },
  {
    name: 'Safeguarding',
    validityMonths: 36,
    noticeDays: 60,
    howToGet: 'Take the group’s safeguarding evening with a trainer.',
  },
  {
    name: 'Shore leading',
    validityMonths: null,
    noticeDays: 0,
    howToGet: 'Work three sessions beside a shore leader, then ask a trainer for a check.',
  },
  {
    name: 'Pool guiding',
    validityMonths: null,
    noticeDays: 0,
    howToGet: 'Come along to two sessions as a trainee, then ask a trainer for a check.',
  },
] as const;
type CompetencyName = (typeof demoCompetencies)[number]['name'];

export const demoSlotKinds: readonly {
  readonly name: string;
  readonly isFor18AndOver: boolean;
  readonly requires: readonly CompetencyName[];
}[] = [
  {
    name: 'Shore leader',
    isFor18AndOver: true,
    requires: ['Tide safety', 'First aid outdoors', 'Safeguarding', 'Shore leading'],
  },
  {
    name: 'Back marker',
    isFor18AndOver: true,
    requires: ['Tide safety', 'First aid outdoors', 'Safeguarding'],
  },
  { name: 'Pool guide', isFor18AndOver: false, requires: ['Safeguarding', 'Pool guiding'] },
];

/** What everybody of the crew holds; the day on which each lapses is counted from today. */
const wellTrained: readonly CompetencyName[] = demoCompetencies.map(({ name }) => name);

/** Crew beyond those who can sign in. Invented names. */
export const demoCrew: readonly {
  readonly name: string;
  readonly email: string;
  readonly bornOn: `${number}-${number}-${number}`;
  readonly holds: readonly CompetencyName[];
}[] = [
  crewMember('Amara Nwosu', '1988-03-14', wellTrained),
  crewMember('Idris Calloway', '1969-11-02', wellTrained),
  crewMember('Hana Dvorská', '1994-07-21', ['Safeguarding', 'Pool guiding']),
  crewMember('Joss Whitlock', '1979-01-30', ['Safeguarding', 'Pool guiding']),
  crewMember('Maren Kjelstad', '1958-09-09', [
    'Tide safety',
    'First aid outdoors',
    'Safeguarding',
    'Pool guiding',
  ]),
  crewMember('Mele Tupou', '1991-05-05', [
    'Tide safety',
    'First aid outdoors',
    'Safeguarding',
    'Pool guiding',
  ]),
];

function crewMember(
  name: string,
  bornOn: `${number}-${number}-${number}`,
  holds: readonly CompetencyName[],
) {
  const address = name
    .normalize('NFD')
    .replaceAll(/[^A-Za-z ]/g, '')
    .toLowerCase()
    .replaceAll(' ', '.');
  return { name, email: `${address}@example.org`, bornOn, holds };
}
