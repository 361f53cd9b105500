import type { z } from 'zod';
import type { Shore } from '#backend/features/shores/shores.reader.ts';
import {
  presentAxis,
  presentDayOfWater,
  presentNoWindow,
  presentSource,
} from '#backend/features/tides/tides.presenter.ts';
import type { PlanSettings, PlanView, seePlans } from '#shared/contracts/season-plans.ts';
import type { planDate, planPreview } from '#shared/contracts/season-plans.ts';
import type { PlanDate, SkipReason } from '#shared/domain/seasons/season-plan.ts';
import type { NoWindowReason } from '#shared/domain/tides/working-window.ts';
import type { ShoreId, SlotKindId } from '#shared/kernel/ids.ts';
import { granted, refused } from '#shared/kernel/result.ts';
import type { CalendarDay, Instant } from '#shared/kernel/time.ts';
import { addDays, startOfDay } from '#shared/kernel/time.ts';
import type { PlanPreview } from './plan-preview.ts';
import type { Plan, PlannedSession, PlanValues } from './seasons.reader.ts';

/** The settings of the wire as the values of a plan. */
export function planValues(settings: PlanSettings): PlanValues {
  return {
    ...settings,
    shoreId: settings.shoreId as ShoreId,
    slots: settings.slots.map(({ slotKindId, count }) => ({
      slotKindId: slotKindId as SlotKindId,
      count,
    })),
  };
}

export function presentPreview(
  preview: PlanPreview,
  exceptions: PlanValues['exceptions'],
  sessions: readonly PlannedSession[],
  now: Instant,
): z.input<typeof planPreview> {
  const { shore, tide, dates } = preview;
  const first = dates[0]?.on;
  const last = dates.at(-1)?.on;
  const fromAt = first === undefined ? now : startOfDay(first, shore.zone);
  const toAt = last === undefined ? now : startOfDay(addDays(last, 1), shore.zone);
  return {
    sentence: preview.sentence,
    nextDates: [...preview.nextDates],
    zone: shore.zone,
    axis: presentAxis(shore),
    source: presentSource(tide, fromAt, toAt),
    dates: dates.map((date) => {
      const exception = exceptions.find(({ on }) => on === date.originalOn);
      const session = sessions.find(({ plannedOn }) => plannedOn === date.originalOn);
      return presentDate(preview, date, exception?.reason ?? null, session ?? null, now);
    }),
  };
}

function presentDate(
  { shore, tide }: PlanPreview,
  date: PlanDate,
  handReason: string | null,
  session: PlannedSession | null,
  now: Instant,
): z.input<typeof planDate> {
  const isTaken = date.state === 'taken';
  const byRules = isTaken ? [] : date.reasons.filter(isOfTheWater);
  const [first, ...rest] = byRules;
  const window = isTaken
    ? granted(date.window)
    : refused<NoWindowReason>(first ?? { why: 'no-low-water', on: date.on }, ...rest);
  const day = presentDayOfWater(shore, tide, presentAxis(shore), date.on, window);
  const barredAt = isTaken ? date.window.crewMeetsAt : startOfDay(addDays(date.on, 1), shore.zone);
  return {
    on: date.on,
    source: date.source,
    isTaken,
    isByHand: date.byHand,
    handReason: handReason === '' ? null : handReason,
    skippedBy: isTaken ? null : skippedBy(date.reasons[0]),
    leftMinutes: isTaken ? date.leftMinutes : null,
    mayTake: isTaken ? false : date.mayTakeByHand,
    isPast: barredAt <= now,
    day: { ...day, reasons: byRules.map(presentNoWindow) },
    sessionId: session?.id ?? null,
    sessionState: session?.state ?? null,
  };
}

const notOfTheWater = ['skipped-by-hand', 'closed', 'day-held-by-another-date'] as const;

function isOfTheWater(reason: SkipReason): reason is NoWindowReason {
  return !notOfTheWater.some((why) => why === reason.why);
}

function skippedBy(reason: SkipReason): z.input<typeof planDate>['skippedBy'] {
  switch (reason.why) {
    case 'skipped-by-hand':
      return 'hand';
    case 'closed':
      return 'closure';
    case 'day-held-by-another-date':
      return 'other-date';
    default:
      return 'rules';
  }
}

export function presentPlan(plan: Plan, preview: PlanPreview, now: Instant): PlanView {
  return {
    id: plan.id,
    settings: presentSettings(plan),
    preview: presentPreview(preview, plan.exceptions, plan.sessions, now),
    made: plan.sessions.length,
    published: plan.sessions.filter(({ state }) => state !== 'draft').length,
    mayChange: plan.sessions.length === 0,
  };
}

function presentSettings(plan: Plan): PlanView['settings'] {
  return {
    name: plan.name,
    shoreId: plan.shoreId,
    pattern: plan.pattern,
    fromOn: plan.fromOn,
    toOn: plan.toOn,
    minutesBeforeLow: plan.minutesBeforeLow,
    minutesAfterLow: plan.minutesAfterLow,
    daylightMarginMinutes: plan.daylightMarginMinutes,
    minimumMinutes: plan.minimumMinutes,
    earliestClock: plan.earliestClock,
    latestClock: plan.latestClock,
    lowestLevelM: plan.lowestLevelM,
    slots: plan.slots.map(({ slotKindId, count }) => ({ slotKindId, count })),
    exceptions: plan.exceptions.map(({ on, kind, reason }) => ({ on, kind, reason })),
  };
}

export function presentPlans(
  plans: readonly { readonly plan: Plan; readonly sentence: string }[],
  shores: readonly Shore[],
  slotKinds: readonly { readonly id: SlotKindId; readonly name: string }[],
  today: CalendarDay,
): z.input<typeof seePlans.reply> {
  return {
    plans: plans.map(({ plan, sentence }) => ({
      id: plan.id,
      name: plan.name,
      shoreName: shores.find(({ id }) => id === plan.shoreId)?.name ?? '',
      sentence,
      fromOn: plan.fromOn,
      toOn: plan.toOn,
      made: plan.sessions.length,
      published: plan.sessions.filter(({ state }) => state !== 'draft').length,
    })),
    shores: shores.map((shore) => ({
      id: shore.id,
      name: shore.name,
      zone: shore.zone,
      workingLevelM: shore.workingLevelM,
      minutesBeforeLow: shore.minutesBeforeLow,
      minutesAfterLow: shore.minutesAfterLow,
      daylightMarginMinutes: shore.daylightMarginMinutes,
      minimumMinutes: shore.minimumMinutes,
      earliestClock: shore.earliestClock,
      latestClock: shore.latestClock,
    })),
    slotKinds: slotKinds.map(({ id, name }) => ({ id, name })),
    today,
  };
}
