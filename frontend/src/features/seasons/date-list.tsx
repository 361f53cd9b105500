import type { ReactNode } from 'react';
import { useMeasuredWidth } from '#frontend/components/use-measured-width.ts';
import { useWideScreen } from '#frontend/components/use-wide-screen.ts';
import type { PlanDate, PlanPreview } from '#shared/contracts/season-plans.ts';
import { formatDay, startOfMonth, weekdayOf, yearOf } from '#shared/kernel/time.ts';
import type { DateRowProps } from './date-row.tsx';
import { NarrowRow, WideRow } from './date-row.tsx';
import type { StripHours } from './strip-hours.ts';
import { hoursToName, shareOf } from './strip-hours.ts';

/** Every date of a plan, a strip of water each, with its times or why it is skipped. */
export function DateList(props: {
  readonly preview: PlanPreview;
  readonly hours: StripHours;
  /** How much room the end of a row needs. */
  readonly endRoom: 'word' | 'state';
  readonly endOf: (date: PlanDate) => ReactNode;
  readonly underOf: (date: PlanDate) => ReactNode;
}) {
  const { preview, hours, endOf, underOf } = props;
  const isWide = useWideScreen();
  const { dates } = preview;
  const hasWeekday = new Set(dates.map(({ on }) => weekdayOf(on))).size > 1;
  const rowOf = (date: PlanDate, index: number): Omit<DateRowProps, 'widthPx'> => {
    const before = dates[index - 1];
    return {
      date,
      zone: preview.zone,
      hours,
      hasWeekday,
      isFirstOfMonth: before === undefined || startOfMonth(before.on) !== startOfMonth(date.on),
      end: endOf(date),
      under: underOf(date),
    };
  };
  const rows = dates.map(rowOf);
  return isWide ? (
    <WideList rows={rows} hours={hours} columns={columns[props.endRoom]} />
  ) : (
    <NarrowList rows={rows} />
  );
}

type Row = Omit<DateRowProps, 'widthPx'>;

const columns = {
  word: 'grid-cols-[5.75rem_minmax(0,1fr)_26rem_3.25rem]',
  state: 'grid-cols-[5.75rem_minmax(0,1fr)_26rem_10rem]',
};

function WideList(props: {
  readonly rows: readonly Row[];
  readonly hours: StripHours;
  readonly columns: string;
}) {
  const { rows, hours } = props;
  const [ref, widthPx] = useMeasuredWidth<HTMLDivElement>();
  const limits = [hours.earliestClock, hours.latestClock].filter(
    (clock) => shareOf(hours, clock) > 0 && shareOf(hours, clock) < 1,
  );
  return (
    <>
      <div
        className={`grid ${props.columns} mt-1.5 items-end text-xs leading-tight text-barnacle`}
        aria-hidden
      >
        <span />
        <div ref={ref} className="relative h-5">
          {hoursToName(hours).map((clock) => (
            <span
              key={clock}
              className="absolute -translate-x-1/2 tabular-nums"
              style={{ left: atShare(hours, clock) }}
            >
              {clock}
            </span>
          ))}
        </div>
        <p className="grid grid-cols-[6.875rem_3.5rem_minmax(0,1fr)] pb-0.5 pl-5">
          <span>
            low water, lower
            <br />
            shore clear by
          </span>
          <span>
            on the
            <br />
            shore
          </span>
          <span>
            off the
            <br />
            shore by
          </span>
        </p>
      </div>
      <div className="relative">
        <div
          className={`pointer-events-none absolute inset-0 -top-0.5 z-10 grid ${props.columns}`}
          aria-hidden
        >
          <span />
          <div className="relative">
            {limits.map((clock) => (
              <span
                key={clock}
                className="absolute inset-y-0 border-l-[1.5px] border-dashed border-edge"
                style={{ left: atShare(hours, clock) }}
              />
            ))}
          </div>
        </div>
        <ol>
          {widthPx !== null &&
            rows.map((row) => (
              <WideRow key={row.date.on} {...row} widthPx={widthPx} columns={props.columns} />
            ))}
        </ol>
        <div className={`grid ${props.columns} text-xs text-barnacle`} aria-hidden>
          <span />
          <div className="relative h-5.5">
            <span
              className="absolute py-0.5 pl-1.5 whitespace-nowrap"
              style={{ left: atShare(hours, hours.earliestClock) }}
            >
              earliest {hours.earliestClock}
            </span>
            <span
              className="absolute -translate-x-full py-0.5 pr-1.5 whitespace-nowrap"
              style={{ left: atShare(hours, hours.latestClock) }}
            >
              latest {hours.latestClock}
            </span>
          </div>
        </div>
      </div>
    </>
  );
}

function atShare(hours: StripHours, clock: StripHours['fromClock']): string {
  return `${(shareOf(hours, clock) * 100).toFixed(2)}%`;
}

function NarrowList({ rows }: { rows: readonly Row[] }) {
  const [ref, widthPx] = useMeasuredWidth<HTMLDivElement>();
  const isOneYear = new Set(rows.map(({ date }) => yearOf(date.on))).size === 1;
  const months = [...new Set(rows.map(({ date }) => startOfMonth(date.on)))];
  return (
    <div ref={ref}>
      {widthPx !== null &&
        months.map((monthOn) => (
          <section key={monthOn} aria-label={formatDay(monthOn, 'monthYear')}>
            <h3 className="pt-4 pb-1 text-md">
              {isOneYear
                ? formatDay(monthOn, 'monthYear').split(' ')[0]
                : formatDay(monthOn, 'monthYear')}
            </h3>
            <ol>
              {rows
                .filter(({ date }) => startOfMonth(date.on) === monthOn)
                .map((row) => (
                  <NarrowRow key={row.date.on} {...row} widthPx={widthPx} />
                ))}
            </ol>
          </section>
        ))}
    </div>
  );
}
