import type { QueryClient } from '@tanstack/react-query';
import type { LoaderFunctionArgs, RouteObject } from 'react-router-dom';
import { redirect } from 'react-router-dom';
import { LoadingWash } from './components/loading-wash.tsx';
import { accountQueries } from './features/account/account.queries.ts';
import { ErrorPage } from './routes/error.tsx';
import { NotFoundPage } from './routes/not-found.tsx';
import { PlannersOnly } from './routes/planners-only.tsx';
import { SignedIn } from './routes/signed-in.tsx';

/** Where somebody signs in who was on the way to a page of this site. */
export function signInPage(returnTo: string): string {
  return `/sign-in?${new URLSearchParams({ returnTo }).toString()}`;
}

/** Every page and its address. What stands behind the sign-in loads the account first. */
export function routes(queryClient: QueryClient): RouteObject[] {
  const needsAccount = async ({ request }: LoaderFunctionArgs) => {
    const account = await queryClient.query({
      ...accountQueries.account(),
      staleTime: 'static',
    });
    if (account.person !== null) return null;
    const { pathname, search } = new URL(request.url);
    return redirect(signInPage(pathname + search));
  };
  return [
    {
      errorElement: <ErrorPage />,
      HydrateFallback: () => (
        <div className="px-4 pt-8 wide:px-page">
          <LoadingWash what="Ebbfolk" />
        </div>
      ),
      children: [
        { path: '/sign-in', lazy: () => import('./routes/sign-in.tsx') },
        { path: '/sign-in/refused', lazy: () => import('./routes/not-invited.tsx') },
        {
          loader: needsAccount,
          // The account is asked for once; the cache keeps it fresh from then on.
          shouldRevalidate: () => false,
          Component: SignedIn,
          children: [
            { index: true, lazy: () => import('./routes/calendar.tsx') },
            { path: '/sessions/:sessionId', lazy: () => import('./routes/session.tsx') },
            {
              path: '/season-plans',
              Component: PlannersOnly,
              children: [
                { index: true, lazy: () => import('./routes/season-plans.tsx') },
                { path: 'new', lazy: () => import('./routes/season-plan.tsx') },
                { path: ':planId', lazy: () => import('./routes/season-plan.tsx') },
              ],
            },
            { path: '/shores', lazy: () => import('./routes/shores.tsx') },
            { path: '/shores/new', lazy: () => import('./routes/shore.tsx') },
            { path: '/shores/:shoreId', lazy: () => import('./routes/shore.tsx') },
            { path: '/tide-tables', lazy: () => import('./routes/tide-tables.tsx') },
            { path: '*', Component: NotFoundPage },
          ],
        },
      ],
    },
  ];
}
