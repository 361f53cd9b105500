import { useQuery, useQueryClient, useSuspenseQuery } from '@tanstack/react-query';
import { useParams } from 'react-router-dom';
import { ProblemError } from '#frontend/api/problem-error.ts';
import { sayProblem } from '#frontend/api/say-problem.ts';
import { BackLink } from '#frontend/components/back-link.tsx';
import { Button } from '#frontend/components/button.tsx';
import { LoadingWash } from '#frontend/components/loading-wash.tsx';
import { PageHeading, PageTitle } from '#frontend/components/page-heading.tsx';
import { ProblemSummary } from '#frontend/components/problem-summary.tsx';
import { accountQueries } from '#frontend/features/account/account.queries.ts';
import { monthInAddress } from '#frontend/features/sessions/calendar-address.ts';
import { CoverLine } from '#frontend/features/sessions/cover-line.tsx';
import { SessionAbout, SessionTrail } from '#frontend/features/sessions/session-about.tsx';
import { SessionWater } from '#frontend/features/sessions/session-water.tsx';
import { coverOf } from '#frontend/features/sessions/session-words.ts';
import {
  putSlot,
  refreshSessions,
  sessionsQueries,
} from '#frontend/features/sessions/sessions.queries.ts';
import { SlotList } from '#frontend/features/slots/slot-list.tsx';
import { daysAway } from '#frontend/words/day-words.ts';
import { sentenceCase } from '#frontend/words/number-words.ts';
import type { SessionView } from '#shared/contracts/sessions.ts';
import { dayAt, formatDay, fromIso } from '#shared/kernel/time.ts';
import { NotFoundPage } from './not-found.tsx';

const LIMPET_PX = 24;

/** One session: its water, its crew, and what the reader may do. */
export function Component() {
  const { sessionId = '' } = useParams();
  const session = useQuery(sessionsQueries.session(sessionId));
  if (session.data !== undefined) return <SessionPage session={session.data} />;
  if (session.error === null) {
    return (
      <div className="px-4 pt-8 wide:px-page">
        <LoadingWash what="the session" />
      </div>
    );
  }
  const code = session.error instanceof ProblemError ? session.error.problem.code : null;
  // An address that is no id at all is refused as not understood, and no more exists than the rest.
  if (code === 'not-found' || code === 'not-understood') return <NotFoundPage />;
  return (
    <div className="px-4 wide:px-page">
      <PageTitle>Session</PageTitle>
      <ProblemSummary title="The session could not be loaded.">
        <p className="mb-2">{sayProblem(session.error)}</p>
        <Button look="line" onPress={() => void session.refetch()}>
          Try again
        </Button>
      </ProblemSummary>
    </div>
  );
}

function SessionPage({ session }: { session: SessionView }) {
  const { data: account } = useSuspenseQuery(accountQueries.account());
  const queryClient = useQueryClient();
  const name = `${session.shore.name}, ${formatDay(session.dayOn, 'long')}`;
  const hasEnded = fromIso(session.endsAt) <= fromIso(account.now);
  const away = daysAway(dayAt(fromIso(account.now), session.shore.zone), session.dayOn);
  return (
    <div className="px-4 pt-3.5 pb-10 wide:px-page wide:pb-14">
      <PageTitle>{name}</PageTitle>
      <BackLink to={`/?month=${monthInAddress(session.dayOn)}`}>
        {formatDay(session.dayOn, 'monthYear')}
      </BackLink>
      <div className="mt-1 mb-3 flex flex-wrap items-end justify-between gap-x-6 gap-y-2.5">
        <div className="min-w-0">
          <PageHeading>{name}</PageHeading>
          <p className="mt-1 text-barnacle">{`${session.title}. ${sentenceCase(away)}.`}</p>
        </div>
        <p className="text-md wide:text-lg">
          <CoverLine
            state={session.state}
            hasEnded={hasEnded}
            cover={coverOf(session.slots)}
            limpetPx={LIMPET_PX}
          />
        </p>
      </div>
      <SessionWater session={session} />
      <div className="mt-5.5 grid gap-x-14 gap-y-7 wide:grid-cols-[minmax(0,40rem)_minmax(0,1fr)_minmax(0,15.625rem)] wide:pl-8.5">
        <SlotList
          slots={session.slots}
          on={{
            onChanged: (slot) => {
              putSlot(queryClient, session.id, slot);
              void refreshSessions(queryClient);
            },
            onRefused: () => void refreshSessions(queryClient),
          }}
        />
        <SessionAbout session={session} />
        <SessionTrail session={session} />
      </div>
    </div>
  );
}
