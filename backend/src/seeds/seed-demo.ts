import type { AppContext, Tx } from '#backend/app-context.ts';
import { AwardEntity, CompetencyEntity } from '#backend/database/entities/competency.entity.ts';
import { PersonRoleEntity } from '#backend/database/entities/person-role.entity.ts';
import { PersonEntity } from '#backend/database/entities/person.entity.ts';
import { SessionEntity, SlotEntity } from '#backend/database/entities/session.entity.ts';
import { ShoreEntity } from '#backend/database/entities/shore.entity.ts';
import {
  SlotKindEntity,
  SlotKindRequirementEntity,
} from '#backend/database/entities/slot-kind.entity.ts';
import { hasPeople } from '#backend/features/account/account.reader.ts';
import { claimSlot } from '#backend/features/slots/claim-slot.ts';
import { demoPeople } from '#shared/demo/demo-people.ts';
import { astronomicalRange } from '#shared/domain/tides/astronomical-range.ts';
import { windowOn } from '#shared/domain/tides/shore-water.ts';
import type { WorkingWindow } from '#shared/domain/tides/working-window.ts';
import type { TrailEntry } from '#shared/domain/trail/trail-line.ts';
import type {
  AwardId,
  CompetencyId,
  PersonId,
  SessionId,
  ShoreId,
  SlotId,
  SlotKindId,
} from '#shared/kernel/ids.ts';
import type { CalendarDay } from '#shared/kernel/time.ts';
import { addDays, addMonths, dayAt, daysBetween, yearOf } from '#shared/kernel/time.ts';
import type { Role } from '#shared/policy/policy.ts';
import {
  demoCompetencies,
  demoCrew,
  demoShores,
  demoSlotKinds,
  demoTideStationId,
  demoZone,
} from './demo-group.ts';

const daysAhead = 48;
const sessionsWanted = 10;
/** Of the sessions in order: the first that Callum's tide safety no longer reaches. */
const firstBeyondTideSafety = 4;
const slotsOfSession = ['Shore leader', 'Back marker', 'Pool guide', 'Pool guide'];

interface Person {
  readonly id: PersonId;
  readonly name: string;
}

interface SeededSession {
  readonly id: SessionId;
  readonly dayOn: CalendarDay;
  readonly slots: readonly { readonly id: SlotId; readonly kind: string }[];
}

/**
 * Fills an empty database with the demo group, dated from today so that it never goes stale:
 * people, shores, sessions at real low waters, awards of which some lapse soon, and claims made
 * by the use case itself. With anybody in the group already, nothing happens.
 */
export async function seedDemo(ctx: AppContext): Promise<void> {
  if (await ctx.reading(hasPeople)) return;
  const { people, sessions } = await ctx.inTransaction((tx) => seedGroup(ctx, tx));
  await seedClaims(ctx, people, sessions);
}

async function seedGroup(ctx: AppContext, tx: Tx) {
  const todayOn = dayAt(ctx.clock.now(), demoZone);
  const trail: TrailEntry[] = [];
  const made = <Id extends string>(recordKind: string): Id => {
    const id = ctx.newId<Id>();
    trail.push({
      actorId: null,
      action: `${recordKind}.made`,
      recordKind,
      recordId: id,
      details: {},
    });
    return id;
  };
  const people = await seedPeople(ctx, tx, made);
  const competencyIds = await seedCompetencies(tx, made);
  const kindIds = await seedSlotKinds(ctx, tx, made, competencyIds);
  const sessions = await seedSessions(ctx, tx, made, kindIds, todayOn);
  await seedAwards(ctx, tx, made, people, competencyIds, sessions, todayOn);
  await ctx.recordTrail(tx, ...trail);
  return { people, sessions };
}

type Made = <Id extends string>(recordKind: string) => Id;

async function seedPeople(ctx: AppContext, tx: Tx, made: Made): Promise<readonly Person[]> {
  const createdAt = new Date(ctx.clock.now());
  const adultBornOn: CalendarDay = '1985-06-15';
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
  const people: Person[] = [];
  for (const { name, email, bornOn, roles, state } of [...signIns, ...crew]) {
    const id = made<PersonId>('person');
    await tx.insert(PersonEntity, {
      id,
      name,
      email,
      bornOn,
      state,
      oidcIssuer: null,
      oidcSubject: null,
      createdAt,
    });
    for (const role of roles) {
      if (role !== 'volunteer') await tx.insert(PersonRoleEntity, { personId: id, role });
    }
    people.push({ id, name });
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
      const competencyId = known(competencyIds, required);
      await tx.insert(SlotKindRequirementEntity, { slotKindId: id, competencyId, addedAt });
    }
    ids.set(name, id);
  }
  return ids;
}

async function seedSessions(
  ctx: AppContext,
  tx: Tx,
  made: Made,
  kindIds: ReadonlyMap<string, SlotKindId>,
  todayOn: CalendarDay,
): Promise<readonly SeededSession[]> {
  const tide = await ctx.tides.at(demoTideStationId);
  if (tide === null) throw new Error(`The tide station ${demoTideStationId} cannot be used`);
  const { lowestM, highestM } = astronomicalRange(tide.curve, yearOf(todayOn));
  const shores: { readonly id: ShoreId; readonly rules: (typeof demoShores)[number] }[] = [];
  for (const [position, rules] of demoShores.entries()) {
    const id = made<ShoreId>('shore');
    await tx.insert(ShoreEntity, {
      ...rules,
      id,
      position,
      zone: demoZone,
      tideStationId: demoTideStationId,
      lowestTideM: lowestM,
      highestTideM: highestM,
    });
    shores.push({ id, rules });
  }
  const sessions: SeededSession[] = [];
  for (let ahead = 1; ahead <= daysAhead && sessions.length < sessionsWanted; ahead += 1) {
    const dayOn = addDays(todayOn, ahead);
    const shore = shores[sessions.length % shores.length];
    if (shore === undefined) break;
    const window = windowOn({ ...shore.rules, zone: demoZone }, tide.curve, dayOn);
    if (!window.isGranted) continue;
    const session = { id: made<SessionId>('session'), shoreId: shore.id, dayOn };
    sessions.push(await seedSession(ctx, tx, session, window.value, kindIds));
  }
  return sessions;
}

