import { useQuery, useQueryClient, useSuspenseQuery } from '@tanstack/react-query';
import { lazy, Suspense, useCallback, useMemo, useState } from 'react';
import { Link, useNavigate, useSearchParams } from 'react-router-dom';
import { sayProblem } from '#frontend/api/say-problem.ts';
import { Button } from '#frontend/components/button.tsx';
import { LoadingWash } from '#frontend/components/loading-wash.tsx';
import { MonthSteps } from '#frontend/components/month-steps.tsx';
import { PageHeading, PageTitle } from '#frontend/components/page-heading.tsx';
import { ProblemSummary } from '#frontend/components/problem-summary.tsx';
import { useWideScreen } from '#frontend/components/use-wide-screen.ts';
import { accountQueries } from '#frontend/features/account/account.queries.ts';
import {
  CalendarKey,
  NextSession,
  TideCaution,
  WhatNeedsYou,
} from '#frontend/features/sessions/beside-month.tsx';
import type { CalendarAddress } from '#frontend/features/sessions/calendar-address.ts';
import {
  changedAddress,
  filtered,
  monthInAddress,
  readAddress,
  strandSpan,
  weeksOf,
} from '#frontend/features/sessions/calendar-address.ts';
import { CalendarFilters } from '#frontend/features/sessions/calendar-filters.tsx';
import { daysOf } from '#frontend/features/sessions/month-days.ts';
import { openSlots } from '#frontend/features/sessions/open-slots.ts';
import { timesOf } from '#frontend/features/sessions/session-times.ts';
import {
  putSlot,
  refreshSessions,
  sessionsQueries,
} from '#frontend/features/sessions/sessions.queries.ts';
import { StrandList } from '#frontend/features/sessions/strand-list.tsx';
import { ClaimButton } from '#frontend/features/slots/claim-button.tsx';
import { counted, sentenceCase } from '#frontend/words/number-words.ts';
import type { CalendarView } from '#shared/contracts/sessions.ts';
import type { CalendarDay } from '#shared/kernel/time.ts';
import {
  addMonths,
  dayAt,
  formatDay,
  fromIso,
  startOfMonth,
  zoneName,
} from '#shared/kernel/time.ts';

const MonthGrid = lazy(async () => ({
  default: (await import('#frontend/features/sessions/month-grid.tsx')).MonthGrid,
}));
const MOST_OPEN = 3;

/** The calendar: the month on a wide page, the strand list on a narrow one. */
export function Component() {
  const { data: account } = useSuspenseQuery(accountQueries.account());
  const [search] = useSearchParams();
  const today = dayAt(fromIso(account.now), account.group.zone);
  const address = useMemo(() => readAddress(search, today), [search, today]);
  return useWideScreen() ? (
    <Month address={address} today={today} />
  ) : (
    <Strand address={address} today={today} />
  );
}

interface CalendarProps {
  readonly address: CalendarAddress;
  readonly today: CalendarDay;
}

