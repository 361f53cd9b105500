import type { CalendarDay, ClockTime, Instant } from '#shared/kernel/time.ts';
import type { EventColumns } from './official-table-columns.ts';
import { instantsShown } from './official-table-dates.ts';
import type { DateReading } from './official-table-dates.ts';
import type { TableLine } from './official-table-lines.ts';
import { METRES } from './official-table-reading.ts';
import type { ProblemWhy, TableProblem, TableZone } from './official-table-reading.ts';
import type { Token } from './official-table-tokens.ts';
import { HIGHEST_M, LOWEST_M, doHeightsAgree } from './official-table-units.ts';
import type { Figure, UnitReading } from './official-table-units.ts';

/** A time and a height of a line, before the lines are held against one another. */
export interface ReadEvent {
  readonly row: number;
  readonly text: string;
  /** The instants at which the clock shows the time: two where it shows it twice. */
  readonly shownAt: readonly [Instant, ...Instant[]];
  readonly heightM: number;
  readonly kind: 'high' | 'low' | null;
}

/** How every line of the table is read. */
export interface RowReading {
  readonly columns: EventColumns;
  readonly dates: DateReading;
  readonly units: UnitReading;
  readonly zone: TableZone;
  readonly clock: 12 | 24;
}

type Parts = EventColumns['events'][number];

/** Where so many lines have no date of their own, they are of the date above them. */
const SHARE_WITHOUT_DATE = 0.2;

/** The events of the lines one by one, and what keeps others from being read. */
export function readRows(
  rows: readonly TableLine[],
  reading: RowReading,
): { readonly events: ReadEvent[]; readonly problems: TableProblem[] } {
  const events: ReadEvent[] = [];
  const problems: TableProblem[] = [];
  const dateless = rows.filter(({ dates }) => dates.length === 0).length;
  const isCarried = dateless >= rows.length * SHARE_WITHOUT_DATE;
  let on: CalendarDay | null = null;
  for (const line of rows) {
    const problem = (why: ProblemWhy, message: string): void => {
      problems.push({ row: line.row, why, message, isLeftOut: true });
    };
    const [date, second] = line.dates;
    if (second !== undefined) {
      problem('not-a-date', 'This line has two dates.');
      continue;
    }
    if (date !== undefined) on = reading.dates.dayOf(date.date);
    else if (!isCarried) on = null;
    if (on === null) {
      const message =
        date === undefined
          ? 'This line has no date that can be read.'
          : `${quoted(date.text)} is not a date.`;
      problem('not-a-date', message);
      continue;
    }
    events.push(...eventsOf(line, on, reading, problem));
  }
  return { events, problems };
}

function eventsOf(
  line: TableLine,
  on: CalendarDay,
  reading: RowReading,
  problem: (why: ProblemWhy, message: string) => void,
): ReadEvent[] {
  const used = reading.columns.events.filter(({ time, heights }) =>
    [time, ...heights].some((column) => line.values.has(column)),
  );
  if (used.length === 0) problem('missing', 'This line has neither a time nor a height.');
  return used.flatMap((parts) => eventOf(line, on, parts, reading, problem) ?? []);
}

function eventOf(
  line: TableLine,
  on: CalendarDay,
  parts: Parts,
  { units, zone, clock }: RowReading,
  problem: (why: ProblemWhy, message: string) => void,
): ReadEvent | null {
  const time = line.values.get(parts.time);
  const heights = parts.heights.map((column) => line.values.get(column));
  const [firstHeight] = heights;
  if (time !== undefined && firstHeight !== undefined && isHeight(time) && isTime(firstHeight)) {
    problem('swapped', 'Time and height stand in each other’s columns.');
    return null;
  }
  if (time === undefined) {
    problem('missing', 'A height has no time.');
    return null;
  }
  if (heights.includes(undefined)) {
    problem('missing', `The time ${quoted(time.text)} has no height.`);
    return null;
  }
  const shown = clockOf(time, clock);
  if (typeof shown !== 'string') {
    problem('not-a-time', shown.message);
    return null;
  }
  const figures = heights.filter(isFigure);
  const figure = figures[units.taken];
  const unit = units.units[units.taken];
  if (figures.length < heights.length || figure === undefined || unit === undefined) {
    const other = heights.find((token) => token !== undefined && !isFigure(token));
    problem('not-a-height', `${quoted(other?.text ?? '')} is not a height.`);
    return null;
  }
  const heightM = roundedM(figure.value * METRES[unit]);
  if (heightM < LOWEST_M || heightM > HIGHEST_M) {
    problem('height-out-of-range', `${quoted(figure.text)} in ${unit} is no height of a tide.`);
    return null;
  }
  if (!doHeightsAgree(figures, units.units)) {
    const printed = figures.map(({ text }) => quoted(text)).join(' and ');
    problem('heights-disagree', `The heights ${printed} are not the same height.`);
    return null;
  }
  const [firstAt, ...againAt] = instantsShown(on, shown, zone);
  if (firstAt === undefined) {
    const message = `Clocks never show ${shown} on ${on}: they go forward over it. Is the zone right?`;
    problem('no-such-time', message);
    return null;
  }
  const mark = parts.mark === null ? undefined : line.values.get(parts.mark);
  return {
    row: line.row,
    text: `${on} ${shown}`,
    shownAt: [firstAt, ...againAt],
    heightM,
    kind: mark?.shape === 'mark' ? mark.kind : parts.kind,
  };
}

function clockOf(token: Token, clock: 12 | 24): ClockTime | { readonly message: string } {
  const notATime = { message: `${quoted(token.text)} is not a time.` };
  const half = token.shape === 'time' ? token.half : null;
  const read = token.shape === 'time' ? token : token.shape === 'figure' ? token.clock : null;
  if (read === null || read.minute > 59) return notATime;
  if (clock === 12 && half === null) {
    return { message: `${quoted(token.text)} says neither AM nor PM.` };
  }
  if (half === null ? read.hour > 23 : read.hour < 1 || read.hour > 12) return notATime;
  const hour = half === null ? read.hour : (read.hour % 12) + (half === 'pm' ? 12 : 0);
  const pad = (figure: number): string => String(figure).padStart(2, '0');
  return `${pad(hour)}:${pad(read.minute)}` as ClockTime;
}

/** What can only be a time. */
function isTime(token: Token): boolean {
  return token.shape === 'time' || (token.shape === 'figure' && token.isSurelyClock);
}

/** What can only be a height. */
function isHeight(token: Token): boolean {
  return token.shape === 'figure' && token.clock === null;
}

function isFigure(token: Token | undefined): token is Figure {
  return token?.shape === 'figure';
}

// Metres to a tenth of a millimetre, so that 1.1 ft stays what a person would write.
function roundedM(heightM: number): number {
  return Math.round(heightM * 10_000) / 10_000;
}

function quoted(text: string): string {
  return `‘${text.trim()}’`;
}
