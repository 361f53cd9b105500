import { granted, refused } from '#shared/kernel/result.ts';
import type { Verdict } from '#shared/kernel/result.ts';
import { isZone } from '#shared/kernel/time.ts';
import { inOrder } from './official-table-checks.ts';
import { eventColumns } from './official-table-columns.ts';
import type { EventColumns } from './official-table-columns.ts';
import { dateReading } from './official-table-dates.ts';
import { linesOf } from './official-table-lines.ts';
import type { TableLine, TableLines } from './official-table-lines.ts';
import type {
  DateOrder,
  HeightUnit,
  OfficialTable,
  TableLayout,
  TableRefusal,
  TableZone,
} from './official-table-reading.ts';
import { readRows } from './official-table-rows.ts';
import { unitReading } from './official-table-units.ts';
import type { Figure, UnitReading } from './official-table-units.ts';

/** What a person says of a table beside its text. */
export interface TableQuestions {
  /** Always asked for: no table is read in a zone that nobody named. */
  readonly zone: TableZone;
  /** To be recognised where it is not given. */
  readonly units?: HeightUnit | undefined;
  /** For dates that are printed without a year. */
  readonly year?: number | undefined;
  /** Where the table itself leaves it open. */
  readonly dateOrder?: DateOrder | undefined;
}

/** Furthest from UTC that clocks have ever been set. */
const WIDEST_OFFSET_MINUTES = 16 * 60;

const ZONE_SAID =
  /\btime ?zone\s*[:=]?\s*(?<named>[^\t;,]+)|\b(?<short>GMT|UTC|BST|IST|CET|CEST|LST\/LDT|LST)\b/i;

/**
 * Reads an official table of high and low waters: columns in any order, with a heading or without,
 * separated by tabs, semicolons, commas or spaces; one event a row or several; 12 or 24 hour clock;
 * metres, centimetres or feet, or two of them side by side (product rule R9).
 *
 * Lines that cannot be read, or contradict the others, are listed and the rest is read; whoever
 * calls decides whether that is enough. What the table leaves open is refused and must be said:
 * nothing is guessed without saying so in the layout.
 */
export function readOfficialTable(
  text: string,
  questions: TableQuestions,
): Verdict<OfficialTable, TableRefusal> {
  const { zone } = questions;
  const isKnown = typeof zone === 'string' ? isZone(zone) : Math.abs(zone) <= WIDEST_OFFSET_MINUTES;
  if (!isKnown) return refused({ why: 'no-such-zone', zone: String(zone) });
  const lines = linesOf(text);
  if (!lines.isGranted) return lines;
  const { rows, heading, above } = lines.value;
  const columns = eventColumns(lines.value);
  if (columns === null) return refused({ why: 'columns-unclear' });
  const dates = dateReading(rows, questions.dateOrder, questions.year);
  if (!dates.isGranted) return dates;
  const units = unitReading(heightsOf(rows, columns), heading, above, questions.units);
  if (!units.isGranted) return units;
  const clock = clockOf(rows);
  const reading = { columns, dates: dates.value, units: units.value, zone, clock };
  const read = readRows(rows, reading);
  const checked = inOrder(
    read.events,
    read.problems.map(({ row }) => row),
  );
  const problems = [...read.problems, ...checked.problems];
  if (columns.isHeadingSwapped) {
    problems.push({
      row: above.indexOf(heading ?? '') + 1,
      why: 'heading-swapped',
      message: 'The heading names time and height the other way round than they stand below it.',
      isLeftOut: false,
    });
  }
  const unit = units.value.units[units.value.taken] ?? 'm';
  return granted({
    events: checked.events,
    problems: problems.sort((a, b) => a.row - b.row),
    layout: {
      words: layoutWords(lines.value, columns, units.value, clock),
      unitsFrom: units.value.from,
      dateOrder: dates.value.order,
      zoneSaid: zoneSaid(above),
    },
    units: unit,
    clock,
  });
}

function heightsOf(rows: readonly TableLine[], columns: EventColumns): Figure[][] {
  return rows.flatMap(({ values }) =>
    columns.events.flatMap(({ heights }) => {
      const figures = heights.flatMap((column) => {
        const token = values.get(column);
        return token?.shape === 'figure' ? [token] : [];
      });
      return figures.length === columns.heightsEach ? [figures] : [];
    }),
  );
}

/** Twelve hours where half of the times say AM or PM. */
function clockOf(rows: readonly TableLine[]): 12 | 24 {
  let twelve = 0;
  let all = 0;
  for (const { values } of rows) {
    for (const token of values.values()) {
      if (token.shape !== 'time') continue;
      all += 1;
      if (token.half !== null) twelve += 1;
    }
  }
  return all > 0 && twelve * 2 >= all ? 12 : 24;
}

function layoutWords(
  lines: TableLines,
  columns: EventColumns,
  units: UnitReading,
  clock: 12 | 24,
): TableLayout['words'] {
  const [first] = columns.events;
  const most = columns.events.length;
  const height = `height in ${units.units.join(' and ')}`;
  const order = columns.isTimeFirst ? `time, ${height}` : `${height}, time`;
  const isMarked = first?.mark !== null;
  const kinds = isMarked
    ? 'high and low water as marked'
    : first.kind === null
      ? 'high and low water by turns'
      : 'high and low water by the heading';
  return [
    `date, ${order}`,
    most === 1 ? 'one event a line' : `up to ${most} events a line`,
    kinds,
    `${clock} hour clock`,
    `separated by ${lines.separator}`,
    ...(lines.above.length === 0
      ? []
      : [
          lines.above.length === 1
            ? 'one line above the table passed over'
            : `${lines.above.length} lines above the table passed over`,
        ]),
  ];
}

function zoneSaid(above: readonly string[]): string | null {
  for (const line of above) {
    const { named, short } = ZONE_SAID.exec(line)?.groups ?? {};
    const said = named ?? short;
    if (said !== undefined) return said.trim();
  }
  return null;
}
