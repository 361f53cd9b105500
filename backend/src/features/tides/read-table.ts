import type { AppContext } from '#backend/app-context.ts';
import type { Read } from '#backend/database/transaction.ts';
import { readPlan, windowRulesOf } from '#backend/features/seasons/seasons.reader.ts';
import { readShores } from '#backend/features/shores/shores.reader.ts';
import type { Shore } from '#backend/features/shores/shores.reader.ts';
import { Problem } from '#backend/http/problem.ts';
import type { StationFacts } from '#backend/platform/tides/tide-stations.ts';
import { narrowedRules, windowTakenByHand } from '#shared/domain/seasons/plan-window.ts';
import { curveWithDifferences } from '#shared/domain/tides/differences.ts';
import { compareWithPrediction } from '#shared/domain/tides/official-table-comparison.ts';
import type { TableComparison } from '#shared/domain/tides/official-table-comparison.ts';
import { curveByTable } from '#shared/domain/tides/official-table-curve.ts';
import { sessionsMovedBy } from '#shared/domain/tides/official-table-sessions.ts';
import type { MovedSession } from '#shared/domain/tides/official-table-sessions.ts';
import { readOfficialTable } from '#shared/domain/tides/official-table.ts';
import type {
  DateOrder,
  HeightUnit,
  OfficialTable,
  TableRefusal,
  TableZone,
} from '#shared/domain/tides/official-table-reading.ts';
import type { ShoreRules } from '#shared/domain/tides/shore-water.ts';
import type { TideCurve } from '#shared/domain/tides/tide-curve.ts';
import type { WorkingWindow } from '#shared/domain/tides/working-window.ts';
import type { SessionId } from '#shared/kernel/ids.ts';
import type { Verdict } from '#shared/kernel/result.ts';
import { dayAt } from '#shared/kernel/time.ts';
import { readStationTide } from './tides.reader.ts';
import { readSessionsAtLow } from './tide-tables.repository.ts';
import type { SessionAtLow } from './tide-tables.repository.ts';

/** What is uploaded or pasted, and what a person says about it. */
export interface TableWish {
  readonly stationId: string;
  readonly name: string;
  readonly zone: string;
  readonly units: HeightUnit | null;
  readonly dateOrder: DateOrder | null;
  readonly year: number | null;
  readonly text: string;
}

/** A session whose low water the table would move, with the window that it would then have. */
export interface TableMove {
  readonly session: SessionAtLow;
  readonly shore: Shore;
  readonly moved: MovedSession<SessionId>;
  /** Null where no working window is left: the session then keeps its times. */
  readonly window: WorkingWindow | null;
}

/** A table as it was read, what it is held against, and what it would move. */
export interface TableRead {
  readonly station: StationFacts;
  readonly zone: TableZone;
  readonly table: Verdict<OfficialTable, TableRefusal>;
  readonly comparison: TableComparison | null;
  readonly moves: readonly TableMove[];
}

const fewestEvents = 4;

/** Reads a table and works out what it would change; writes nothing. */
export async function readTable(ctx: AppContext, read: Read, wish: TableWish): Promise<TableRead> {
  const predicted = await ctx.tides.at(wish.stationId);
  if (predicted === null) throw refuseField('stationId', 'This tide station cannot be used.');
  const zone = tableZone(wish.zone);
  const table = readOfficialTable(wish.text, {
    zone,
    units: wish.units ?? undefined,
    dateOrder: wish.dateOrder ?? undefined,
    year: wish.year ?? undefined,
  });
  const { station } = predicted;
  if (!table.isGranted || table.value.events.length < fewestEvents) {
    return { station, zone, table, comparison: null, moves: [] };
  }
  const { events } = table.value;
  return {
    station,
    zone,
    table,
    comparison: compareWithPrediction(events, predicted.curve),
    moves: await movesBy(ctx, read, station, events),
  };
}

/** 'UTC', an IANA zone, or a fixed offset such as +01:00 as minutes ahead of UTC. */
export function tableZone(zone: string): TableZone {
  const offset = /^([+-])(\d{2}):([0-5]\d)$/.exec(zone);
  if (offset === null) return zone;
  const minutes = Number(offset[2]) * 60 + Number(offset[3]);
  return offset[1] === '-' ? -minutes : minutes;
}

async function movesBy(
  ctx: AppContext,
  read: Read,
  station: StationFacts,
  events: OfficialTable['events'],
): Promise<readonly TableMove[]> {
  const now = await readStationTide(ctx.tides, read, station.id);
  const first = events[0];
  const last = events.at(-1);
  if (now === null || first === undefined || last === undefined) return [];
  const bent = curveByTable(now.curve, events);
  const shores = (await readShores(read)).filter(
    ({ tideStationId }) => tideStationId === station.id,
  );
  const fromAt = Math.max(first.at, ctx.clock.now());
  const moves: TableMove[] = [];
  for (const shore of shores) {
    const before = atShore(now.curve, shore);
    const after = atShore(bent, shore);
    const sessions = await readSessionsAtLow(read, [shore.id], fromAt, last.at);
    for (const moved of sessionsMovedBy(sessions, before, after)) {
      const session = sessions.find(({ id }) => id === moved.id);
      if (session === undefined) continue;
      const window = await windowAfter(read, shore, after, session, moved);
      moves.push({ session, shore, moved, window });
    }
  }
  return moves;
}

function atShore(curve: TideCurve, { differences }: Shore): TideCurve {
  const { high, low } = differences;
  const isSame = [high, low].every(
    ({ laterMinutes, heightFactor, higherM }) =>
      laterMinutes === 0 && heightFactor === 1 && higherM === 0,
  );
  return isSame ? curve : curveWithDifferences(curve, differences);
}

/** The window that the session would have by the rules of its plan, else of its shore. */
async function windowAfter(
  read: Read,
  shore: Shore,
  curve: TideCurve,
  session: SessionAtLow,
  moved: MovedSession<SessionId>,
): Promise<WorkingWindow | null> {
  if (moved.newLowWaterAt === null) return null;
  const plan = session.seasonPlanId === null ? null : await readPlan(read, session.seasonPlanId);
  const rules: ShoreRules = plan === null ? shore : narrowedRules(shore, windowRulesOf(plan));
  const verdict = windowTakenByHand(rules, curve, dayAt(moved.newLowWaterAt, shore.zone));
  return verdict.isGranted ? verdict.value.window : null;
}

function refuseField(field: string, message: string): Problem {
  return new Problem('not-understood', 'The table cannot be read', {
    fields: [{ where: 'body', field, message }],
  });
}
