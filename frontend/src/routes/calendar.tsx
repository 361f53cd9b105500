import { useSuspenseQuery } from '@tanstack/react-query';
import { lazy, Suspense, useMemo } from 'react';
import { useSearchParams } from 'react-router-dom';
import { LoadingWash } from '#frontend/components/loading-wash.tsx';
import { useWideScreen } from '#frontend/components/use-wide-screen.ts';
import { accountQueries } from '#frontend/features/account/account.queries.ts';
import { readAddress } from '#frontend/features/sessions/calendar-address.ts';
import { dayAt, fromIso } from '#shared/kernel/time.ts';

const CalendarMonth = lazy(async () => ({
  default: (await import('./calendar-month.tsx')).CalendarMonth,
}));
const CalendarStrand = lazy(async () => ({
  default: (await import('./calendar-strand.tsx')).CalendarStrand,
}));

/** The calendar: the month on a wide page, the strand list on a narrow one. */
export function Component() {
  const { data: account } = useSuspenseQuery(accountQueries.account());
  const [search] = useSearchParams();
  const today = dayAt(fromIso(account.now), account.group.zone);
  const address = useMemo(() => readAddress(search, today), [search, today]);
  const isWide = useWideScreen();
  return (
    <Suspense fallback={<LoadingWash what="the calendar" />}>
      {isWide ? (
        <CalendarMonth address={address} today={today} />
      ) : (
        <CalendarStrand address={address} today={today} />
      )}
    </Suspense>
  );
}
