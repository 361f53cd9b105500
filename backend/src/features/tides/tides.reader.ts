import type { Read } from '#backend/database/transaction.ts';
import type { StationFacts } from '#backend/platform/tides/tide-stations.ts';
import type { Tides } from '#backend/platform/tides/tides.ts';
import type { TideDifferences } from '#shared/domain/tides/differences.ts';
import { curveWithDifferences } from '#shared/domain/tides/differences.ts';
import { curveByTable } from '#shared/domain/tides/official-table-curve.ts';
import type { TideCurve, TideExtreme } from '#shared/domain/tides/tide-curve.ts';
import type { TideTableId } from '#shared/kernel/ids.ts';
import type { Instant } from '#shared/kernel/time.ts';

/** An official table in force, without its events. */
export interface TableInForce {
  readonly id: TideTableId;
  readonly stationId: string;
  readonly name: string;
  readonly firstAt: Instant;
  readonly lastAt: Instant;
}

/** What decides the tide at a shore, beside the tables of its station. */
export interface ShorePlace {
  readonly tideStationId: string;
  readonly differences: TideDifferences;
}

/** The tide at a shore: by the official table where one is in force, predicted elsewhere. */
export interface ShoreTide {
  readonly station: StationFacts;
  readonly curve: TideCurve;
  readonly tables: readonly TableInForce[];
}

/** The official tables in force, in the order of their days. */
export async function readTablesInForce(read: Read): Promise<readonly TableInForce[]> {
  const rows: { one: TableInForce }[] = await read.query(
    `SELECT json_build_object('id', id, 'stationId', station_id, 'name', name,
         'firstAt', epoch_ms(first_at), 'lastAt', epoch_ms(last_at)) AS one
       FROM tide_table WHERE taken_back_at IS NULL ORDER BY first_at`,
  );
  return rows.map((row) => row.one);
}

/** The high and low waters of a table. */
export async function readTableEvents(read: Read, id: TideTableId): Promise<TideExtreme[]> {
  const rows: { events: [Instant, 'high' | 'low', number][] }[] = await read.query(
    'SELECT events FROM tide_table WHERE id = $1',
    [id],
  );
  return (rows[0]?.events ?? []).map(([at, kind, heightM]) => ({ at, kind, heightM }));
}

/**
 * The tide at a shore: the prediction of its station, bent by the official tables in force (R9),
 * then by the shore's differences. Null when the station cannot be used.
 */
export async function readShoreTide(
  tides: Tides,
  read: Read,
  shore: ShorePlace,
): Promise<ShoreTide | null> {
  const tide = await tides.at(shore.tideStationId);
  if (tide === null) return null;
  const { station } = tide;
  const tables = (await readTablesInForce(read)).filter(
    ({ stationId }) => stationId === station.id,
  );
  const atStation = await bentByTables(tides, read, tide.curve, tables);
  return { station, curve: await withDifferences(tides, atStation, shore, tables), tables };
}

/** The tide at a station: its prediction, bent by the official tables in force. */
export async function readStationTide(
  tides: Tides,
  read: Read,
  stationId: string,
): Promise<ShoreTide | null> {
  return readShoreTide(tides, read, { tideStationId: stationId, differences: noDifferences });
}

const none = { laterMinutes: 0, heightFactor: 1, higherM: 0 };
export const noDifferences: TideDifferences = { high: none, low: none };

function bentByTables(
  tides: Tides,
  read: Read,
  predicted: TideCurve,
  tables: readonly TableInForce[],
): Promise<TideCurve> {
  if (tables.length === 0) return Promise.resolve(predicted);
  return tides.curve(tables.map(({ id }) => id).join(' '), async () => {
    let curve = predicted;
    for (const { id } of tables) {
      curve = curveByTable(curve, await readTableEvents(read, id));
    }
    return curve;
  });
}

function withDifferences(
  tides: Tides,
  atStation: TideCurve,
  { tideStationId, differences }: ShorePlace,
  tables: readonly TableInForce[],
): Promise<TideCurve> {
  const figures = [differences.high, differences.low].flatMap((one) => [
    one.laterMinutes,
    one.heightFactor,
    one.higherM,
  ]);
  if (figures.join(' ') === '0 1 0 0 1 0') return Promise.resolve(atStation);
  const key = [tideStationId, ...tables.map(({ id }) => id), ...figures].join(' ');
  return tides.curve(key, () => Promise.resolve(curveWithDifferences(atStation, differences)));
}

/**
 * The lowest and the highest astronomical tide at a shore, from which its drawings have their
 * axis; null when its station cannot be used.
 */
export async function readShoreRange(
  tides: Tides,
  { tideStationId, differences }: ShorePlace,
): Promise<{ readonly lowestTideM: number; readonly highestTideM: number } | null> {
  const range = await tides.rangeAt(tideStationId);
  if (range === null) return null;
  const { low, high } = differences;
  return {
    lowestTideM: range.lowestM * low.heightFactor + low.higherM,
    highestTideM: range.highestM * high.heightFactor + high.higherM,
  };
}
