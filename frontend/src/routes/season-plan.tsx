import { useQuery, useQueryClient } from '@tanstack/react-query';
import { Link, useNavigate, useParams } from 'react-router-dom';
import { ProblemError } from '#frontend/api/problem-error.ts';
import { sayProblem } from '#frontend/api/say-problem.ts';
import { Button } from '#frontend/components/button.tsx';
import { LoadingWash } from '#frontend/components/loading-wash.tsx';
import { PageHeading, PageTitle } from '#frontend/components/page-heading.tsx';
import { ProblemSummary } from '#frontend/components/problem-summary.tsx';
import { MadePlan } from '#frontend/features/seasons/made-plan.tsx';
import { draftOf, newDraft } from '#frontend/features/seasons/plan-draft.ts';
import { PlanEditor } from '#frontend/features/seasons/plan-editor.tsx';
import type { PlansView } from '#frontend/features/seasons/seasons.queries.ts';
import { seasonsQueries } from '#frontend/features/seasons/seasons.queries.ts';
import { refreshSessions } from '#frontend/features/sessions/sessions.queries.ts';
import type { PlanView } from '#shared/contracts/season-plans.ts';
import { addressOfSession } from './calendar-parts.tsx';
import { NotFoundPage } from './not-found.tsx';

/** One season plan: written until sessions are made of it, read from then on. */
export function Component() {
  const { planId } = useParams();
  const plans = useQuery(seasonsQueries.plans());
  if (plans.data === undefined) {
    return plans.error === null ? (
      <Loading />
    ) : (
      <NotLoaded error={plans.error} onRetry={() => void plans.refetch()} />
    );
  }
  return planId === undefined ? (
    <NewPlan view={plans.data} />
  ) : (
    <OnePlan key={planId} planId={planId} view={plans.data} />
  );
}

function NewPlan({ view }: { view: PlansView }) {
  const pages = usePages();
  const start = newDraft(view);
  if (start === null) {
    return (
      <div className="px-4 pt-3.5 wide:px-page wide:pt-5.5">
        <PageTitle>A new season plan</PageTitle>
        <PageHeading>A new season plan</PageHeading>
        <p className="mt-3">
          <b>There is no shore to plan for.</b> <Link to="/shores">Look at the shores</Link>
        </p>
      </div>
    );
  }
  return (
    <PlanEditor
      view={view}
      start={start}
      saved={null}
      onSaved={pages.onSaved}
      onMade={pages.onMade}
    />
  );
}

function OnePlan({ planId, view }: { planId: string; view: PlansView }) {
  const pages = usePages();
  const plan = useQuery(seasonsQueries.plan(planId));
  if (plan.data !== undefined) {
    return plan.data.mayChange ? (
      <PlanEditor
        view={view}
        start={draftOf(plan.data.settings, view.slotKinds)}
        saved={plan.data}
        onSaved={pages.onSaved}
        onMade={pages.onMade}
      />
    ) : (
      <MadePlan
        plan={plan.data}
        view={view}
        addressOfSession={addressOfSession}
        onPublished={pages.onPublished}
      />
    );
  }
  if (plan.error === null) return <Loading />;
  const code = plan.error instanceof ProblemError ? plan.error.problem.code : null;
  // An address that is no id at all is refused as not understood, and no more exists than the rest.
  if (code === 'not-found' || code === 'not-understood') return <NotFoundPage />;
  return <NotLoaded error={plan.error} onRetry={() => void plan.refetch()} />;
}

/** Where one goes when something became of a plan, and what else shows it. */
function usePages() {
  const navigate = useNavigate();
  const queryClient = useQueryClient();
  const toPlan = ({ id }: PlanView): void => {
    void navigate(`/season-plans/${id}`, { replace: true });
  };
  return {
    onSaved: toPlan,
    onMade: (plan: PlanView): void => {
      void refreshSessions(queryClient);
      toPlan(plan);
    },
    onPublished: (): void => void refreshSessions(queryClient),
  };
}

function Loading() {
  return (
    <div className="px-4 pt-8 wide:px-page">
      <LoadingWash what="the season plan" />
    </div>
  );
}

function NotLoaded({ error, onRetry }: { error: Error; onRetry: () => void }) {
  return (
    <div className="px-4 wide:px-page">
      <PageTitle>Season plan</PageTitle>
      <ProblemSummary title="The season plan could not be loaded.">
        <p className="mb-2">{sayProblem(error)}</p>
        <Button look="line" onPress={onRetry}>
          Try again
        </Button>
      </ProblemSummary>
    </div>
  );
}
