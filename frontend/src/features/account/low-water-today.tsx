import { WaterLine } from '#frontend/components/water-line.tsx';
import { readCurve } from '#frontend/components/water-curve.ts';
import { clockOfWater, metres } from '#frontend/words/tide-words.ts';
import { fromIso, zoneName } from '#shared/kernel/time.ts';
import type { AccountView } from './account.queries.ts';

/** Today's water at the home shore, small, with the low water nearest to noon. */
export function LowWaterToday({ account }: { account: AccountView }) {
  const today = account.homeShoreToday;
  if (today === null) return null;
  const curve = readCurve(today.curve);
  const first = curve[0];
  const last = curve[curve.length - 1];
  if (first === undefined || last === undefined || today.lowWater === null) return null;
  const at = fromIso(today.lowWater.at);
  const clock = clockOfWater(at, today.zone);
  const height = metres(today.lowWater.heightM);
  return (
    <div className="flex items-center gap-2.5 text-xs leading-tight whitespace-nowrap text-barnacle">
      <WaterLine
        curve={curve}
        axis={today.axis}
        fromAt={first.at}
        untilAt={last.at}
        widthPx={84}
        heightPx={26}
        nowAt={fromIso(account.now)}
        label={`Water line at ${today.shoreName} today`}
      />
      <span>
        Low water today
        <b className="block text-ink tabular-nums">
          {clock} {zoneName(at, today.zone)}, {height} m
        </b>
      </span>
    </div>
  );
}
