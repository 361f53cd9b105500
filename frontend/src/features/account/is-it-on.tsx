import { readCurve } from '#frontend/components/water-curve.ts';
import { WaterLine } from '#frontend/components/water-line.tsx';
import { clockOfWater, metres } from '#frontend/words/tide-words.ts';
import {
  addDays,
  clockAt,
  dayAt,
  formatDay,
  fromIso,
  startOfDay,
  zoneName,
} from '#shared/kernel/time.ts';
import type { FrontDoorView } from './account.queries.ts';

/** Whether the next open session is on, for anybody who asks. */
export function IsItOn({ frontDoor }: { frontDoor: FrontDoorView }) {
  const next = frontDoor.nextSession;
  return (
    <section aria-labelledby="is-it-on" className="mt-7.5 border-t-[1.5px] border-ink pt-3.5">
      <h2 id="is-it-on" className="text-md font-medium text-barnacle">
        Is it on?
      </h2>
      {next === null ? <p className="mt-1">No session is planned.</p> : <NextOpen next={next} />}
    </section>
  );
}

function NextOpen({ next }: { next: NonNullable<FrontDoorView['nextSession']> }) {
  const { zone } = next;
  const day = dayAt(fromIso(next.startsAt), zone);
  const lowAt = fromIso(next.lowWaterAt);
  const clock = (iso: string): string => clockAt(fromIso(iso), zone);
  const isOn = next.state === 'on';
  const low = `${clockOfWater(lowAt, zone)}, ${metres(next.lowWaterHeightM)} metres`;
  return (
    <>
      <div className="mb-2 flex flex-wrap items-end justify-between gap-x-4 gap-y-2">
        <div className="min-w-0 flex-1 basis-52">
          <p className="mt-0.5 mb-1.5 text-3xl font-semibold tracking-title">
            {isOn ? 'On' : 'Stood down'}
          </p>
          <p className="leading-snug font-semibold">
            {next.shoreName}, {formatDay(day, 'long').replaceAll(' ', '\u00a0')}
          </p>
          {isOn && (
            <p className="text-sm">
              The party meets at <b className="tabular-nums">{clock(next.partyMeetsAt)}</b>, off the
              shore by <b className="tabular-nums">{clock(next.offTheShoreBy)}</b>.
            </p>
          )}
        </div>
        <WaterLine
          curve={readCurve(next.curve)}
          axis={next.axis}
          fromAt={startOfDay(day, zone)}
          untilAt={startOfDay(addDays(day, 1), zone)}
          widthPx={124}
          heightPx={62}
          label={`Water line at ${next.shoreName}. Low water ${low}.`}
          caption={{
            at: lowAt,
            clock: clockOfWater(lowAt, zone),
            height: `${metres(next.lowWaterHeightM)} m`,
          }}
          {...(isOn
            ? { sand: { fromAt: fromIso(next.startsAt), untilAt: fromIso(next.offTheShoreBy) } }
            : {})}
        />
      </div>
      <p className="text-sm text-barnacle">
        The next open session, times in {zoneName(lowAt, zone)}. If the weather turns, this line
        says so.
      </p>
    </>
  );
}
