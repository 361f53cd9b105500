import type { AppContext } from '#backend/app-context.ts';
import { readShores } from '#backend/features/shores/shores.reader.ts';
import type { Route } from '#backend/http/route.ts';
import { route } from '#backend/http/route.ts';
import {
  acceptTable as acceptTableContract,
  previewTable,
  seeTables,
  takeBackTable as takeBackTableContract,
} from '#shared/contracts/tide-tables.ts';
import type { SessionId, TideTableId } from '#shared/kernel/ids.ts';
import { acceptTable, takeBackTable } from './accept-table.ts';
import { readTable } from './read-table.ts';
import { presentTablePreview, presentTables } from './tide-tables.presenter.ts';
import { readTables } from './tide-tables.repository.ts';

export function tidesRoutes(ctx: AppContext): Route[] {
  return [
    route(seeTables, 'tide-table.see', async () => {
      const { tables, shores } = await ctx.reading(async (read) => ({
        tables: await readTables(read),
        shores: await readShores(read),
      }));
      const stations = [];
      for (const id of new Set(shores.map(({ tideStationId }) => tideStationId))) {
        const tide = await ctx.tides.at(id);
        if (tide === null) continue;
        const ofStation = shores.filter(({ tideStationId }) => tideStationId === id);
        stations.push({ station: tide.station, shores: ofStation });
      }
      return presentTables(tables, stations);
    }),
    route(previewTable, 'tide-table.change', async ({ body }) =>
      presentTablePreview(await ctx.reading((read) => readTable(ctx, read, body))),
    ),
    route(acceptTableContract, 'tide-table.change', ({ actor, body }) =>
      acceptTable(ctx, actor, { ...body, movesSessionIds: body.movesSessionIds as SessionId[] }),
    ),
    route(takeBackTableContract, 'tide-table.change', async ({ actor, params }) => {
      await takeBackTable(ctx, actor, params.tableId as TideTableId);
      return { id: params.tableId };
    }),
  ];
}
