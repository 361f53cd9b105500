import { useQuery, useSuspenseQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import { sayProblem } from '#frontend/api/say-problem.ts';
import { Button } from '#frontend/components/button.tsx';
import { LoadingWash } from '#frontend/components/loading-wash.tsx';
import { PageHeading, PageTitle } from '#frontend/components/page-heading.tsx';
import { ProblemSummary } from '#frontend/components/problem-summary.tsx';
import { accountQueries } from '#frontend/features/account/account.queries.ts';
import { ShoreList } from '#frontend/features/shores/shore-list.tsx';
import { shoresQueries } from '#frontend/features/shores/shores.queries.ts';
import { may } from '#shared/policy/policy.ts';

const link = 'inline-flex min-h-7 items-center max-wide:min-h-target';

/** Every shore, and a way to add one for those who may. */
export function Component() {
  const { data: account } = useSuspenseQuery(accountQueries.account());
  const shores = useQuery(shoresQueries.list());
  return (
    <div className="px-4 pt-3.5 pb-10 wide:px-page wide:pb-14">
      <PageTitle>Shores</PageTitle>
      <div className="flex flex-wrap items-end justify-between gap-x-6 gap-y-2">
        <PageHeading>Shores</PageHeading>
        <p className="flex gap-6">
          {may(account.person?.roles ?? null, 'tide-table.see') && (
            <Link className={link} to="/tide-tables">
              Tide tables
            </Link>
          )}
          {shores.data?.mayMake === true && (
            <Link className={link} to="/shores/new">
              Add a shore
            </Link>
          )}
        </p>
      </div>
      {shores.data !== undefined && shores.data.shores.length > 0 && (
        <ShoreList shores={shores.data.shores} />
      )}
      {shores.data?.shores.length === 0 && (
        <p className="mt-4 text-ui">
          There is no shore yet.{' '}
          {shores.data.mayMake && <Link to="/shores/new">Add the first</Link>}
        </p>
      )}
      {shores.data === undefined && shores.error === null && <LoadingWash what="the shores" />}
      {shores.data === undefined && shores.error !== null && (
        <ProblemSummary title="The shores could not be loaded.">
          <p className="mb-2">{sayProblem(shores.error)}</p>
          <Button look="line" onPress={() => void shores.refetch()}>
            Try again
          </Button>
        </ProblemSummary>
      )}
    </div>
  );
}
