import type { z } from 'zod';
import { seeAccount, seeFrontDoor } from '#shared/contracts/account.ts';
import type { CalendarView, SessionView } from '#shared/contracts/sessions.ts';
import { seeCalendar, seeSession } from '#shared/contracts/sessions.ts';
import type { SlotView } from '#shared/contracts/slots.ts';
import { claimSlot } from '#shared/contracts/slots.ts';
import type { CalendarDay } from '#shared/kernel/time.ts';
import { addDays, daysBetween, fromIso, startOfDay, toIso } from '#shared/kernel/time.ts';
import { madeUpCurve, madeUpLows, madeUpNoonLow } from './made-up-tide.ts';

/**
 * Replies of an invented group, each parsed by its own contract, so that no screen is tested
 * against an answer that the server could never give.
 */
export const zone = 'Europe/London';
export const now = '2027-04-29T12:05:00.000Z';
export const today: CalendarDay = '2027-04-29';
const MINUTE_MS = 60_000;
const axis = { bottomM: 0.07, topM: 5.87 };
const source = {
  stationId: 'made-up',
  stationName: 'Outer Skerrow',
  latitude: 54.61,
  longitude: -1.14,
  datum: 'LAT',
  attribution: 'Invented for these pages.',
  table: null,
};

/** An id that is told apart by a number. */
export function idOf(number: number): string {
  return `00000000-0000-4000-8000-${String(number).padStart(12, '0')}`;
}

const shoreIds = { 'Gull Ledges': idOf(11), 'Kettle Reef': idOf(12), 'Skerrow Flat': idOf(13) };
export type ShoreName = keyof typeof shoreIds;

const kinds = ['Shore leader', 'Back marker', 'Pool guide', 'Pool guide'] as const;

/** Who reads these pages. */
export const callum: NonNullable<z.input<typeof seeAccount.reply>['person']> = {
  id: idOf(1),
  name: 'Callum Marrack',
  roles: ['volunteer'],
};

export function account(person: z.input<typeof seeAccount.reply>['person'] = callum) {
  const low = madeUpNoonLow(today, zone);
  return seeAccount.reply.parse({
    group: { name: 'Skerrow Bay Shore Group', zone },
    now,
    person,
    homeShoreToday: {
      shoreName: 'Gull Ledges',
      zone,
      lowWater: { at: toIso(low.at), kind: 'low', heightM: low.heightM },
      axis,
      curve: curveOf(today, today, 10),
    },
  });
}

export function frontDoor(nextState: 'on' | 'stood-down' | 'none' = 'on') {
  const day: CalendarDay = '2027-05-08';
  const low = madeUpNoonLow(day, zone);
  const from: CalendarDay = '2027-05-03';
  const times = timesOf(day);
  return seeFrontDoor.reply.parse({
    group: { name: 'Skerrow Bay Shore Group', zone },
    shoreNames: Object.keys(shoreIds),
    nextSession:
      nextState === 'none'
        ? null
        : {
            shoreName: 'Skerrow Flat',
            zone,
            state: nextState,
            partyMeetsAt: times.partyMeetsAt,
            startsAt: times.startsAt,
            lowWaterAt: times.lowWaterAt,
            lowWaterHeightM: low.heightM,
            offTheShoreBy: times.offTheShoreBy,
            axis,
            curve: curveOf(day, day, 10),
          },
    fortnight: {
      zone,
      axis,
      source,
      curve: curveOf(from, addDays(from, 13), 30),
      sessions: [3, 4, 5, 6, 7, 8].map((days) => {
        const { startsAt, lowWaterAt, offTheShoreBy } = timesOf(addDays(from, days));
        return { startsAt, lowWaterAt, offTheShoreBy };
      }),
      springs: [{ at: '2027-05-08T08:28:00.000Z', rangeM: 4.7 }],
      neaps: [{ at: '2027-05-15T17:00:00.000Z', rangeM: 2.2 }],
    },
  });
}

/** A letter for each slot of a session: C claimed, Y yours, G a gap, M a gap you may take, D in doubt. */
export interface MadeUpSession {
  readonly number: number;
  readonly on: CalendarDay;
  readonly shore: ShoreName;
  readonly slots: string;
  readonly state?: SessionView['state'];
}

