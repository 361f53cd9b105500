import type { AppContext } from '#backend/app-context.ts';
import { readShoreTide } from '#backend/features/tides/tides.reader.ts';
import { Problem } from '#backend/http/problem.ts';
import type { Actor, Route } from '#backend/http/route.ts';
import { route } from '#backend/http/route.ts';
import {
  changeShore as changeShoreContract,
  findStations,
  makeShore as makeShoreContract,
  previewShore as previewShoreContract,
  seeShore as seeShoreContract,
  seeShores as seeShoresContract,
} from '#shared/contracts/shores.ts';
import type { ShoreView } from '#shared/contracts/shores.ts';
import type { ShoreId } from '#shared/kernel/ids.ts';
import { dayAt } from '#shared/kernel/time.ts';
import { may } from '#shared/policy/policy.ts';
import { nextUsableDay, previewShore } from './preview-shore.ts';
import { changeShore, makeShore } from './save-shore.ts';
import {
  presentPreview,
  presentShore,
  presentShores,
  presentStations,
  shoreWish,
} from './shores.presenter.ts';
import { readShore, readShores } from './shores.reader.ts';

const stationsOffered = 8;
const usableWithinDays = 60;

export function shoresRoutes(ctx: AppContext): Route[] {
  const see = async (actor: Actor, id: ShoreId): Promise<ShoreView> => {
    const found = await ctx.reading(async (read) => {
      const shore = await readShore(read, id);
      return shore === null ? null : { shore, tide: await readShoreTide(ctx.tides, read, shore) };
    });
    if (found === null) throw new Problem('not-found', 'There is no such shore');
    const mayChange = may(actor.roles, 'shore.change');
    return presentShore(found.shore, found.tide, ctx.clock.now(), mayChange);
  };
  return [
    route(seeShoresContract, 'shore.see', async ({ actor }) => {
      const now = ctx.clock.now();
      const shores = await ctx.reading(async (read) => {
        const seen = [];
        for (const shore of await readShores(read)) {
          const tide = await readShoreTide(ctx.tides, read, shore);
          const todayOn = dayAt(now, shore.zone);
          const nextUsableOn = nextUsableDay(shore, tide, todayOn, usableWithinDays);
          seen.push({ shore, tide, nextUsableOn });
        }
        return seen;
      });
      return presentShores(shores, now, may(actor.roles, 'shore.change'));
    }),
    route(previewShoreContract, 'shore.change', async ({ body }) => {
      const { high, low } = body.settings.differences;
      const place = {
        ...body.settings,
        differences: { high: { ...high, heightFactor: 1 }, low: { ...low, heightFactor: 1 } },
      };
      return presentPreview(place, await previewShore(ctx, place, body.on));
    }),
    route(seeShoreContract, 'shore.see', ({ actor, params }) =>
      see(actor, params.shoreId as ShoreId),
    ),
    route(makeShoreContract, 'shore.change', async ({ actor, body }) =>
      see(actor, await makeShore(ctx, actor, shoreWish(body))),
    ),
    route(changeShoreContract, 'shore.change', async ({ actor, params, body }) => {
      await changeShore(ctx, actor, params.shoreId as ShoreId, shoreWish(body));
      return see(actor, params.shoreId as ShoreId);
    }),
    route(findStations, 'shore.change', async ({ query }) =>
      presentStations(
        await ctx.tides.stations.nearest(query.latitude, query.longitude, stationsOffered),
      ),
    ),
  ];
}
