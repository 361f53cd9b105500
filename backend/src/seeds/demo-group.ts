import type { ShoreRules } from '#shared/domain/tides/shore-water.ts';

/** The tide station whose tides the invented shores borrow. */
export const demoTideStationId = 'ticon/north_shields-nsh-gbr-bodc';
export const demoZone = 'Europe/London';

const window = {
  minutesBeforeLow: 120,
  minutesAfterLow: 30,
  daylightMarginMinutes: 30,
  minimumMinutes: 90,
  earliestClock: '07:00',
  latestClock: '19:00',
  crewMeetsMinutes: 45,
  partyMeetsMinutes: 20,
} as const;

/** Invented shores; their positions lie offshore in the North Sea, where nobody can go by mistake. */
export const demoShores: readonly (Omit<ShoreRules, 'zone'> & {
  readonly name: string;
  readonly meetingPlace: string;
})[] = [
  {
    ...window,
    name: 'Gull Ledges',
    latitude: 55.06,
    longitude: -1.18,
    workingLevelM: 2.0,
    cutOffLevelM: 3.1,
    meetingPlace: 'Blue hut at the head of the slipway. The slip itself stays clear.',
  },
  {
    ...window,
    name: 'Kettle Reef',
    latitude: 55.09,
    longitude: -1.15,
    workingLevelM: 1.8,
    cutOffLevelM: 2.9,
    meetingPlace: 'Grass above the steps, by the notice board.',
  },
  {
    ...window,
    name: 'Skerrow Flat',
    latitude: 55.03,
    longitude: -1.22,
    workingLevelM: 2.2,
    cutOffLevelM: 3.3,
    meetingPlace: 'Gate at the end of the dune path.',
  },
];

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
