import type { AppContext } from '#backend/app-context.ts';
import type { Route } from '#backend/http/route.ts';
import { route } from '#backend/http/route.ts';
import { describeRoutes } from '#backend/http/openapi.ts';
import { seeHealth, seeOpenApi } from '#shared/contracts/system.ts';
import { hasAnswer } from './system.reader.ts';

/** Health, and the description of every endpoint, these two included. */
export function systemRoutes(ctx: AppContext, others: readonly Route[]): Route[] {
  const health = route(seeHealth, 'health.see', async () => {
    await ctx.reading(hasAnswer);
    return { isWell: true as const };
  });
  const openApi: Route = route(seeOpenApi, 'openapi.see', () => Promise.resolve(document));
  const document = describeRoutes(ctx.group.name, [...others, health, openApi]);
  return [health, openApi];
}
