import { useNavigate, useSearchParams } from 'react-router-dom';
import { sayProblem } from '#frontend/api/say-problem.ts';
import { Button } from '#frontend/components/button.tsx';
import { ProblemSummary } from '#frontend/components/problem-summary.tsx';
import type { CalendarAddress } from '#frontend/features/sessions/calendar-address.ts';
import { changedAddress } from '#frontend/features/sessions/calendar-address.ts';
import { CalendarFilters } from '#frontend/features/sessions/calendar-filters.tsx';
import type { CalendarView } from '#shared/contracts/sessions.ts';
import type { CalendarDay } from '#shared/kernel/time.ts';

export interface CalendarProps {
  readonly address: CalendarAddress;
  readonly today: CalendarDay;
}

/** Where one session is shown. */
export function addressOfSession(sessionId: string): string {
  return `/sessions/${sessionId}`;
}

/** The filters, kept in the address. */
export function Filters({
  view,
  address,
}: {
  view: CalendarView | undefined;
  address: CalendarAddress;
}) {
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

/** What stands where the calendar could not be loaded. */
export function NotLoaded({ error, onRetry }: { error: Error; onRetry: () => void }) {
  return (
    <ProblemSummary title="The calendar could not be loaded.">
      <p className="mb-2">{sayProblem(error)}</p>
      <Button look="line" onPress={onRetry}>
        Try again
      </Button>
    </ProblemSummary>
  );
}
