import { useQuery } from '@tanstack/react-query';
import type { ReactNode } from 'react';
import { useLocation, useNavigate, useParams } from 'react-router-dom';
import { ProblemError } from '#frontend/api/problem-error.ts';
import { sayProblem } from '#frontend/api/say-problem.ts';
import { BackLink } from '#frontend/components/back-link.tsx';
import { Button } from '#frontend/components/button.tsx';
import { LoadingWash } from '#frontend/components/loading-wash.tsx';
import { PageHeading, PageTitle } from '#frontend/components/page-heading.tsx';
import { ProblemSummary } from '#frontend/components/problem-summary.tsx';
import { draftOf, emptyDraft } from '#frontend/features/shores/shore-draft.ts';
import { ShoreFacts, TableYears } from '#frontend/features/shores/shore-facts.tsx';
import { ShoreForm } from '#frontend/features/shores/shore-form.tsx';
import { shoresQueries } from '#frontend/features/shores/shores.queries.ts';
import type { ShoreView } from '#shared/contracts/shores.ts';
import { NotFoundPage } from './not-found.tsx';

/** What the page of a new shore leaves for the page of that shore. */
const ADDED = { isAdded: true } as const;

/** One shore: to be changed, to be read, or to be added. */
export function Component() {
  const { shoreId } = useParams();
  return shoreId === undefined ? <NewShore /> : <KnownShore key={shoreId} shoreId={shoreId} />;
}

function NewShore() {
  const navigate = useNavigate();
  const shores = useQuery(shoresQueries.list());
  if (shores.data === undefined) {
    return <NotYet error={shores.error} onRetry={() => void shores.refetch()} />;
  }
  return (
    <Page title="A new shore">
      {shores.data.mayMake ? (
        <ShoreForm
          shoreId={null}
          from={emptyDraft()}
          onSaved={({ id }) => void navigate(`/shores/${id}`, { replace: true, state: ADDED })}
        />
      ) : (
        <p className="mt-3 text-ui">Coordinators and administrators add shores.</p>
      )}
    </Page>
  );
}

function KnownShore({ shoreId }: { shoreId: string }) {
  const shore = useQuery(shoresQueries.shore(shoreId));
  if (shore.data !== undefined) return <ShorePage shore={shore.data} />;
  const code = shore.error instanceof ProblemError ? shore.error.problem.code : null;
  // An address that is no id at all is refused as not understood, and no more exists than the rest.
  if (code === 'not-found' || code === 'not-understood') return <NotFoundPage />;
  return <NotYet error={shore.error} onRetry={() => void shore.refetch()} />;
}

function ShorePage({ shore }: { shore: ShoreView }) {
  const location = useLocation();
  const isAdded = (location.state as Partial<typeof ADDED> | null)?.isAdded === true;
  return (
    <Page title={shore.settings.name}>
      <TableYears years={shore.tableYears} />
      {isAdded && (
        <p role="status" className="mt-1 text-ui font-medium">
          {`${shore.settings.name} is added. Season plans can use it.`}
        </p>
      )}
      {shore.mayChange ? (
        <ShoreForm shoreId={shore.id} from={draftOf(shore.settings)} onSaved={() => undefined} />
      ) : (
        <ShoreFacts shore={shore} />
      )}
    </Page>
  );
}

function Page({ title, children }: { title: string; children: ReactNode }) {
  return (
    <div className="px-4 pt-3.5 pb-10 wide:px-page wide:pb-14">
      <PageTitle>{title}</PageTitle>
      <BackLink to="/shores">Shores</BackLink>
      <div className="mt-1">
        <PageHeading>{title}</PageHeading>
      </div>
      {children}
    </div>
  );
}

function NotYet({ error, onRetry }: { error: Error | null; onRetry: () => void }) {
  return (
    <div className="px-4 pt-8 wide:px-page">
      {error === null ? (
        <LoadingWash what="the shore" />
      ) : (
        <>
          <PageTitle>Shore</PageTitle>
          <ProblemSummary title="The shore could not be loaded.">
            <p className="mb-2">{sayProblem(error)}</p>
            <Button look="line" onPress={onRetry}>
              Try again
            </Button>
          </ProblemSummary>
        </>
      )}
    </div>
  );
}
