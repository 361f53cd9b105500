import type { AppContext } from '#backend/app-context.ts';
import { readShores } from '#backend/features/shores/shores.reader.ts';
import type { Shore } from '#backend/features/shores/shores.reader.ts';
import { readCrewFacts, readSlotsOfSessions } from '#backend/features/slots/slots.reader.ts';
import type { CrewFacts, SlotFacts } from '#backend/features/slots/slots.reader.ts';
import { readTrailOfSession } from '#backend/features/trail/trail.reader.ts';
import type { SessionTrailEntry } from '#backend/features/trail/trail.reader.ts';
import { Problem } from '#backend/http/problem.ts';
import type { Actor } from '#backend/http/route.ts';
import { readShoreTide } from '#backend/features/tides/tides.reader.ts';
import type { ShoreTide } from '#backend/features/tides/tides.reader.ts';
import { extremesOn } from '#shared/domain/tides/shore-water.ts';
import type { TideExtreme, TideHeight } from '#shared/domain/tides/tide-curve.ts';
import type { SessionId } from '#shared/kernel/ids.ts';
import { sunOn } from '#shared/kernel/sun.ts';
import type { SunDay } from '#shared/kernel/sun.ts';
import type { Instant } from '#shared/kernel/time.ts';
import { addDays, startOfDay } from '#shared/kernel/time.ts';
import { may } from '#shared/policy/policy.ts';
import { readSession } from './sessions.reader.ts';
import type { Session } from './sessions.reader.ts';

const curveStepMinutes = 6;

/** The water of one local day at a shore. */
export interface WaterOfDay {
  readonly tide: ShoreTide;
  readonly curve: readonly TideHeight[];
  readonly extremes: readonly TideExtreme[];
  readonly sun: SunDay;
}

/** Everything that the page of a session shows. */
export interface SessionSeen {
  readonly session: Session;
  readonly shore: Shore;
  readonly water: WaterOfDay | null;
  readonly slots: readonly SlotFacts[];
  readonly crew: CrewFacts;
  readonly trail: readonly SessionTrailEntry[];
  readonly now: Instant;
}

/** One session with its water, slots and trail. A draft is there for coordinators alone. */
export async function seeSession(
  ctx: AppContext,
  actor: Actor,
  sessionId: SessionId,
): Promise<SessionSeen> {
  const facts = await ctx.reading(async (read) => ({
    session: await readSession(read, sessionId),
    shores: await readShores(read),
    slots: await readSlotsOfSessions(read, [sessionId]),
    crew: await readCrewFacts(read, actor.personId),
    trail: await readTrailOfSession(read, sessionId),
  }));
  const { session, crew } = facts;
  const shore = facts.shores.find(({ id }) => id === session?.shoreId);
  const isHidden = session?.state === 'draft' && !may(actor.roles, 'session.see-drafts');
  if (session === null || shore === undefined || crew === null || isHidden) {
    throw new Problem('not-found', 'There is no such session');
  }
  return {
    session,
    shore,
    water: await waterOfDay(ctx, shore, session),
    slots: facts.slots,
    crew,
    trail: facts.trail,
    now: ctx.clock.now(),
  };
}

async function waterOfDay(
  ctx: AppContext,
  shore: Shore,
  session: Session,
): Promise<WaterOfDay | null> {
  const tide = await ctx.reading((read) => readShoreTide(ctx.tides, read, shore));
  if (tide === null) return null;
  const on = session.firstDayOn;
  return {
    tide,
    curve: tide.curve.series(
      startOfDay(on, shore.zone),
      startOfDay(addDays(on, 1), shore.zone),
      curveStepMinutes,
    ),
    extremes: extremesOn(tide.curve, on, shore.zone),
    sun: sunOn(on, shore.latitude, shore.longitude, shore.zone),
  };
}
