import type { AppContext, Tx } from '#backend/app-context.ts';
import { databaseError } from '#backend/database/transaction.ts';
import { Problem } from '#backend/http/problem.ts';
import type { Actor } from '#backend/http/route.ts';
import { mayAcceptTable } from '#shared/domain/tides/official-table-acceptance.ts';
import type { TrailEntry } from '#shared/domain/trail/trail-line.ts';
import type { SessionId, TideTableId } from '#shared/kernel/ids.ts';
import { toIso } from '#shared/kernel/time.ts';
import { readTable } from './read-table.ts';
import type { TableMove, TableWish } from './read-table.ts';
import { sayAcceptance } from './say-table.ts';
import { insertTable, markTakenBack, moveToWindow } from './tide-tables.repository.ts';

/**
 * Puts an official table in force for its station, and gives those sessions the table's times that
 * the person confirmed. All or nothing: a session whose crew would then clash refuses the whole.
 */
export async function acceptTable(
  ctx: AppContext,
  actor: Actor,
  wish: TableWish & {
    readonly leavesOutProblems: boolean;
    readonly movesSessionIds: readonly SessionId[];
  },
): Promise<{ readonly id: TideTableId; readonly moved: number }> {
  return refusingClashes(() =>
    ctx.inTransaction(async (tx) => {
      const read = await readTable(ctx, tx, wish);
      const verdict = mayAcceptTable({ ...read, leavesOutProblems: wish.leavesOutProblems });
      if (!verdict.isGranted) throw new Problem('table-refused', sayAcceptance(verdict.reasons[0]));
      const { events } = verdict.value;
      const id = ctx.newId<TideTableId>();
      await insertTable(tx, {
        id,
        stationId: wish.stationId,
        name: wish.name,
        zone: wish.zone,
        firstAt: new Date(events[0]?.at ?? 0),
        lastAt: new Date(events.at(-1)?.at ?? 0),
        events: events.map(({ at, kind, heightM }) => [at, kind, heightM] as const),
        acceptedAt: new Date(ctx.clock.now()),
        acceptedBy: actor.personId,
        takenBackAt: null,
      });
      const chosen = read.moves.filter(({ session }) => wish.movesSessionIds.includes(session.id));
      const lines = await moveSessions(tx, actor, chosen);
      await ctx.recordTrail(
        tx,
        {
          actorId: actor.personId,
          action: 'tide-table.accepted',
          recordKind: 'tide-table',
          recordId: id,
          details: { stationId: wish.stationId, zone: wish.zone, events: events.length },
        },
        ...lines,
      );
      return { id, moved: lines.length };
    }),
  );
}

async function moveSessions(
  tx: Tx,
  actor: Actor,
  moves: readonly TableMove[],
): Promise<TrailEntry[]> {
  const lines: TrailEntry[] = [];
  for (const { session, window } of moves) {
    if (window === null) continue;
    await moveToWindow(tx, session.id, window);
    lines.push({
      actorId: actor.personId,
      action: 'session.moved',
      recordKind: 'session',
      recordId: session.id,
      details: {
        lowWaterAt: toIso(window.lowWaterAt),
        'lowWaterAt before': toIso(session.lowWaterAt),
      },
    });
  }
  return lines;
}

/** Takes a table out of force: the prediction counts again. Sessions keep their times. */
export async function takeBackTable(ctx: AppContext, actor: Actor, id: TideTableId): Promise<void> {
  await ctx.inTransaction(async (tx) => {
    const wasInForce = await markTakenBack(tx, id, new Date(ctx.clock.now()));
    if (!wasInForce) throw new Problem('not-found', 'There is no such table in force');
    await ctx.recordTrail(tx, {
      actorId: actor.personId,
      action: 'tide-table.taken-back',
      recordKind: 'tide-table',
      recordId: id,
      details: {},
    });
  });
}

const clashes: Readonly<Record<string, string>> = {
  tide_table_one_at_a_time:
    'Another table is in force for some of these days. Take that back first.',
  claim_no_overlap:
    'Moved so, somebody would be on two sessions at once. Leave that session where it is.',
  claim_evidence_covers_session:
    'Moved so, somebody of a crew would no longer be current. Leave that session where it is.',
};

async function refusingClashes<Result>(work: () => Promise<Result>): Promise<Result> {
  try {
    return await work();
  } catch (error) {
    const sentence = clashes[databaseError(error)?.constraint ?? ''];
    if (sentence === undefined) throw error;
    throw new Problem('table-refused', sentence);
  }
}
