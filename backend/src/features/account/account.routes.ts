import type { AppContext } from '#backend/app-context.ts';
import { Problem } from '#backend/http/problem.ts';
import type { Redirect, Route } from '#backend/http/route.ts';
import { route } from '#backend/http/route.ts';
import type { SignIn } from '#backend/http/sign-in.ts';
import type { Identity, IdentityProvider } from '#backend/platform/sign-in/identity-provider.ts';
import type { Logger } from 'pino';
import {
  beginSignIn,
  finishSignIn,
  seeAccount as seeAccountContract,
  seeFrontDoor as seeFrontDoorContract,
  signOut,
} from '#shared/contracts/account.ts';
import type { SignInRefusal } from '#shared/contracts/account.ts';
import { presentAccount, presentFrontDoor } from './account.presenter.ts';
import { admit } from './admit.ts';
import { seeAccount } from './see-account.ts';
import { seeFrontDoor } from './see-front-door.ts';

const afterSignOut = '/sign-in';

export function accountRoutes(ctx: AppContext, provider: IdentityProvider, log: Logger): Route[] {
  return [
    route(seeAccountContract, 'account.see', async ({ actor }) => {
      const { now, today } = await seeAccount(ctx);
      return presentAccount(ctx.group, actor, now, today);
    }),
    route(seeFrontDoorContract, 'front-door.see', async () =>
      presentFrontDoor(ctx.group, await seeFrontDoor(ctx)),
    ),
    route(beginSignIn, 'account.sign-in', async ({ query, signIn }) => {
      const begun = await provider.begin().catch((error: unknown) => {
        log.error({ err: error }, 'the sign-in provider does not answer');
        return null;
      });
      if (begun === null) return refuse('failed');
      await signIn.expect({ ...begun.checks, returnTo: query.returnTo });
      return { goTo: begun.goTo };
    }),
    route(finishSignIn, 'account.sign-in', ({ url, signIn }) =>
      comeBack(ctx, provider, log, url, signIn),
    ),
    route(signOut, 'account.sign-out', async ({ signIn }) => {
      const { idToken } = signIn;
      await signIn.end();
      const returnTo = `${ctx.group.baseUrl}${afterSignOut}`;
      if (idToken === null) return { goTo: returnTo };
      const goTo = await provider.endSession(idToken, returnTo).catch((error: unknown) => {
        log.error({ err: error }, 'the sign-in provider does not answer');
        throw new Problem(
          'unavailable',
          'You are signed out here, but the sign-in page does not answer. Close this browser.',
        );
      });
      return { goTo: goTo ?? returnTo };
    }),
  ];
}

async function comeBack(
  ctx: AppContext,
  provider: IdentityProvider,
  log: Logger,
  url: URL,
  signIn: SignIn,
): Promise<Redirect> {
  const expected = signIn.takeExpected();
  if (expected === null) return refuse('failed');
  let identity: Identity;
  try {
    identity = await provider.finish(url, expected);
  } catch (error) {
    log.warn({ err: error }, 'a sign-in did not match');
    return refuse('failed');
  }
  const admission = await admit(ctx, identity);
  if (!admission.isAdmitted) return refuse(admission.why);
  await signIn.begin(admission.personId, identity.idToken);
  return { goTo: expected.returnTo };
}

function refuse(why: SignInRefusal): Redirect {
  return { goTo: `/sign-in/refused?why=${why}` };
}
