import { useSearchParams } from 'react-router-dom';
import { Button, ButtonLink } from '#frontend/components/button.tsx';
import { FrontPage } from '#frontend/components/front-page.tsx';
import { PageHeading, PageTitle } from '#frontend/components/page-heading.tsx';
import { signInAddress } from '#frontend/features/account/sign-in-address.ts';
import { useSignOut } from '#frontend/features/account/use-sign-out.ts';

interface Refused {
  readonly title: string;
  readonly what: string;
  readonly next: string;
}

const failed: Refused = {
  title: 'The sign-in did not go through',
  what: 'Something went wrong on the way back from the sign-in page, or it took too long.',
  next: 'Nothing has changed. Try again; if it fails twice, tell an administrator of the group.',
};

const refusals: Partial<Record<string, Refused>> = {
  'not-invited': {
    title: 'You are not in the group yet',
    what: 'You signed in, but the address that you signed in with has not been invited.',
    next: 'Ask an administrator of the group to invite that very address, or sign in with the one that was invited.',
  },
  'email-not-verified': {
    title: 'Your address is not verified',
    what: 'The sign-in page does not yet know that the e-mail address is yours.',
    next: 'Verify the address there, by the mail that it sent you, then try again.',
  },
  paused: {
    title: 'Your place in the group is paused',
    what: 'You are known here, but your place is paused.',
    next: 'An administrator of the group can open it again.',
  },
  'other-identity': {
    title: 'Your address belongs to another sign-in',
    what: 'The group knows this address with another account of the sign-in page.',
    next: 'Sign in with the account that you used before, or ask an administrator to connect this one.',
  },
  failed,
};

/** Why a sign-in did not lead in, and what to do next. */
export function Component() {
  const [search] = useSearchParams();
  const refused = refusals[search.get('why') ?? ''] ?? failed;
  const signOut = useSignOut();
  return (
    <FrontPage groupName={null} foot={null}>
      <PageTitle>{refused.title}</PageTitle>
      <div className="mt-10 max-w-words border-t-2 border-anemone pt-4">
        <PageHeading>{refused.title}</PageHeading>
        <p className="mt-3">{refused.what}</p>
        <p className="mt-2">{refused.next}</p>
        <div className="mt-6 grid gap-3">
          <ButtonLink href={signInAddress(null)}>Try again</ButtonLink>
          <p className="text-sm text-barnacle">
            The sign-in page may still remember you. To use another account, sign out there first.
          </p>
          <Button look="line" isBusy={signOut.isPending} onPress={() => signOut.mutate()}>
            {signOut.isPending ? 'Signing out' : 'Sign out at the sign-in page'}
          </Button>
          {signOut.error !== null && (
            <p role="alert" className="text-sm text-anemone">
              Not signed out: no answer came. Try again.
            </p>
          )}
        </div>
      </div>
    </FrontPage>
  );
}