export const sessions: readonly MadeUpSession[] = [
  { number: 101, on: '2027-04-26', shore: 'Kettle Reef', slots: 'CCCC', state: 'closed' },
  { number: 102, on: '2027-04-27', shore: 'Gull Ledges', slots: 'CCC', state: 'stood-down' },
  { number: 103, on: '2027-05-06', shore: 'Kettle Reef', slots: 'CCC' },
  { number: 104, on: '2027-05-07', shore: 'Gull Ledges', slots: 'YCCC' },
  { number: 105, on: '2027-05-08', shore: 'Skerrow Flat', slots: 'CGCC' },
  { number: 106, on: '2027-05-08', shore: 'Kettle Reef', slots: 'CCC' },
  { number: 107, on: '2027-05-09', shore: 'Gull Ledges', slots: 'GDCM' },
  { number: 108, on: '2027-05-10', shore: 'Kettle Reef', slots: 'CGM' },
  { number: 109, on: '2027-05-11', shore: 'Gull Ledges', slots: 'YCC' },
  { number: 110, on: '2027-05-22', shore: 'Kettle Reef', slots: 'CCYC' },
  { number: 111, on: '2027-05-23', shore: 'Skerrow Flat', slots: 'GCCC' },
  { number: 112, on: '2027-05-24', shore: 'Gull Ledges', slots: 'CCCC' },
  { number: 113, on: '2027-05-25', shore: 'Kettle Reef', slots: 'CDC' },
  { number: 114, on: '2027-05-25', shore: 'Gull Ledges', slots: 'CCC' },
  { number: 115, on: '2027-05-25', shore: 'Skerrow Flat', slots: 'CGC' },
  { number: 116, on: '2027-05-26', shore: 'Gull Ledges', slots: 'CCM' },
  { number: 117, on: '2027-06-05', shore: 'Kettle Reef', slots: 'CCCC' },
  { number: 118, on: '2027-06-06', shore: 'Skerrow Flat', slots: 'GMCC' },
  { number: 119, on: '2027-06-08', shore: 'Gull Ledges', slots: 'CCM' },
];

export function calendar(
  from: CalendarDay,
  to: CalendarDay,
  shown: readonly MadeUpSession[] = sessions,
): CalendarView {
  const days = Array.from({ length: daysBetween(from, to) + 1 }, (_, index) =>
    addDays(from, index),
  );
  return seeCalendar.reply.parse({
    zone,
    today,
    now,
    homeShore: {
      id: shoreIds['Gull Ledges'],
      name: 'Gull Ledges',
      axis,
      source,
      curve: curveOf(from, to, 30),
      days: days.map((on) => {
        const low = madeUpNoonLow(on, zone);
        const hour = (low.at - startOfDay(on, zone)) / 3_600_000;
        const whyNot =
          low.heightM > 1.3 ? 'too-high' : hour < 7.5 || hour > 18 ? 'out-of-hours' : null;
        return {
          on,
          daylightLow: { at: toIso(low.at), kind: 'low', heightM: low.heightM },
          isUsable: whyNot === null,
          whyNot,
        };
      }),
      tideMarks: days.flatMap((on) => {
        const kind = { 8: 'springs', 15: 'neaps', 22: 'springs', 30: 'neaps' }[Number(on.slice(8))];
        return kind === undefined ? [] : [{ on, kind, rangeM: kind === 'springs' ? 4.7 : 2.2 }];
      }),
    },
    shores: Object.entries(shoreIds).map(([name, id]) => ({ id, name })),
    sessions: shown
      .filter(({ on }) => on >= from && on <= to)
      .map((session) => {
        const times = timesOf(session.on);
        const hasStarted = fromIso(times.crewMeetsAt) <= fromIso(now);
        return {
          id: idOf(session.number),
          title: 'Sunday families',
          shoreId: shoreIds[session.shore],
          shoreName: session.shore,
          zone,
          state: session.state ?? 'published',
          dayOn: session.on,
          startsAt: times.startsAt,
          lowWaterAt: times.lowWaterAt,
          lowWaterHeightM: madeUpNoonLow(session.on, zone).heightM,
          offTheShoreBy: times.offTheShoreBy,
          endsAt: times.endsAt,
          hasStarted,
          hasEnded: fromIso(times.endsAt) <= fromIso(now),
          slots: Array.from(session.slots, (letter, index) => ({
            id: idOf(session.number * 10 + index),
            slotKindName: kinds[index],
            state:
              letter === 'D' ? 'in-doubt' : letter === 'G' || letter === 'M' ? 'gap' : 'claimed',
            isYours: letter === 'Y',
            mayClaim: letter === 'M',
          })),
        };
      }),
  });
}

const competencies = { tideSafety: idOf(21), shoreLeading: idOf(22), poolGuiding: idOf(23) };
const day9: CalendarDay = '2027-05-09';

/** The session of 9 May at Gull Ledges as a pool guide sees it whose tide safety lapses on 3 May. */
export function session(changes: Partial<SessionView> = {}): SessionView {
  const times = timesOf(day9);
  return seeSession.reply.parse({
    id: idOf(107),
    kind: 'shore',
    title: 'Sunday families',
    state: 'published',
    dayOn: day9,
    shore: {
      id: shoreIds['Gull Ledges'],
      name: 'Gull Ledges',
      zone,
      meetingPlace: 'Blue hut at the head of the slipway',
      latitude: 54.6,
      longitude: -1.1,
    },
    ...times,
    lowWaterHeightM: madeUpNoonLow(day9, zone).heightM,
    water: {
      axis,
      curve: curveOf(day9, day9, 6),
      extremes: madeUpLows(day9, zone).map(({ at, heightM }) => ({
        at: toIso(at),
        kind: 'low',
        heightM,
      })),
      sunriseAt: '2027-05-09T04:10:00.000Z',
      sunsetAt: '2027-05-09T19:50:00.000Z',
      source,
    },
    slots: [leaderGap(), doubtful(), claimed(), openGap()],
    trail: [
      entry('2027-04-24T09:00:00.000Z', 'Amara Nwosu', 'slot.released', 'Shore leader'),
      entry('2027-04-14T18:20:00.000Z', 'Wei-Ling Foo', 'slot.claimed', 'Pool guide'),
      entry('2027-03-02T10:00:00.000Z', 'Ines Thackeray', 'session.made', null),
    ],
    ...changes,
  });
}

