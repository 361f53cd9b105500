import { useSuspenseQuery } from '@tanstack/react-query';
import { Outlet, ScrollRestoration, useLocation } from 'react-router-dom';
import { FooterNav, PageHeader, SkipLink } from '#frontend/components/page-header.tsx';
import { accountQueries } from '#frontend/features/account/account.queries.ts';
import { LowWaterToday } from '#frontend/features/account/low-water-today.tsx';
import { Who } from '#frontend/features/account/who.tsx';
import { useWideScreen } from '#frontend/components/use-wide-screen.ts';
import { may } from '#shared/policy/policy.ts';

/** The frame of every page that needs somebody signed in; its loader has seen to that. */
export function SignedIn() {
  const { data: account } = useSuspenseQuery(accountQueries.account());
  const { pathname } = useLocation();
  const isWide = useWideScreen();
  const isWithin = (screen: string): boolean =>
    pathname === screen || pathname.startsWith(`${screen}/`);
  const screens = [
    {
      to: '/',
      name: isWide ? 'Calendar' : 'Strand list',
      isCurrent: pathname === '/' || pathname.startsWith('/sessions/'),
    },
    ...(may(account.person?.roles ?? null, 'season-plan.see')
      ? [{ to: '/season-plans', name: 'Season plan', isCurrent: isWithin('/season-plans') }]
      : []),
    {
      to: '/shores',
      name: 'Shores',
      isCurrent: isWithin('/shores') || isWithin('/tide-tables'),
    },
  ];
  return (
    <div className="max-wide:pb-foot">
      <SkipLink />
      <PageHeader
        groupName={account.group.name}
        screens={screens}
        today={<LowWaterToday account={account} />}
        who={account.person === null ? null : <Who person={account.person} />}
      />
      <main id="main" tabIndex={-1}>
        <Outlet />
      </main>
      {!isWide && <FooterNav screens={screens} />}
      <ScrollRestoration />
    </div>
  );
}