function Month({ address, today }: CalendarProps) {
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
            <Suspense fallback={<LoadingWash what="the month" />}>
              <MonthGrid
                monthOn={address.monthOn}
                view={month.data}
                sessions={sessions}
                openedOn={address.openedOn}
                addressOfSession={addressOfSession}
                addressOfDay={addressOfDay}
              />
            </Suspense>
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

function addressOfSession(sessionId: string): string {
  return `/sessions/${sessionId}`;
}

function MonthHeading({ monthOn, today }: { monthOn: CalendarDay; today: CalendarDay }) {
  const [search] = useSearchParams();
  const to = (months: number): string =>
    changedAddress(search, 'month', monthInAddress(addMonths(monthOn, months)));
  return (
    <>
      <span className="min-w-34.5" aria-live="polite">
        <PageHeading>{formatDay(monthOn, 'monthYear')}</PageHeading>
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

function Filters({ view, address }: { view: CalendarView | undefined; address: CalendarAddress }) {
  const [search] = useSearchParams();
  const navigate = useNavigate();
  return (
    <CalendarFilters
      shores={view?.shores ?? []}
      address={address}
      onChange={(name, value) =>
        void navigate(changedAddress(search, name, value), {
          replace: true,
          preventScrollReset: true,
        })
      }
    />
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

function NotLoaded({ error, onRetry }: { error: Error; onRetry: () => void }) {
  return (
    <ProblemSummary title="The calendar could not be loaded.">
      <p className="mb-2">{sayProblem(error)}</p>
      <Button look="line" onPress={onRetry}>
        Try again
      </Button>
    </ProblemSummary>
  );
}

function Strand({ address, today }: CalendarProps) {
  const { from, to } = strandSpan(address.monthOn, today);
  const [search] = useSearchParams();
  const calendar = useQuery(sessionsQueries.calendar(from, to));
  const later = addMonths(address.monthOn, 1);
  return (
    <>
      <PageTitle>Strand list</PageTitle>
      <div className="px-4 pt-0.5 pb-2">
        <PageHeading>Strand list</PageHeading>
      </div>
      {calendar.isPending && <LoadingWash what="the days" />}
      {calendar.error !== null && calendar.data === undefined && (
        <div className="px-4">
          <NotLoaded error={calendar.error} onRetry={() => void calendar.refetch()} />
        </div>
      )}
      {calendar.data !== undefined && (
        <>
          <MayTake view={calendar.data} />
          <div className="px-4 pt-4 pb-3">
            <Filters view={calendar.data} address={address} />
          </div>
          <StrandList
            days={daysOf(calendar.data, filtered(calendar.data.sessions, address), from, to)}
            today={today}
            zone={calendar.data.zone}
          />
          <div className="px-4 py-4 text-sm text-barnacle">
            <p>
              <Link
                className="inline-flex min-h-target items-center text-md"
                to={changedAddress(search, 'month', monthInAddress(later))}
              >
                On to {formatDay(later, 'monthYear')}
              </Link>
            </p>
            <p>Times in {zoneName(fromIso(calendar.data.now), calendar.data.zone)}.</p>
            <TideCaution view={calendar.data} />
          </div>
        </>
      )}
    </>
  );
}

/** What the reader may take, each to be claimed on the spot; the first three, then all on demand. */
function MayTake({ view }: { view: CalendarView }) {
  const [isWhole, setIsWhole] = useState(false);
  const queryClient = useQueryClient();
  const open = openSlots(view.sessions);
  const rest = open.length - MOST_OPEN;
  return (
    <section aria-labelledby="may-take" className="mx-4">
      <h2 id="may-take" className="border-b-[1.5px] border-ink pb-1.5">
        Sessions you may take
      </h2>
      {open.length === 0 && <p className="py-2 text-ui">None in the coming six weeks.</p>}
      <ul>
        {(isWhole ? open : open.slice(0, MOST_OPEN)).map(({ session, slotId, slotKindName }) => (
          <li
            key={slotId}
            className="flex items-center justify-between gap-3 border-b border-hair py-2"
          >
            <div className="min-w-0">
              <h3>
                <Link className="block py-0.5 text-ink" to={addressOfSession(session.id)}>
                  {formatDay(session.dayOn, 'short')}, {session.shoreName}
                </Link>
              </h3>
              <p className="text-ui leading-snug text-barnacle">
                {slotKindName.toLowerCase()},{' '}
                <span className="tabular-nums">{timesOf(session)}</span>
              </p>
            </div>
            <ClaimButton
              slotId={slotId}
              whole={`${slotKindName.toLowerCase()}, ${session.shoreName}, ${formatDay(session.dayOn, 'dayMonth')}`}
              on={{
                onChanged: (slot) => {
                  putSlot(queryClient, session.id, slot);
                  void refreshSessions(queryClient);
                },
                onRefused: () => void refreshSessions(queryClient),
              }}
            />
          </li>
        ))}
      </ul>
      {rest > 0 && !isWhole && (
        <Button look="plain" onPress={() => setIsWhole(true)}>
          {sentenceCase(counted(rest, 'more', 'more'))}
        </Button>
      )}
    </section>
  );
}
