import { useQuery } from '@tanstack/react-query';
import { useSearchParams } from 'react-router-dom';
import { sayProblem } from '#frontend/api/say-problem.ts';
import { ButtonLink } from '#frontend/components/button.tsx';
import { LoadingWash } from '#frontend/components/loading-wash.tsx';
import { FrontPage } from '#frontend/components/front-page.tsx';
import { PageTitle } from '#frontend/components/page-heading.tsx';
import { accountQueries } from '#frontend/features/account/account.queries.ts';
import { FortnightWater } from '#frontend/features/account/fortnight.tsx';
import { IsItOn } from '#frontend/features/account/is-it-on.tsx';
import { signInAddress } from '#frontend/features/account/sign-in-address.ts';
import { listed } from '#frontend/words/number-words.ts';

/** The front door: what the group does, whether the next session is on, and the way in. */
export function Component() {
  const frontDoor = useQuery(accountQueries.frontDoor());
  const [search] = useSearchParams();
  const data = frontDoor.data;
  const where =
    data === undefined || data.shoreNames.length === 0 ? '' : ` of ${listed(data.shoreNames)}`;
  return (
    <FrontPage
      groupName={data?.group.name ?? null}
      foot={data?.fortnight ? <FortnightWater fortnight={data.fortnight} /> : null}
    >
      <PageTitle>Sign in</PageTitle>
      <div className="mt-7 grid grid-cols-1 items-start gap-7 wide:mt-19 wide:grid-cols-[1fr_25rem] wide:gap-22.5">
        <div>
          <h1 className="max-w-[11.5em] text-headline-small tracking-headline text-balance wide:text-headline">
            Who is on the shore when the water is out
          </h1>
          <p className="mt-5 max-w-words text-lg leading-normal text-barnacle">
            {`Sessions, crew and certificates for the volunteers${where}.`}
          </p>
        </div>
        <div>
          <div className="grid gap-2.5 pt-2">
            <ButtonLink href={signInAddress(search.get('returnTo'))}>Sign in</ButtonLink>
            <p className="text-sm text-barnacle">
              You go to the group’s own sign-in page and come straight back.
            </p>
          </div>
          {data !== undefined && <IsItOn frontDoor={data} />}
          {frontDoor.isPending && <LoadingWash what="the next session" />}
          {frontDoor.error !== null && data === undefined && (
            <p className="mt-7.5 border-t-2 border-anemone pt-3.5 text-ui" role="alert">
              <b>Whether the next session is on could not be loaded.</b>{' '}
              {sayProblem(frontDoor.error)}
            </p>
          )}
        </div>
      </div>
    </FrontPage>
  );
}
