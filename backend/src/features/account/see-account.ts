import type { AppContext } from '#backend/app-context.ts';
import { readShores } from '#backend/features/shores/shores.reader.ts';
import type { Shore } from '#backend/features/shores/shores.reader.ts';
import { readShoreTide } from '#backend/features/tides/tides.reader.ts';
import { lowNearestNoon } from '#shared/domain/tides/shore-water.ts';
import type { TideExtreme, TideHeight } from '#shared/domain/tides/tide-curve.ts';
import type { Instant } from '#shared/kernel/time.ts';
import { addDays, dayAt, startOfDay } from '#shared/kernel/time.ts';

const curveStepMinutes = 20;

/** Today at the home shore. */
export interface ShoreToday {
  readonly shore: Shore;
  readonly lowWater: TideExtreme | null;
  readonly curve: readonly TideHeight[];
}

/** What every page needs: the clock, and today's water at the home shore where there is one. */
export async function seeAccount(
  ctx: AppContext,
): Promise<{ readonly now: Instant; readonly today: ShoreToday | null }> {
  const now = ctx.clock.now();
  const shores = await ctx.reading(readShores);
  const shore = shores[0];
  const tide =
    shore === undefined ? null : await ctx.reading((read) => readShoreTide(ctx.tides, read, shore));
  if (shore === undefined || tide === null) return { now, today: null };
  const on = dayAt(now, shore.zone);
  return {
    now,
    today: {
      shore,
      lowWater: lowNearestNoon(tide.curve, on, shore.zone),
      curve: tide.curve.series(
        startOfDay(on, shore.zone),
        startOfDay(addDays(on, 1), shore.zone),
        curveStepMinutes,
      ),
    },
  };
}
