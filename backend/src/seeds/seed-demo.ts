import type { AppContext } from '#backend/app-context.ts';
import { hasPeople } from '#backend/features/account/account.reader.ts';
import { makeSessions } from '#backend/features/seasons/make-sessions.ts';
import { publishSessions } from '#backend/features/seasons/publish-sessions.ts';
import { keepPlan } from '#backend/features/seasons/save-plan.ts';
import type { PlanValues } from '#backend/features/seasons/seasons.reader.ts';
import { readSessionsBetween } from '#backend/features/sessions/sessions.reader.ts';
import { makeShore } from '#backend/features/shores/save-shore.ts';
import { claimSlot } from '#backend/features/slots/claim-slot.ts';
import { readSlotsOfSessions } from '#backend/features/slots/slots.reader.ts';
import type { Actor } from '#backend/http/route.ts';
import { demoPeople } from '#shared/demo/demo-people.ts';
import type { SessionId, ShoreId, SlotId, SlotKindId } from '#shared/kernel/ids.ts';
import type { CalendarDay } from '#shared/kernel/time.ts';
import { addDays, dayAt, weekdayOf } from '#shared/kernel/time.ts';
import { demoPlans, demoShores, demoZone, isSchoolHoliday } from './demo-group.ts';
import { seedAwards, seedPeopleAndSkills } from './seed-people.ts';
import type { SeededGroup } from './seed-people.ts';

const planFromDays = -21;
const planToDays = 182;
const claimableDays = 120;
/** Of both plans together, the first sessions ahead are published; the later ones are drafts. */
const publishedSessions = 14;

/** A published session ahead, with its slots in order. */
export interface SeededSession {
  readonly id: SessionId;
  readonly dayOn: CalendarDay;
  readonly slots: readonly SlotId[];
}

/**
 * Fills an empty database with the demo group, dated from today so that it never goes stale:
 * people, shores, two season plans at real low waters, awards of which some lapse soon, and claims.
 * What has a use case is made by it. With anybody in the group already, nothing happens.
 */
export async function seedDemo(ctx: AppContext): Promise<void> {
  if (await ctx.reading(hasPeople)) return;
  const group = await seedPeopleAndSkills(ctx);
  const coordinator = actorNamed(group, demoPeople[0].name);
  const shoreIds = new Map<string, ShoreId>();
  for (const shore of demoShores) {
    shoreIds.set(shore.name, await makeShore(ctx, coordinator, shore));
  }
  const sessions = await seedPlans(ctx, coordinator, group.slotKindIds, shoreIds);
  await seedAwards(ctx, group, sessions);
  await seedClaims(ctx, group, sessions);
}

async function seedPlans(
  ctx: AppContext,
  coordinator: Actor,
  slotKindIds: ReadonlyMap<string, SlotKindId>,
  shoreIds: ReadonlyMap<string, ShoreId>,
): Promise<readonly SeededSession[]> {
  const todayOn = dayAt(ctx.clock.now(), demoZone);
  const planIds = [];
  for (const plan of demoPlans) {
    const values = planValues(plan, todayOn, slotKindIds, known(shoreIds, plan.shoreName));
    const planId = await keepPlan(ctx, coordinator, values);
    await makeSessions(ctx, coordinator, planId);
    planIds.push(planId);
  }
  const ahead = await ctx.reading((read) =>
    readSessionsBetween(read, addDays(todayOn, 1), addDays(todayOn, claimableDays), true),
  );
  const published = ahead.slice(0, publishedSessions);
  for (const planId of planIds) {
    await publishSessions(
      ctx,
      coordinator,
      planId,
      published.map(({ id }) => id),
    );
  }
  const slots = await ctx.reading((read) =>
    readSlotsOfSessions(
      read,
      published.map(({ id }) => id),
    ),
  );
  return published.map(({ id, firstDayOn }) => ({
    id,
    dayOn: firstDayOn,
    slots: slots.filter(({ session }) => session.id === id).map((slot) => slot.id),
  }));
}

function planValues(
  plan: (typeof demoPlans)[number],
  todayOn: CalendarDay,
  slotKindIds: ReadonlyMap<string, SlotKindId>,
  shoreId: ShoreId,
): PlanValues {
  const fromOn = addDays(todayOn, planFromDays);
  const toOn = addDays(todayOn, planToDays);
  const weekdays: readonly number[] = plan.weekdays;
  const exceptions: PlanValues['exceptions'][number][] = [];
  for (let on = fromOn; plan.isInTerm && on <= toOn; on = addDays(on, 1)) {
    if (weekdays.includes(weekdayOf(on)) && isSchoolHoliday(on)) {
      exceptions.push({ on, kind: 'skip', reason: 'School holidays' });
    }
  }
  return {
    name: plan.name,
    shoreId,
    pattern: plan.pattern,
    fromOn,
    toOn,
    minutesBeforeLow: 120,
    minutesAfterLow: 30,
    daylightMarginMinutes: 30,
    minimumMinutes: 90,
    earliestClock: plan.earliestClock,
    latestClock: plan.latestClock,
    lowestLevelM: null,
    slots: Object.entries(plan.slots).map(([name, count]) => ({
      slotKindId: known(slotKindIds, name),
      count,
    })),
    exceptions,
  };
}

/** Who takes which slot of which session, by their places in the lists; the rest are gaps. */
const claims: readonly (readonly [session: number, slot: number, name: string])[] = [
  [0, 0, 'Amara Nwosu'],
  [0, 1, 'Maren Kjelstad'],
  [0, 2, 'Hana Dvorská'],
  [0, 3, 'Joss Whitlock'],
  [1, 1, 'Mele Tupou'],
  [1, 2, 'Joss Whitlock'],
  [2, 0, 'Idris Calloway'],
  [2, 1, 'Maren Kjelstad'],
  [3, 1, 'Idris Calloway'],
  [3, 2, 'Hana Dvorská'],
  [4, 2, 'Joss Whitlock'],
  [5, 0, 'Amara Nwosu'],
  [5, 1, 'Mele Tupou'],
  [5, 2, 'Hana Dvorská'],
  [6, 0, 'Idris Calloway'],
  [7, 1, 'Maren Kjelstad'],
];

async function seedClaims(
  ctx: AppContext,
  group: SeededGroup,
  sessions: readonly SeededSession[],
): Promise<void> {
  for (const [sessionIndex, slotIndex, name] of claims) {
    const slotId = sessions[sessionIndex]?.slots[slotIndex];
    if (slotId !== undefined) await claimSlot(ctx, actorNamed(group, name), slotId);
  }
}

function actorNamed({ people }: SeededGroup, name: string): Actor {
  const person = people.find((one) => one.name === name);
  if (person === undefined) throw new Error(`The demo group has no ${name}`);
  return { personId: person.id, name, roles: ['volunteer'] };
}

function known<Id>(ids: ReadonlyMap<string, Id>, name: string): Id {
  const id = ids.get(name);
  if (id === undefined) throw new Error(`The demo group has no ${name}`);
  return id;
}
