import type { ReactNode } from 'react';
import { clockOfWater, metres } from '#frontend/words/tide-words.ts';
import { shortDate } from '#frontend/words/day-words.ts';
import type { PlanDate } from '#shared/contracts/season-plans.ts';
import { clockAt, formatDay, fromIso } from '#shared/kernel/time.ts';
import { PlanStrip } from './plan-strip.tsx';
import { skippedInWords, takenInWords } from './plan-words.ts';
import type { StripHours } from './strip-hours.ts';

export interface DateRowProps {
  readonly date: PlanDate;
  readonly zone: string;
  readonly hours: StripHours;
  readonly widthPx: number;
  /** Whether the month is spelled out: on its first date. */
  readonly isFirstOfMonth: boolean;
  /** Whether each date is told with its weekday, since the plan has several. */
  readonly hasWeekday: boolean;
  /** What can be done with it, at its end. */
  readonly end: ReactNode;
  /** What is asked about it, under it. */
  readonly under: ReactNode;
}

/** One date across a wide page, in the columns of its list. */
export function WideRow(props: DateRowProps & { readonly columns: string }) {
  const { date, zone, columns } = props;
  return (
    <li>
      <div className={`grid ${columns} min-h-9.75 items-center text-sm`}>
        <span className={`tabular-nums ${date.isTaken ? 'font-medium' : 'text-barnacle'}`}>
          {dateName(props)}
        </span>
        <PlanStrip
          date={date}
          zone={zone}
          hours={props.hours}
          widthPx={props.widthPx}
          hasLimits={false}
        />
        {date.isTaken ? (
          <TakenTimes date={date} zone={zone} />
        ) : (
          <p className="pl-5 leading-tight text-barnacle">
            <span className="sr-only">Skipped: </span>
            <span className="tabular-nums">{skippedInWords(date, zone)}</span>
          </p>
        )}
        <div className="justify-self-end">{props.end}</div>
      </div>
      {props.under}
    </li>
  );
}

function dateName({ date, isFirstOfMonth, hasWeekday }: DateRowProps): string {
  if (hasWeekday) return formatDay(date.on, 'short');
  return isFirstOfMonth ? formatDay(date.on, 'dayMonth') : shortDate(date.on);
}

function TakenTimes({ date, zone }: { date: PlanDate; zone: string }) {
  const { window } = date.day;
  if (window === null) return null;
  const clock = (iso: string): string => clockAt(fromIso(iso), zone);
  return (
    <p className="grid grid-cols-[3.125rem_3.75rem_3.5rem_3.5rem_minmax(0,1fr)] items-baseline pl-5">
      <b className="tabular-nums">
        <span className="sr-only">low water </span>
        {clockOfWater(fromIso(window.lowWaterAt), zone)}
      </b>
      <span className="tabular-nums">{metres(window.lowWaterHeightM)} m</span>
      <span className="tabular-nums">
        <span className="sr-only">on the shore </span>
        {clock(window.startsAt)}
      </span>
      <b className="tabular-nums">
        <span className="sr-only">off the shore by </span>
        {clock(window.offTheShoreBy)}
      </b>
      <Unusual date={date} zone={zone} />
    </p>
  );
}

function Unusual({ date, zone }: { date: PlanDate; zone: string }) {
  const words = takenInWords(date, zone);
  if (words === null) return null;
  return (
    <span
      className={`text-xs leading-tight tabular-nums max-wide:text-ui ${date.isByHand ? 'font-semibold text-wrack' : 'text-barnacle'}`}
    >
      {words}
    </span>
  );
}

/**
 * One date down a narrow page: a strip with its times under it, or one line on why not. What can
 * be done keeps its place, and with it the focus, when one becomes the other.
 */
export function NarrowRow(props: DateRowProps) {
  const { date } = props;
  return (
    <li className="border-t border-hair py-1">
      <div className="flex min-h-11 items-center justify-between gap-3">
        {date.isTaken ? (
          <h4 className="text-ui font-semibold">{formatDay(date.on, 'short')}</h4>
        ) : (
          <NarrowReason {...props} />
        )}
        {props.end}
      </div>
      {date.isTaken && <NarrowTimes {...props} />}
      {props.under}
    </li>
  );
}

function NarrowTimes(props: DateRowProps) {
  const { date, zone } = props;
  const { window } = date.day;
  if (window === null) return null;
  const clock = (iso: string): string => clockAt(fromIso(iso), zone);
  return (
    <div className="pb-1.5 text-ui">
      <PlanStrip date={date} zone={zone} hours={props.hours} widthPx={props.widthPx} hasLimits />
      <p className="mt-1 flex flex-wrap items-baseline justify-between gap-x-2.5">
        <span className="tabular-nums">
          low <b>{clockOfWater(fromIso(window.lowWaterAt), zone)}</b>,{' '}
          {metres(window.lowWaterHeightM)} m
        </span>
        <span className="tabular-nums">
          off the shore by <b>{clock(window.offTheShoreBy)}</b>
        </span>
      </p>
      <p className="mt-1 flex flex-wrap items-baseline justify-between gap-x-2.5 text-barnacle">
        <span className="tabular-nums">on the shore {clock(window.startsAt)}</span>
        <Unusual date={date} zone={zone} />
      </p>
    </div>
  );
}

function NarrowReason({ date, zone, hasWeekday }: DateRowProps) {
  return (
    <p className="grid grid-cols-[5.25rem_1fr] text-sm text-barnacle tabular-nums">
      <span>{hasWeekday ? formatDay(date.on, 'short') : shortDate(date.on)}</span>
      <span>
        <span className="sr-only">Skipped: </span>
        {skippedInWords(date, zone)}
      </span>
    </p>
  );
}
