import { useQuery } from '@tanstack/react-query';
import { useCallback, useMemo } from 'react';
import { Link, useSearchParams } from 'react-router-dom';
import { sayProblem } from '#frontend/api/say-problem.ts';
import { LoadingWash } from '#frontend/components/loading-wash.tsx';
import { MonthSteps } from '#frontend/components/month-steps.tsx';
import { PageHeading, PageTitle } from '#frontend/components/page-heading.tsx';
import {
  CalendarKey,
  NextSession,
  WhatNeedsYou,
} from '#frontend/features/sessions/beside-month.tsx';
import type { CalendarAddress } from '#frontend/features/sessions/calendar-address.ts';
import {
  changedAddress,
  filtered,
  monthInAddress,
  strandSpan,
  weeksOf,
} from '#frontend/features/sessions/calendar-address.ts';
import { sessionsQueries } from '#frontend/features/sessions/sessions.queries.ts';
import type { CalendarDay } from '#shared/kernel/time.ts';
import { addMonths, formatDay, startOfMonth } from '#shared/kernel/time.ts';
import { MonthGrid } from '#frontend/features/sessions/month-grid.tsx';
import type { CalendarProps } from './calendar-parts.tsx';
import { addressOfSession, Filters, NotLoaded } from './calendar-parts.tsx';

/** The month, and beside it what is the reader's. */
export function CalendarMonth({ address, today }: CalendarProps) {
  const { from, to } = weeksOf(address.monthOn);
  const coming = strandSpan(startOfMonth(today), today);
  const month = useQuery(sessionsQueries.calendar(from, to));
  const ahead = useQuery(sessionsQueries.calendar(coming.from, coming.to));
  const [search] = useSearchParams();
  const addressOfDay = useCallback(
    (day: CalendarDay) => changedAddress(search, 'day', day),
    [search],
  );
  const sessions = useMemo(
    () => filtered(month.data?.sessions ?? [], address),
    [month.data, address],
  );
  return (
    <div className="grid grid-cols-[minmax(0,1fr)_16.875rem] gap-7.5 px-page">
      <PageTitle>{formatDay(address.monthOn, 'monthYear')}</PageTitle>
      <div className="pb-8">
        <div className="flex min-h-14.5 flex-wrap items-center gap-x-3.5">
          <MonthHeading monthOn={address.monthOn} today={today} />
          <Filters view={month.data} address={address} />
        </div>
        {month.isPending && <LoadingWash what="the month" />}
        {month.error !== null && month.data === undefined && (
          <NotLoaded error={month.error} onRetry={() => void month.refetch()} />
        )}
        {month.data !== undefined && (
          <>
            <MonthGrid
              monthOn={address.monthOn}
              view={month.data}
              sessions={sessions}
              openedOn={address.openedOn}
              addressOfSession={addressOfSession}
              addressOfDay={addressOfDay}
            />
            {sessions.length === 0 && <NoSessions address={address} />}
          </>
        )}
      </div>
      <aside className="border-l border-hair pt-4.5 pb-8 pl-6 text-sm" aria-label="For you">
        {ahead.data !== undefined && (
          <>
            <NextSession view={ahead.data} />
            <WhatNeedsYou view={ahead.data} />
            <CalendarKey view={ahead.data} />
          </>
        )}
        {ahead.isPending && <LoadingWash what="what needs you" />}
        {ahead.error !== null && ahead.data === undefined && <p>{sayProblem(ahead.error)}</p>}
      </aside>
    </div>
  );
}

function MonthHeading({ monthOn, today }: { monthOn: CalendarDay; today: CalendarDay }) {
  const [search] = useSearchParams();
  const to = (months: number): string =>
    changedAddress(search, 'month', monthInAddress(addMonths(monthOn, months)));
  return (
    <>
      <span className="min-w-34.5" aria-live="polite">
        <PageHeading isSmall>{formatDay(monthOn, 'monthYear')}</PageHeading>
      </span>
      <MonthSteps
        before={{ to: to(-1), name: formatDay(addMonths(monthOn, -1), 'monthYear') }}
        after={{ to: to(1), name: formatDay(addMonths(monthOn, 1), 'monthYear') }}
        now={changedAddress(search, 'month', null)}
        isNow={monthOn === startOfMonth(today)}
      />
    </>
  );
}

function NoSessions({ address }: { address: CalendarAddress }) {
  const [search] = useSearchParams();
  const isFiltered = address.shoreId !== null || address.onlyMine || address.onlyGaps;
  const next = addMonths(address.monthOn, 1);
  return (
    <p className="mt-4 text-ui">
      <b>{`No sessions in ${formatDay(address.monthOn, 'monthYear')}${isFiltered ? ' pass these filters' : ''}.`}</b>{' '}
      {isFiltered ? (
        <Link to={`?month=${monthInAddress(address.monthOn)}`}>Show all</Link>
      ) : (
        <Link to={changedAddress(search, 'month', monthInAddress(next))}>
          Look at {formatDay(next, 'monthYear')}
        </Link>
      )}
    </p>
  );
}
