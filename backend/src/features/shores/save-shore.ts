import { readShoreRange } from '#backend/features/tides/tides.reader.ts';
import type { AppContext, Tx } from '#backend/app-context.ts';
import { databaseError } from '#backend/database/transaction.ts';
import { Problem } from '#backend/http/problem.ts';
import type { Actor } from '#backend/http/route.ts';
import type { ShoreId } from '#shared/kernel/ids.ts';
import { insertShore, lockShore, updateShore } from './shores.repository.ts';
import type { ShoreValues } from './shores.repository.ts';
import { readShore } from './shores.reader.ts';
import type { Shore } from './shores.reader.ts';

/** What a person sets up of a shore; the range of its tide follows from that. */
export type ShoreWish = Omit<ShoreValues, 'lowestTideM' | 'highestTideM'>;

/** Adds a shore; refused beside the field when its name is taken or its station cannot be used. */
export async function makeShore(ctx: AppContext, actor: Actor, wish: ShoreWish): Promise<ShoreId> {
  const values = await withRange(ctx, wish);
  return refusingTakenName(() =>
    ctx.inTransaction(async (tx) => {
      const id = ctx.newId<ShoreId>();
      await insertShore(tx, id, values);
      await recordChange(ctx, tx, actor, id, 'shore.made', wish, null);
      return id;
    }),
  );
}

/** Changes the settings of a shore. Sessions that are made keep their times. */
export async function changeShore(
  ctx: AppContext,
  actor: Actor,
  id: ShoreId,
  wish: ShoreWish,
): Promise<void> {
  const values = await withRange(ctx, wish);
  await refusingTakenName(() =>
    ctx.inTransaction(async (tx) => {
      await lockShore(tx, id);
      const before = await readShore(tx, id);
      if (before === null) throw new Problem('not-found', 'There is no such shore');
      await updateShore(tx, id, values);
      await recordChange(ctx, tx, actor, id, 'shore.changed', wish, before);
    }),
  );
}

/** The trail keeps the figures that changed, old and new; the words it only names. */
function recordChange(
  ctx: AppContext,
  tx: Tx,
  actor: Actor,
  id: ShoreId,
  action: string,
  wish: ShoreWish,
  before: Shore | null,
): Promise<void> {
  const figures = (values: ShoreWish) => ({
    zone: values.zone,
    latitude: values.latitude,
    longitude: values.longitude,
    tideStationId: values.tideStationId,
    highLaterMinutes: values.differences.high.laterMinutes,
    highHigherM: values.differences.high.higherM,
    lowLaterMinutes: values.differences.low.laterMinutes,
    lowHigherM: values.differences.low.higherM,
    workingLevelM: values.workingLevelM,
    cutOffLevelM: values.cutOffLevelM,
    minutesBeforeLow: values.minutesBeforeLow,
    minutesAfterLow: values.minutesAfterLow,
    daylightMarginMinutes: values.daylightMarginMinutes,
    minimumMinutes: values.minimumMinutes,
    earliestClock: values.earliestClock,
    latestClock: values.latestClock,
    crewMeetsMinutes: values.crewMeetsMinutes,
    partyMeetsMinutes: values.partyMeetsMinutes,
    ratioPreset: values.ratioPreset,
  });
  const now = figures(wish);
  const then = before === null ? null : figures(before);
  const details: Record<string, string | number | null> = {};
  for (const name of Object.keys(now) as (keyof typeof now)[]) {
    if (then !== null && then[name] === now[name]) continue;
    details[name] = now[name];
    if (then !== null) details[`${name} before`] = then[name];
  }
  return ctx.recordTrail(tx, {
    actorId: actor.personId,
    action,
    recordKind: 'shore',
    recordId: id,
    details,
  });
}

async function withRange(ctx: AppContext, wish: ShoreWish): Promise<ShoreValues> {
  const range = await readShoreRange(ctx.tides, wish);
  if (range === null) {
    throw new Problem('not-understood', 'The shore was not saved', {
      fields: [
        {
          where: 'body',
          field: 'tideStationId',
          message: 'This tide station cannot be used. Choose one of those offered.',
        },
      ],
    });
  }
  return { ...wish, ...range };
}

async function refusingTakenName<Result>(work: () => Promise<Result>): Promise<Result> {
  try {
    return await work();
  } catch (error) {
    if (databaseError(error)?.constraint !== 'shore_one_per_name') throw error;
    throw new Problem('not-understood', 'The shore was not saved', {
      fields: [{ where: 'body', field: 'name', message: 'Another shore has this name.' }],
    });
  }
}
