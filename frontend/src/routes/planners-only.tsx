import { useSuspenseQuery } from '@tanstack/react-query';
import { Link, Outlet } from 'react-router-dom';
import { PageHeading, PageTitle } from '#frontend/components/page-heading.tsx';
import { accountQueries } from '#frontend/features/account/account.queries.ts';
import { may } from '#shared/policy/policy.ts';

/** The frame of the season plans: for those who plan; the others are told who does. */
export function PlannersOnly() {
  const { data: account } = useSuspenseQuery(accountQueries.account());
  if (may(account.person?.roles ?? null, 'season-plan.see')) return <Outlet />;
  return (
    <div className="px-4 pt-3.5 pb-10 wide:px-page wide:pt-5.5">
      <PageTitle>Season plans</PageTitle>
      <PageHeading>Season plans</PageHeading>
      <p className="mt-3 text-ui">
        Coordinators plan the season. <Link to="/">See the calendar</Link>
      </p>
    </div>
  );
}
