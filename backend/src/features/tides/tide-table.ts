import { pathToFileURL } from 'node:url';
import { parseArgs } from 'node:util';
import { tideStations } from '#backend/platform/tides/tide-stations.ts';
import type { StationRefusal, TideStations } from '#backend/platform/tides/tide-stations.ts';
import { tideCurve } from '#shared/domain/tides/prediction.ts';
import { granted, refused } from '#shared/kernel/result.ts';
import type { Verdict } from '#shared/kernel/result.ts';
import { fromIso, isCalendarDay, toIso } from '#shared/kernel/time.ts';
import type { Instant } from '#shared/kernel/time.ts';

/** What a tide table is asked for: a station, and a span with fromAt <= at < toAt. */
export interface TableRequest {
  readonly stationId: string;
  readonly fromAt: Instant;
  readonly toAt: Instant;
}

/** A line of a tide table, as it is printed. */
export interface TableLine {
  /** ISO 8601 in UTC. */
  readonly at: string;
  readonly kind: 'high' | 'low';
  /** Above the station's chart datum, to the millimetre. */
  readonly heightM: number;
}

const LONGEST_YEARS = 20;
const LONGEST_MS = LONGEST_YEARS * 366 * 86_400_000;
const USAGE = 'Use: npm run --silent tide-table -- --station ID --from ISO --to ISO';

/**
 * The request in the words of a command line. A date alone is its midnight in UTC; a date with a
 * time needs its offset. Refuses, in one sentence each, what is missing or no date, a span that
 * ends before it begins, and one of more than 20 years.
 */
export function tableRequest(words: readonly string[]): Verdict<TableRequest, string> {
  const option = { type: 'string' } as const;
  let values: { station?: string; from?: string; to?: string };
  try {
    const options = { station: option, from: option, to: option };
    ({ values } = parseArgs({ args: [...words], options, strict: true }));
  } catch (error) {
    // parseArgs says what is wrong with the words in the message of a TypeError.
    if (error instanceof TypeError) return refused(error.message);
    throw error;
  }
  const { station, from, to } = values;
  if (station === undefined || station === '' || from === undefined || to === undefined) {
    return refused('--station, --from and --to are all needed.');
  }
  const fromAt = instantNamed(from);
  const toAt = instantNamed(to);
  const [first, ...rest] = [
    ...(fromAt === null ? [notAnInstant('--from', from)] : []),
    ...(toAt === null ? [notAnInstant('--to', to)] : []),
  ];
  if (first !== undefined) return refused(first, ...rest);
  if (fromAt === null || toAt === null) throw new Error('An instant is missing without a reason');
  if (!(fromAt < toAt)) return refused(`--to must be later than --from: ${from}, ${to}.`);
  if (toAt - fromAt > LONGEST_MS) {
    return refused(`A table of more than ${LONGEST_YEARS} years is not made at once.`);
  }
  return granted({ stationId: station, fromAt, toAt });
}

/** The highs and lows of the request, in order. Refuses with every reason against the station. */
export async function tideTable(
  { stationId, fromAt, toAt }: TableRequest,
  stations: TideStations,
): Promise<Verdict<TableLine[], StationRefusal>> {
  const station = await stations.find(stationId);
  if (!station.isGranted) return station;
  const curve = tideCurve(station.value);
  if (!curve.isGranted) return curve;
  return granted(
    curve.value.extremes(fromAt, toAt).map(({ at, kind, heightM }) => ({
      at: toIso(at),
      kind,
      heightM: Math.round(heightM * 1000) / 1000,
    })),
  );
}

function instantNamed(text: string): Instant | null {
  if (isCalendarDay(text)) return fromIso(`${text}T00:00Z`);
  try {
    return fromIso(text);
  } catch (error) {
    if (error instanceof RangeError) return null;
    throw error;
  }
}

function notAnInstant(option: string, text: string): string {
  return (
    `${option} must be a date, or a date and time with its offset from UTC ` +
    `(2027-06-01, 2027-06-01T12:00Z, 2027-06-01T12:00+01:00), not '${text}'.`
  );
}

function sentence(refusal: StationRefusal): string {
  switch (refusal.why) {
    case 'no-such-station':
      return `There is no tide station '${refusal.id}'.`;
    case 'not-a-tide-station':
      return `'${refusal.id}' is a station for currents, not for tides.`;
    case 'doubtful-station':
      return `'${refusal.id}' is marked as doubtful by its source: ${refusal.doubt}.`;
    case 'not-for-commercial-use':
      return `The data of '${refusal.id}' are not free for every use (${refusal.licence}).`;
    case 'licence-not-clear':
      return `It is not clear how the data of '${refusal.id}' may be used (${refusal.licence}).`;
    case 'no-chart-datum':
      return `'${refusal.id}' has no chart datum, so its heights would mean nothing.`;
    case 'unknown-constituent':
      return `The station has the constituent ${refusal.name}, which is not known here.`;
    case 'unusable-figure':
      return `The station's figure for ${refusal.name} is no number.`;
  }
}

async function run(words: readonly string[]): Promise<number> {
  const request = tableRequest(words);
  if (!request.isGranted) {
    process.stderr.write(`${[...request.reasons, USAGE].join('\n')}\n`);
    return 2;
  }
  const table = await tideTable(request.value, tideStations());
  if (!table.isGranted) {
    process.stderr.write(`${table.reasons.map(sentence).join('\n')}\n`);
    return 2;
  }
  process.stdout.write(table.value.map((line) => `${JSON.stringify(line)}\n`).join(''));
  return 0;
}

const [, program, ...words] = process.argv;
if (program !== undefined && import.meta.url === pathToFileURL(program).href) {
  process.exitCode = await run(words);
}
