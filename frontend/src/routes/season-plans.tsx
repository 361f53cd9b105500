import { useQuery } from '@tanstack/react-query';
import { Link } from 'react-router-dom';
import { sayProblem } from '#frontend/api/say-problem.ts';
import { Button } from '#frontend/components/button.tsx';
import { LoadingWash } from '#frontend/components/loading-wash.tsx';
import { PageHeading, PageTitle } from '#frontend/components/page-heading.tsx';
import { ProblemSummary } from '#frontend/components/problem-summary.tsx';
import { PlanList } from '#frontend/features/seasons/plan-list.tsx';
import { seasonsQueries } from '#frontend/features/seasons/seasons.queries.ts';

/** Every season plan. */
export function Component() {
  const plans = useQuery(seasonsQueries.plans());
  return (
    <div className="px-4 pt-3.5 pb-10 wide:px-page wide:pt-5.5">
      <PageTitle>Season plans</PageTitle>
      <div className="mb-3 flex flex-wrap items-end justify-between gap-x-6 gap-y-2">
        <PageHeading>Season plans</PageHeading>
        {plans.data !== undefined && plans.data.plans.length > 0 && (
          <Link className="inline-flex min-h-7 items-center max-wide:min-h-target" to="new">
            Write a season plan
          </Link>
        )}
      </div>
      {plans.isPending && <LoadingWash what="the season plans" />}
      {plans.error !== null && plans.data === undefined && (
        <ProblemSummary title="The season plans could not be loaded.">
          <p className="mb-2">{sayProblem(plans.error)}</p>
          <Button look="line" onPress={() => void plans.refetch()}>
            Try again
          </Button>
        </ProblemSummary>
      )}
      {plans.data !== undefined && <PlanList view={plans.data} />}
    </div>
  );
}