function entry(
  at: string,
  actorName: string,
  action: SessionView['trail'][number]['action'],
  slotKindName: string | null,
) {
  return { at, actorName, action, slotKindName };
}

const plainSlot: Omit<
  z.input<typeof claimSlot.reply>,
  'id' | 'slotKindId' | 'slotKindName' | 'needs' | 'state'
> = {
  isFor18AndOver: false,
  isYours: false,
  holder: null,
  claim: null,
  release: null,
  standings: [],
};

export function slot(changes: z.input<typeof claimSlot.reply>): SlotView {
  return claimSlot.reply.parse(changes);
}

function leaderGap(): SlotView {
  return slot({
    ...plainSlot,
    id: idOf(1070),
    slotKindId: idOf(31),
    slotKindName: 'Shore leader',
    needs: ['Tide safety', 'First aid outdoors', 'Safeguarding', 'Shore leading'],
    isFor18AndOver: true,
    state: 'gap',
    claim: {
      isGranted: false,
      reasons: [
        {
          why: 'competency-lapses',
          competencyId: competencies.tideSafety,
          competencyName: 'Tide safety',
          howToGet: 'the refresher on the first Saturday of the month.',
          lastValidOn: '2027-05-03',
          neededOn: day9,
          daysShort: 6,
          hasLapsed: false,
        },
        {
          why: 'competency-not-held',
          competencyId: competencies.shoreLeading,
          competencyName: 'Shore leading',
          howToGet: 'three sessions beside a leader, then a check.',
        },
      ],
    },
    standings: [
      {
        competencyId: competencies.tideSafety,
        competencyName: 'Tide safety',
        isCurrent: false,
        lastValidOn: '2027-05-03',
        shareLeft: 0.01,
        noticeShare: 0.08,
        state: 'renew-by',
      },
      {
        competencyId: competencies.shoreLeading,
        competencyName: 'Shore leading',
        isCurrent: false,
        lastValidOn: null,
        shareLeft: null,
        noticeShare: null,
        state: 'not-held',
      },
    ],
  });
}

function doubtful(): SlotView {
  return slot({
    ...plainSlot,
    id: idOf(1071),
    slotKindId: idOf(32),
    slotKindName: 'Back marker',
    needs: ['Tide safety', 'First aid outdoors', 'Safeguarding', 'Back marking'],
    state: 'in-doubt',
    holder: {
      personId: idOf(3),
      name: 'Rafael Quintanilha',
      claimedAt: '2027-04-12T10:00:00.000Z',
    },
  });
}

function claimed(): SlotView {
  return slot({
    ...plainSlot,
    id: idOf(1072),
    slotKindId: idOf(33),
    slotKindName: 'Pool guide',
    needs: ['Safeguarding', 'Pool guiding'],
    state: 'claimed',
    holder: { personId: idOf(2), name: 'Wei-Ling Foo', claimedAt: '2027-04-14T18:20:00.000Z' },
  });
}

export function openGap(): SlotView {
  return slot({
    ...plainSlot,
    id: idOf(1073),
    slotKindId: idOf(33),
    slotKindName: 'Pool guide',
    needs: ['Safeguarding', 'Pool guiding'],
    state: 'gap',
    claim: { isGranted: true },
  });
}

/** The open gap after the reader has claimed it. */
export function takenByYou(): SlotView {
  return slot({
    ...openGap(),
    state: 'claimed',
    isYours: true,
    holder: { personId: idOf(1), name: 'Callum Marrack', claimedAt: now },
    claim: null,
    release: { isGranted: true, sentence: null },
  });
}

/** The times of a session round the low water of a day, by the usual rules. */
function timesOf(day: CalendarDay) {
  const low = madeUpNoonLow(day, zone).at;
  const after = (minutes: number): string => toIso(low + minutes * MINUTE_MS);
  return {
    crewMeetsAt: after(-165),
    partyMeetsAt: after(-140),
    startsAt: after(-120),
    lowWaterAt: after(0),
    lowerShoreClearBy: after(0),
    offTheShoreBy: after(30),
    endsAt: after(75),
  };
}

function curveOf(from: CalendarDay, to: CalendarDay, everyMinutes: number) {
  return madeUpCurve(startOfDay(from, zone), startOfDay(addDays(to, 1), zone), everyMinutes).map(
    ({ at, heightM }) => ({ at: toIso(at), heightM }),
  );
}