async function seedSession(
  ctx: AppContext,
  tx: Tx,
  session: { readonly id: SessionId; readonly shoreId: ShoreId; readonly dayOn: CalendarDay },
  window: WorkingWindow,
  kindIds: ReadonlyMap<string, SlotKindId>,
): Promise<SeededSession> {
  const { id, shoreId, dayOn } = session;
  await tx.insert(SessionEntity, {
    id,
    kind: 'shore',
    title: 'Rock pool families',
    state: 'published',
    shoreId,
    zone: demoZone,
    meetsAt: new Date(window.crewMeetsAt),
    partyMeetsAt: new Date(window.partyMeetsAt),
    startsAt: new Date(window.startsAt),
    endsAt: new Date(window.endsAt),
    lowWaterAt: new Date(window.lowWaterAt),
    lowWaterHeightM: window.lowWaterHeightM,
    lowerShoreClearBy: new Date(window.lowerShoreClearBy),
    offTheShoreBy: new Date(window.offTheShoreBy),
    madeAt: new Date(ctx.clock.now()),
  });
  const slots = [];
  for (const [position, kind] of slotsOfSession.entries()) {
    const slot = { id: ctx.newId<SlotId>(), kind };
    await tx.insert(SlotEntity, {
      id: slot.id,
      sessionId: id,
      slotKindId: known(kindIds, kind),
      position,
    });
    slots.push(slot);
  }
  return { id, dayOn, slots };
}

/**
 * Everybody is current well beyond the season, but for Callum: his tide safety and his first aid
 * lapse on the way, so that he may lead the first sessions and is refused the later ones.
 */
async function seedAwards(
  ctx: AppContext,
  tx: Tx,
  made: Made,
  people: readonly Person[],
  competencyIds: ReadonlyMap<string, CompetencyId>,
  sessions: readonly SeededSession[],
  todayOn: CalendarDay,
): Promise<void> {
  const holders = new Map<string, readonly string[]>([
    [
      'Callum Marrack',
      ['Tide safety', 'First aid outdoors', 'Safeguarding', 'Shore leading', 'Pool guiding'],
    ],
    ['Ines Thackeray', ['Safeguarding', 'Pool guiding']],
    ['Wei-Ling Foo', ['Tide safety', 'First aid outdoors', 'Safeguarding', 'Pool guiding']],
    ['Dorothy Ashdown', ['Safeguarding']],
    ...demoCrew.map(({ name, holds }) => [name, holds] as const),
  ]);
  const beyond = sessions[firstBeyondTideSafety]?.dayOn ?? addDays(todayOn, daysAhead);
  const lapsing = new Map<string, CalendarDay>([
    ['Tide safety', addDays(beyond, -6)],
    ['First aid outdoors', addDays(beyond, -1)],
  ]);
  for (const { id: personId, name } of people) {
    for (const [index, competencyName] of (holders.get(name) ?? []).entries()) {
      const competency = demoCompetencies.find((one) => one.name === competencyName);
      const months = competency?.validityMonths ?? null;
      const later = addDays(todayOn, 200 + index * 40);
      const planned = name === 'Callum Marrack' ? (lapsing.get(competencyName) ?? later) : later;
      const expiresOn = planned < todayOn ? addDays(todayOn, 1) : planned;
      const validFrom =
        months === null ? addMonths(todayOn, -14) : addMonths(addDays(expiresOn, 1), -months);
      if (daysBetween(validFrom, todayOn) < 0) throw new Error('An award begins after today');
      await tx.insert(AwardEntity, {
        id: made<AwardId>('award'),
        personId,
        competencyId: known(competencyIds, competencyName),
        validFrom,
        expiresOn: months === null ? null : expiresOn,
        confirmedBy: null,
        confirmedAt: new Date(ctx.clock.now()),
        withdrawnOn: null,
      });
    }
  }
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
  [3, 3, 'Mele Tupou'],
  [4, 2, 'Joss Whitlock'],
  [5, 0, 'Amara Nwosu'],
  [5, 1, 'Mele Tupou'],
  [5, 2, 'Hana Dvorská'],
  [6, 0, 'Idris Calloway'],
  [7, 1, 'Maren Kjelstad'],
];

async function seedClaims(
  ctx: AppContext,
  people: readonly Person[],
  sessions: readonly SeededSession[],
): Promise<void> {
  for (const [sessionIndex, slotIndex, name] of claims) {
    const slot = sessions[sessionIndex]?.slots[slotIndex];
    const person = people.find((one) => one.name === name);
    if (slot === undefined || person === undefined) continue;
    await claimSlot(ctx, { personId: person.id, name, roles: ['volunteer'] }, slot.id);
  }
}

function known<Name extends string, Id>(ids: ReadonlyMap<Name, Id>, name: Name): Id {
  const id = ids.get(name);
  if (id === undefined) throw new Error(`The demo group has no ${name}`);
  return id;
}
