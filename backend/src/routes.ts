import type { Logger } from 'pino';
import type { AppContext } from './app-context.ts';
import { accountRoutes } from './features/account/account.routes.ts';
import { seasonsRoutes } from './features/seasons/seasons.routes.ts';
import { sessionsRoutes } from './features/sessions/sessions.routes.ts';
import { shoresRoutes } from './features/shores/shores.routes.ts';
import { slotsRoutes } from './features/slots/slots.routes.ts';
import { tidesRoutes } from './features/tides/tides.routes.ts';
import { systemRoutes } from './features/system/system.routes.ts';
import type { Route } from './http/route.ts';
import type { IdentityProvider } from './platform/sign-in/identity-provider.ts';

/** Every endpoint. The description at /api/openapi.json is made from this list. */
export function routes(ctx: AppContext, provider: IdentityProvider, log: Logger): Route[] {
  const described = [
    ...accountRoutes(ctx, provider, log),
    ...sessionsRoutes(ctx),
    ...slotsRoutes(ctx),
    ...seasonsRoutes(ctx),
    ...tidesRoutes(ctx),
    ...shoresRoutes(ctx),
  ];
  return [...described, ...systemRoutes(ctx, described)];
}
