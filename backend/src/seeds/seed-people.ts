import type { AppContext, Tx } from '#backend/app-context.ts';
import { AwardEntity, CompetencyEntity } from '#backend/database/entities/competency.entity.ts';
import { PersonRoleEntity } from '#backend/database/entities/person-role.entity.ts';
import { PersonEntity } from '#backend/database/entities/person.entity.ts';
import {
  SlotKindEntity,
  SlotKindRequirementEntity,
} from '#backend/database/entities/slot-kind.entity.ts';
import { demoPeople } from '#shared/demo/demo-people.ts';
import type { TrailEntry } from '#shared/domain/trail/trail-line.ts';
import type { AwardId, CompetencyId, PersonId, SlotKindId } from '#shared/kernel/ids.ts';
import type { CalendarDay } from '#shared/kernel/time.ts';
import { addDays, addMonths, dayAt } from '#shared/kernel/time.ts';
import type { Role } from '#shared/policy/policy.ts';
import { demoCompetencies, demoCrew, demoSlotKinds, demoZone } from './demo-group.ts';

/** Of the sessions ahead in order: the first that Callum's tide safety no longer reaches. */
const firstBeyondTideSafety = 4;
const adultBornOn: CalendarDay = '1985-06-15';

/** Who is in the demo group and what can be asked of them. */
export interface SeededGroup {
  readonly people: readonly { readonly id: PersonId; readonly name: string }[];
  readonly competencyIds: ReadonlyMap<string, CompetencyId>;
  readonly slotKindIds: ReadonlyMap<string, SlotKindId>;
}

/** Gives a new record its id and its line on the trail. */
type Made = <Id extends string>(recordKind: string) => Id;

/** People, competencies and slot kinds, in one transaction. */
export function seedPeopleAndSkills(ctx: AppContext): Promise<SeededGroup> {
  return withTrail(ctx, async (tx, made) => {
    const people = await seedPeople(ctx, tx, made);
    const competencyIds = await seedCompetencies(tx, made);
    const slotKindIds = await seedSlotKinds(ctx, tx, made, competencyIds);
    return { people, competencyIds, slotKindIds };
  });
}

function withTrail<Result>(
  ctx: AppContext,
  work: (tx: Tx, made: Made) => Promise<Result>,
): Promise<Result> {
  return ctx.inTransaction(async (tx) => {
    const trail: TrailEntry[] = [];
    const result = await work(tx, (recordKind) => {
      const recordId = ctx.newId();
      const action = `${recordKind}.made`;
      trail.push({ actorId: null, action, recordKind, recordId, details: {} });
      return recordId as never;
    });
    await ctx.recordTrail(tx, ...trail);
    return result;
  });
}

async function seedPeople(
  ctx: AppContext,
  tx: Tx,
  made: Made,
): Promise<readonly { readonly id: PersonId; readonly name: string }[]> {
  const createdAt = new Date(ctx.clock.now());
  const signIns = demoPeople.map(({ name, email, roles }) => ({
    name,
    email,
    bornOn: adultBornOn,
    roles: roles,
    state: 'invited' as const,
  }));
  const crew = demoCrew.map(({ name, email, bornOn }) => ({
    name,
    email,
    bornOn,
    roles: ['volunteer'] as readonly Role[],
    state: 'active' as const,
  }));
  const people: { id: PersonId; name: string }[] = [];
  for (const { roles, ...person } of [...signIns, ...crew]) {
    const id = made<PersonId>('person');
    await tx.insert(PersonEntity, {
      ...person,
      id,
      oidcIssuer: null,
      oidcSubject: null,
      createdAt,
    });
    for (const role of roles) {
      if (role !== 'volunteer') await tx.insert(PersonRoleEntity, { personId: id, role });
    }
    people.push({ id, name: person.name });
  }
  return people;
}

async function seedCompetencies(tx: Tx, made: Made): Promise<ReadonlyMap<string, CompetencyId>> {
  const ids = new Map<string, CompetencyId>();
  for (const [position, competency] of demoCompetencies.entries()) {
    const id = made<CompetencyId>('competency');
    await tx.insert(CompetencyEntity, { ...competency, id, position });
    ids.set(competency.name, id);
  }
  return ids;
}

async function seedSlotKinds(
  ctx: AppContext,
  tx: Tx,
  made: Made,
  competencyIds: ReadonlyMap<string, CompetencyId>,
): Promise<ReadonlyMap<string, SlotKindId>> {
  const addedAt = new Date(ctx.clock.now());
  const ids = new Map<string, SlotKindId>();
  for (const [position, { name, isFor18AndOver, requires }] of demoSlotKinds.entries()) {
    const id = made<SlotKindId>('slot-kind');
    await tx.insert(SlotKindEntity, { id, name, position, isFor18AndOver });
    for (const required of requires) {
      const competencyId = competencyIds.get(required);
      if (competencyId === undefined) throw new Error(`The demo group has no ${required}`);
      await tx.insert(SlotKindRequirementEntity, { slotKindId: id, competencyId, addedAt });
    }
    ids.set(name, id);
  }
  return ids;
}

/**
 * Everybody is current well beyond the season, but for Callum: his tide safety and his first aid
 * lapse on the way, so that he may lead the first sessions and is refused the later ones.
 */
export async function seedAwards(
  ctx: AppContext,
  { people, competencyIds }: SeededGroup,
  sessions: readonly { readonly dayOn: CalendarDay }[],
): Promise<void> {
  const todayOn = dayAt(ctx.clock.now(), demoZone);
  const beyond = sessions[firstBeyondTideSafety]?.dayOn ?? addDays(todayOn, 40);
  const lapsing = new Map<string, CalendarDay>([
    ['Tide safety', addDays(beyond, -6)],
    ['First aid outdoors', addDays(beyond, -1)],
  ]);
  const holders = new Map<string, readonly string[]>([
    ['Callum Marrack', demoCompetencies.map(({ name }) => name)],
    ['Ines Thackeray', ['Safeguarding', 'Pool guiding']],
    ['Wei-Ling Foo', ['Tide safety', 'First aid outdoors', 'Safeguarding', 'Pool guiding']],
    ['Dorothy Ashdown', ['Safeguarding']],
    ...demoCrew.map(({ name, holds }) => [name, holds] as const),
  ]);
  await withTrail(ctx, async (tx, made) => {
    for (const { id: personId, name } of people) {
      for (const [index, held] of (holders.get(name) ?? []).entries()) {
        const competencyId = competencyIds.get(held);
        const competency = demoCompetencies.find((one) => one.name === held);
        if (competencyId === undefined || competency === undefined) continue;
        const months = competency.validityMonths;
        const later = addDays(todayOn, 200 + index * 40);
        const lastDay = name === 'Callum Marrack' ? (lapsing.get(held) ?? later) : later;
        await tx.insert(AwardEntity, {
          id: made<AwardId>('award'),
          personId,
          competencyId,
          validFrom:
            months === null ? addMonths(todayOn, -14) : addMonths(addDays(lastDay, 1), -months),
          expiresOn: months === null ? null : lastDay,
          confirmedBy: null,
          confirmedAt: new Date(ctx.clock.now()),
          withdrawnOn: null,
        });
      }
    }
  });
}
