import { isRouteErrorResponse, useRouteError } from 'react-router-dom';
import { sayProblem } from '#frontend/api/say-problem.ts';
import { Button } from '#frontend/components/button.tsx';
import { FrontPage } from '#frontend/components/front-page.tsx';
import { PageTitle } from '#frontend/components/page-heading.tsx';
import { ProblemSummary } from '#frontend/components/problem-summary.tsx';
import { NotFoundPage } from './not-found.tsx';

/** For what no page expected: what happened, and the next step. */
export function ErrorPage() {
  const error = useRouteError();
  if (isRouteErrorResponse(error) && error.status === 404) {
    return (
      <FrontPage groupName={null} foot={null}>
        <NotFoundPage />
      </FrontPage>
    );
  }
  return (
    <FrontPage groupName={null} foot={null}>
      <PageTitle>Something went wrong</PageTitle>
      <div className="mt-10 max-w-letter">
        <ProblemSummary title="This page could not be shown.">
          <p className="mb-3">
            {sayProblem(error instanceof Error ? error : new Error(String(error)))}
          </p>
          <Button look="line" onPress={() => window.location.reload()}>
            Load it again
          </Button>
        </ProblemSummary>
      </div>
    </FrontPage>
  );
}
