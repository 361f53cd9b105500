import type { AppContext } from '#backend/app-context.ts';
import { readShoreRange, readShoreTide } from '#backend/features/tides/tides.reader.ts';
import type { ShorePlace, ShoreTide } from '#backend/features/tides/tides.reader.ts';
import { Problem } from '#backend/http/problem.ts';
import { usableDaysInYear, windowOn } from '#shared/domain/tides/shore-water.ts';
import type { ShoreRules } from '#shared/domain/tides/shore-water.ts';
import type { CalendarDay } from '#shared/kernel/time.ts';
import { addDays, dayAt } from '#shared/kernel/time.ts';

/** What settings that nobody has saved would mean. */
export interface ShorePreview {
  readonly tide: ShoreTide;
  readonly range: { readonly lowestTideM: number; readonly highestTideM: number };
  readonly on: CalendarDay;
  readonly usableDays: number;
}

/**
 * One day at a shore as it is being set up, and how many days of the year ahead have a working
 * window. Without a day, the next that has one, else today.
 */
export async function previewShore(
  ctx: AppContext,
  shore: ShoreRules & ShorePlace,
  on: CalendarDay | null,
): Promise<ShorePreview> {
  const tide = await ctx.reading((read) => readShoreTide(ctx.tides, read, shore));
  const range = await readShoreRange(ctx.tides, shore);
  if (tide === null || range === null) {
    throw new Problem('not-understood', 'There is no water to show', {
      fields: [
        { where: 'body', field: 'settings.tideStationId', message: 'This station cannot be used.' },
      ],
    });
  }
  const todayOn = dayAt(ctx.clock.now(), shore.zone);
  const usable = usableDaysInYear(shore, tide.curve, todayOn);
  return { tide, range, on: on ?? usable[0] ?? todayOn, usableDays: usable.length };
}

/** The first day from today on with a working window, within so many days; null for none. */
export function nextUsableDay(
  shore: ShoreRules,
  tide: ShoreTide | null,
  todayOn: CalendarDay,
  withinDays: number,
): CalendarDay | null {
  if (tide === null) return null;
  for (let ahead = 0; ahead < withinDays; ahead += 1) {
    const on = addDays(todayOn, ahead);
    if (windowOn(shore, tide.curve, on).isGranted) return on;
  }
  return null;
}
