import type { AppContext } from '#backend/app-context.ts';
import {
  readNextShoreSession,
  readSessionsBetween,
} from '#backend/features/sessions/sessions.reader.ts';
import type { Session } from '#backend/features/sessions/sessions.reader.ts';
import { readShores } from '#backend/features/shores/shores.reader.ts';
import type { Shore } from '#backend/features/shores/shores.reader.ts';
import { readShoreTide } from '#backend/features/tides/tides.reader.ts';
import type { ShoreTide } from '#backend/features/tides/tides.reader.ts';
import { extremesOn, tideMarks } from '#shared/domain/tides/shore-water.ts';
import type { TideMark } from '#shared/domain/tides/shore-water.ts';
import type { TideHeight } from '#shared/domain/tides/tide-curve.ts';
import type { Instant } from '#shared/kernel/time.ts';
import { addDays, dayAt, startOfDay } from '#shared/kernel/time.ts';

const fortnightDays = 14;
const fortnightStepMinutes = 30;
const dayStepMinutes = 20;

/** What anybody may see before signing in. */
export interface FrontDoorSeen {
  readonly shores: readonly Shore[];
  readonly next: {
    readonly session: Session;
    readonly shore: Shore;
    readonly curve: readonly TideHeight[];
  } | null;
  readonly fortnight: {
    readonly shore: Shore;
    readonly tide: ShoreTide;
    readonly curve: readonly TideHeight[];
    readonly sessions: readonly Session[];
    readonly marks: readonly (TideMark & { readonly at: Instant })[];
  } | null;
}

/** The group's shores, the next open session, and a fortnight of water at the home shore. */
export async function seeFrontDoor(ctx: AppContext): Promise<FrontDoorSeen> {
  const now = ctx.clock.now();
  const { shores, session } = await ctx.reading(async (read) => ({
    shores: await readShores(read),
    session: await readNextShoreSession(read, now),
  }));
  const home = shores[0];
  return {
    shores,
    next: session === null ? null : await nextSession(ctx, shores, session),
    fortnight: home === undefined ? null : await fortnight(ctx, home, now),
  };
}

async function nextSession(
  ctx: AppContext,
  shores: readonly Shore[],
  session: Session,
): Promise<FrontDoorSeen['next']> {
  const shore = shores.find(({ id }) => id === session.shoreId);
  const tide =
    shore === undefined ? null : await ctx.reading((read) => readShoreTide(ctx.tides, read, shore));
  if (shore === undefined || tide === null) return null;
  const fromAt = startOfDay(session.firstDayOn, session.zone);
  const toAt = startOfDay(addDays(session.firstDayOn, 1), session.zone);
  return { session, shore, curve: tide.curve.series(fromAt, toAt, dayStepMinutes) };
}

async function fortnight(
  ctx: AppContext,
  shore: Shore,
  now: Instant,
): Promise<FrontDoorSeen['fortnight']> {
  const tide = await ctx.reading((read) => readShoreTide(ctx.tides, read, shore));
  if (tide === null) return null;
  const fromOn = dayAt(now, shore.zone);
  const toOn = addDays(fromOn, fortnightDays - 1);
  const sessions = await ctx.reading((read) => readSessionsBetween(read, fromOn, toOn, false));
  const highOf = (mark: TideMark): Instant =>
    extremesOn(tide.curve, mark.on, shore.zone).find(({ kind }) => kind === 'high')?.at ??
    startOfDay(mark.on, shore.zone);
  return {
    shore,
    tide,
    curve: tide.curve.series(
      startOfDay(fromOn, shore.zone),
      startOfDay(addDays(toOn, 1), shore.zone),
      fortnightStepMinutes,
    ),
    sessions: sessions.filter(({ kind, state }) => kind === 'shore' && state === 'published'),
    marks: tideMarks(tide.curve, fromOn, toOn, shore.zone).map((mark) => ({
      ...mark,
      at: highOf(mark),
    })),
  };
}
