import type { AppContext } from '#backend/app-context.ts';
import { AwardEntity, CompetencyEntity } from '#backend/database/entities/competency.entity.ts';
import { PersonRoleEntity } from '#backend/database/entities/person-role.entity.ts';
import { PersonEntity } from '#backend/database/entities/person.entity.ts';
import { SessionEntity, SlotEntity } from '#backend/database/entities/session.entity.ts';
import { ShoreEntity } from '#backend/database/entities/shore.entity.ts';
import type { ShoreRow } from '#backend/database/entities/shore.entity.ts';
import {
  SlotKindEntity,
  SlotKindRequirementEntity,
} from '#backend/database/entities/slot-kind.entity.ts';
import type { PersonRow } from '#backend/database/entities/person.entity.ts';
import type { SessionRow } from '#backend/database/entities/session.entity.ts';
import type { Tx } from '#backend/database/transaction.ts';
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
import { instantOf } from '#shared/kernel/time.ts';
import type { Role } from '#shared/policy/policy.ts';

const longAgo = new Date('2020-01-01T00:00:00Z');
const minuteMs = 60_000;

/** Records that a test begins with, each with its line on the trail. */
export function given(ctx: AppContext) {
  const write = async (recordKind: string, recordId: string, work: (tx: Tx) => Promise<unknown>) =>
    ctx.inTransaction(async (tx) => {
      await work(tx);
      await ctx.recordTrail(tx, {
        actorId: null,
        action: `${recordKind}.given`,
        recordKind,
        recordId,
        details: {},
      });
    });
  let count = 0;
  const next = (): number => (count += 1);

  return {
    async person(
      more: Partial<PersonRow> & { readonly roles?: readonly Exclude<Role, 'volunteer'>[] } = {},
    ): Promise<PersonId> {
      const { roles = [], ...row } = more;
      const id = ctx.newId<PersonId>();
      await write('person', id, async (tx) => {
        await tx.insert(PersonEntity, {
          id,
          name: `Person ${next()}`,
          email: `${id}@example.org`,
          bornOn: '1980-01-01',
          state: 'active',
          oidcIssuer: null,
          oidcSubject: null,
          createdAt: longAgo,
          ...row,
        });
        for (const role of roles) await tx.insert(PersonRoleEntity, { personId: id, role });
      });
      return id;
    },

    async competency(name = `Competency ${next()}`): Promise<CompetencyId> {
      const id = ctx.newId<CompetencyId>();
      await write('competency', id, (tx) =>
        tx.insert(CompetencyEntity, {
          id,
          name,
          position: next(),
          validityMonths: 24,
          noticeDays: 90,
          howToGet: `How to get ${name}`,
        }),
      );
      return id;
    },

    async slotKind(
      requires: readonly CompetencyId[] = [],
      more: { readonly name?: string; readonly isFor18AndOver?: boolean } = {},
    ): Promise<SlotKindId> {
      const id = ctx.newId<SlotKindId>();
      await write('slot-kind', id, async (tx) => {
        const { name = `Slot kind ${next()}`, isFor18AndOver = false } = more;
        await tx.insert(SlotKindEntity, { id, name, position: next(), isFor18AndOver });
        for (const competencyId of requires) {
          await tx.insert(SlotKindRequirementEntity, {
            slotKindId: id,
            competencyId,
            addedAt: longAgo,
          });
        }
      });
      return id;
    },

    async award(
      personId: PersonId,
      competencyId: CompetencyId,
      validFrom: CalendarDay,
      expiresOn: CalendarDay | null,
    ): Promise<AwardId> {
      const id = ctx.newId<AwardId>();
      await write('award', id, (tx) =>
        tx.insert(AwardEntity, {
          id,
          personId,
          competencyId,
          validFrom,
          expiresOn,
          confirmedBy: null,
          confirmedAt: longAgo,
          withdrawnOn: null,
        }),
      );
      return id;
    },

    async shore(name = `Shore ${next()}`, more: Partial<ShoreRow> = {}): Promise<ShoreId> {
      const id = ctx.newId<ShoreId>();
      await write('shore', id, (tx) =>
        tx.insert(ShoreEntity, {
          id,
          name,
          position: next(),
          zone: 'Europe/London',
          latitude: 54.7,
          longitude: -0.2,
          tideStationId: 'ticon/whitby-whi-gbr-bodc',
          lowestTideM: 0,
          highestTideM: 6.1,
          workingLevelM: 2,
          cutOffLevelM: 3,
          minutesBeforeLow: 120,
          minutesAfterLow: 30,
          daylightMarginMinutes: 30,
          minimumMinutes: 90,
          earliestClock: '07:00',
          latestClock: '19:00',
          crewMeetsMinutes: 45,
          partyMeetsMinutes: 20,
          meetingPlace: 'At the gate',
          ...more,
        }),
      );
      return id;
    },

    /** A published shore session on a day, from 08:22 to 10:52 with low water at 10:22. */
    async session(
      shoreId: ShoreId,
      on: CalendarDay,
      slotKinds: readonly SlotKindId[],
      more: Partial<SessionRow> & { readonly laterMinutes?: number } = {},
    ): Promise<{ readonly id: SessionId; readonly slots: readonly SlotId[] }> {
      const { laterMinutes = 0, ...row } = more;
      const lowWaterAt = instantOf(on, '10:22', 'Europe/London') + laterMinutes * minuteMs;
      const at = (minutes: number): Date => new Date(lowWaterAt + minutes * minuteMs);
      const id = ctx.newId<SessionId>();
      const slots: SlotId[] = [];
      await write('session', id, async (tx) => {
        await tx.insert(SessionEntity, {
          id,
          kind: 'shore',
          title: 'Sunday families',
          state: 'published',
          shoreId,
          zone: 'Europe/London',
          meetsAt: at(-165),
          partyMeetsAt: at(-140),
          startsAt: at(-120),
          endsAt: at(30),
          lowWaterAt: at(0),
          lowWaterHeightM: 0.6,
          lowerShoreClearBy: at(0),
          offTheShoreBy: at(30),
          madeAt: longAgo,
          ...row,
        });
        for (const [position, slotKindId] of slotKinds.entries()) {
          const slotId = ctx.newId<SlotId>();
          await tx.insert(SlotEntity, { id: slotId, sessionId: id, slotKindId, position });
          slots.push(slotId);
        }
      });
      return { id, slots };
    },
  };
}
