import type { AppContext } from '#backend/app-context.ts';
import type { Route } from '#backend/http/route.ts';
import { route } from '#backend/http/route.ts';
import {
  seeCalendar as seeCalendarContract,
  seeSession as seeSessionContract,
} from '#shared/contracts/sessions.ts';
import type { SessionId } from '#shared/kernel/ids.ts';
import { seeCalendar } from './see-calendar.ts';
import { seeSession } from './see-session.ts';
import { presentCalendar, presentSession } from './sessions.presenter.ts';

export function sessionsRoutes(ctx: AppContext): Route[] {
  return [
    route(seeCalendarContract, 'calendar.see', async ({ actor, query }) =>
      presentCalendar(await seeCalendar(ctx, actor, query.from, query.to)),
    ),
    route(seeSessionContract, 'session.see', async ({ actor, params }) =>
      presentSession(await seeSession(ctx, actor, params.sessionId as SessionId)),
    ),
  ];
}
