import type { z } from 'zod';
import {
  planDate,
  planPreview,
  planView,
  readPattern,
  seePlans,
} from '#shared/contracts/season-plans.ts';
import type {
  PlanDate,
  PlanPreview,
  PlanSettings,
  PlanView,
} from '#shared/contracts/season-plans.ts';
import type { CalendarDay } from '#shared/kernel/time.ts';
import { addDays, startOfDay, toIso } from '#shared/kernel/time.ts';
import { account, idOf, today, zone } from './made-up-replies.ts';
import { source } from './made-up-shores.ts';
import { madeUpCurve, madeUpNoonLow } from './made-up-tide.ts';

/** Replies about invented season plans, each parsed by its own contract. */
const MINUTE_MS = 60_000;
const axis = { bottomM: 0.07, topM: 5.87 };
export const planId = idOf(500);
export const shoreIds = { gullLedges: idOf(11), kettleReef: idOf(12) };
export const slotKindIds = { leader: idOf(31), backMarker: idOf(32), poolGuide: idOf(33) };

/** The account of somebody who plans seasons. */
export function ines() {
  return account({ id: idOf(4), name: 'Ines Thackeray', roles: ['coordinator'] });
}

export const settings: PlanSettings = {
  name: 'Saturday families',
  shoreId: shoreIds.gullLedges,
  pattern: 'FREQ=WEEKLY;BYDAY=SA',
  fromOn: '2027-05-01',
  toOn: '2027-05-22',
  minutesBeforeLow: 120,
  minutesAfterLow: 30,
  daylightMarginMinutes: 30,
  minimumMinutes: 90,
  earliestClock: '07:00',
  latestClock: '18:00',
  lowestLevelM: 1.3,
  slots: [
    { slotKindId: slotKindIds.leader, count: 1 },
    { slotKindId: slotKindIds.backMarker, count: 1 },
    { slotKindId: slotKindIds.poolGuide, count: 2 },
  ],
  exceptions: [],
};

const rules = {
  zone,
  minutesBeforeLow: 120,
  minutesAfterLow: 30,
  daylightMarginMinutes: 30,
  minimumMinutes: 90,
};

export function plans(listed: z.input<typeof seePlans.reply>['plans'] = []) {
  return seePlans.reply.parse({
    plans: listed,
    shores: [
      {
        ...rules,
        id: shoreIds.gullLedges,
        name: 'Gull Ledges',
        workingLevelM: 1.3,
        earliestClock: '07:00',
        latestClock: '18:00',
      },
      {
        ...rules,
        id: shoreIds.kettleReef,
        name: 'Kettle Reef',
        workingLevelM: 0.9,
        earliestClock: '08:00',
        latestClock: '20:00',
      },
    ],
    slotKinds: [
      { id: slotKindIds.leader, name: 'Shore leader' },
      { id: slotKindIds.backMarker, name: 'Back marker' },
      { id: slotKindIds.poolGuide, name: 'Pool guide' },
    ],
    today,
  });
}

type WrittenDate = z.input<typeof planDate>;

/** A date with its whole window round the low water nearest to noon, changed as told. */
export function takenOn(on: CalendarDay, changes: Partial<WrittenDate> = {}): PlanDate {
  const low = madeUpNoonLow(on, zone);
  const after = (minutes: number): string => toIso(low.at + minutes * MINUTE_MS);
  return planDate.parse({
    on,
    source: 'pattern',
    isTaken: true,
    isByHand: false,
    handReason: null,
    skippedBy: null,
    leftMinutes: 150,
    isPast: false,
    mayTake: false,
    day: {
      ...waterOn(on),
      window: {
        lowWaterAt: after(0),
        lowWaterHeightM: low.heightM,
        crewMeetsAt: after(-165),
        partyMeetsAt: after(-140),
        startsAt: after(-120),
        lowerShoreClearBy: after(0),
        offTheShoreBy: after(30),
        endsAt: after(75),
        cuts: [],
      },
      reasons: [],
    },
    sessionId: null,
    sessionState: null,
    ...changes,
  });
}

/** A date that the rules refuse for these reasons, changed as told. */
export function skippedOn(
  on: CalendarDay,
  reasons: WrittenDate['day']['reasons'],
  changes: Partial<WrittenDate> = {},
): PlanDate {
  return planDate.parse({
    ...takenOn(on),
    isTaken: false,
    skippedBy: 'rules',
    leftMinutes: null,
    mayTake: true,
    day: { ...waterOn(on), window: null, reasons },
    ...changes,
  });
}

function waterOn(on: CalendarDay) {
  const fromAt = startOfDay(on, zone);
  return {
    on,
    axis,
    curve: madeUpCurve(fromAt, startOfDay(addDays(on, 1), zone), 15).map(({ at, heightM }) => ({
      at: toIso(at),
      heightM,
    })),
    extremes: [],
    sunriseAt: `${on}T04:10:00.000Z`,
    sunsetAt: `${on}T19:50:00.000Z`,
  };
}

/** Four Saturdays in May, of which the second is refused for its height. */
export const dates: readonly PlanDate[] = [
  takenOn('2027-05-01'),
  skippedOn('2027-05-08', [
    {
      why: 'too-high',
      lowWaterAt: '2027-05-08T13:03:00.000Z',
      lowWaterHeightM: 2,
      workingLevelM: 1.3,
    },
  ]),
  takenOn('2027-05-15'),
  takenOn('2027-05-22'),
];

export function preview(shown: readonly PlanDate[] = dates): PlanPreview {
  return planPreview.parse({
    sentence: 'Every Saturday',
    nextDates: ['2027-05-01', '2027-05-08', '2027-05-15', '2027-05-22', '2027-05-29'],
    zone,
    axis,
    source,
    dates: shown,
  });
}

export function plan(changes: Partial<PlanView> = {}): PlanView {
  return planView.parse({
    id: planId,
    settings,
    preview: preview(),
    made: 0,
    published: 0,
    mayChange: true,
    ...changes,
  });
}

/** The plan once its sessions are made: drafts 601, 603 and 604, of which one may be published. */
export function madePlan(published: readonly number[] = []): PlanView {
  const withSession = (date: PlanDate, index: number): PlanDate =>
    date.isTaken
      ? {
          ...date,
          sessionId: idOf(601 + index),
          sessionState: published.includes(601 + index) ? 'published' : 'draft',
        }
      : date;
  return plan({
    preview: preview(dates.map(withSession)),
    made: 3,
    published: published.length,
    mayChange: false,
  });
}

export function reading(sentence = 'Every Saturday') {
  return readPattern.reply.parse({ sentence, nextDates: preview().nextDates });
}
