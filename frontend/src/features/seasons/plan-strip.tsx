import { SeasonStrip } from '#frontend/components/season-strip.tsx';
import { readCurve } from '#frontend/components/water-curve.ts';
import type { PlanDate } from '#shared/contracts/season-plans.ts';
import { fromIso } from '#shared/kernel/time.ts';
import { stripInWords } from './plan-words.ts';
import type { StripHours } from './strip-hours.ts';
import { stripMoments } from './strip-hours.ts';

/** The water of one date of a plan. */
export function PlanStrip(props: {
  readonly date: PlanDate;
  readonly zone: string;
  readonly hours: StripHours;
  readonly widthPx: number;
  /** Whether the limits are dashed in the strip itself, where no line runs down the whole stack. */
  readonly hasLimits: boolean;
}) {
  const { date, zone, hours, widthPx, hasLimits } = props;
  const { day } = date;
  const { fromAt, untilAt, limits } = stripMoments(hours, day.on, zone);
  return (
    <SeasonStrip
      curve={readCurve(day.curve)}
      axis={day.axis}
      fromAt={fromAt}
      untilAt={untilAt}
      widthPx={widthPx}
      sunriseAt={day.sunriseAt === null ? null : fromIso(day.sunriseAt)}
      sunsetAt={day.sunsetAt === null ? null : fromIso(day.sunsetAt)}
      sand={
        date.isTaken && day.window !== null
          ? {
              fromAt: fromIso(day.window.startsAt),
              clearByAt: fromIso(day.window.lowerShoreClearBy),
              offByAt: fromIso(day.window.offTheShoreBy),
            }
          : null
      }
      limits={hasLimits ? limits : []}
      label={stripInWords(date, zone)}
    />
  );
}
