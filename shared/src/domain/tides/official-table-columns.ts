import type { TableLine, TableLines } from './official-table-lines.ts';
import type { Token } from './official-table-tokens.ts';

/** Which columns make up each event of a row, in the order of the columns. */
export interface EventColumns {
  readonly events: readonly {
    readonly time: number;
    /** One, or two in different units. */
    readonly heights: readonly number[];
    readonly mark: number | null;
    /** By the heading, such as HW over its columns. */
    readonly kind: 'high' | 'low' | null;
  }[];
  readonly heightsEach: 1 | 2;
  readonly isTimeFirst: boolean;
  /** The heading names time and height the other way round. */
  readonly isHeadingSwapped: boolean;
}

type Role = 'time' | 'height' | 'either';

/** A column in which fewer can be read as a time holds no times, whatever mistakes it has. */
const SHARE_OF_CLOCK = 0.8;

/** Of a day: four, and as many again at places where high waters are double. */
const MOST_EVENTS = 8;

const TIME_WORD = /\b(?:time|hour|clock)\b/i;
const HEIGHT_WORD = /\b(?:height|heights|ht|hgt|level|pred|cm|ft|feet|m|metres?|meters?)\b/i;
const KIND_WORD = /\b(?<word>high|low|hw|lw)\b/gi;

/**
 * The roles of the columns by what stands in them, and by the heading where that leaves a doubt;
 * null where it stays. Among spaces an empty place does not show, so that the kinds over columns
 * only count when every line fills them all.
 */
export function eventColumns({
  separator,
  rows,
  heading,
  otherColumns,
}: TableLines): EventColumns | null {
  const marks: number[] = [];
  const roles: { readonly column: number; readonly role: Role }[] = [];
  for (const [column, tokens] of [...byColumn(rows.filter(isFigures))].sort(([a], [b]) => a - b)) {
    const marked = tokens.filter(({ shape }) => shape === 'mark').length;
    const words = tokens.filter(({ shape }) => shape === 'word').length;
    if (marked * 2 >= tokens.length) marks.push(column);
    else if (words * 2 < tokens.length && !otherColumns.has(column))
      roles.push({ column, role: roleOf(tokens) });
  }
  const settled = settle(
    roles.map(({ role }) => role),
    heading,
  );
  if (settled === null) return null;
  const columnsOf = (role: Role): number[] =>
    roles.filter((_, place) => settled[place] === role).map(({ column }) => column);
  const times = columnsOf('time');
  const heights = columnsOf('height');
  if (times.length > MOST_EVENTS) return null;
  const heightsEach = heights.length / times.length;
  if (heightsEach !== 1 && heightsEach !== 2) return null;
  const isPlaced =
    separator !== 'spaces' || rows.every(({ values }) => times.every((time) => values.has(time)));
  const kinds = isPlaced ? kindsOf(heading, times.length) : null;
  const isTimeFirst = settled[0] === 'time';
  return {
    events: times.map((time, place) => ({
      time,
      heights: heights.slice(place * heightsEach, (place + 1) * heightsEach),
      mark: marks.length === times.length ? (marks[place] ?? null) : null,
      kind: kinds?.[place] ?? null,
    })),
    heightsEach,
    isTimeFirst,
    isHeadingSwapped: isHeadingTimeFirst(heading) === !isTimeFirst,
  };
}

/** A line of words, such as one at the foot of a page, says nothing of the columns. */
function isFigures({ dates, values }: TableLine): boolean {
  const words = [...values.values()].filter(({ shape }) => shape === 'word').length;
  return words * 2 < dates.length + values.size;
}

function byColumn(rows: readonly TableLine[]): Map<number, Token[]> {
  const columns = new Map<number, Token[]>();
  for (const { values } of rows) {
    for (const [column, token] of values) {
      const tokens = columns.get(column);
      if (tokens === undefined) columns.set(column, [token]);
      else tokens.push(token);
    }
  }
  // What stands in one line of a hundred is a slip of that line, and no column.
  return new Map([...columns].filter(([, tokens]) => tokens.length * 100 >= rows.length));
}

function roleOf(tokens: readonly Token[]): Role {
  let valued = 0;
  let clocks = 0;
  let sure = 0;
  let written = 0;
  for (const token of tokens) {
    if (token.shape === 'time') written += 1;
    else if (token.shape !== 'figure') continue;
    else if (token.clock !== null) clocks += 1;
    if (token.shape === 'figure' && token.isSurelyClock) sure += 1;
    valued += 1;
  }
  if (written * 2 >= valued) return 'time';
  if (written + clocks < valued * SHARE_OF_CLOCK) return 'height';
  return (written + sure) * 20 >= valued ? 'time' : 'either';
}

/** Columns that could be both, by their turn among the others, or by the heading. */
function settle(roles: readonly Role[], heading: string | null): Role[] | null {
  if (roles.length === 0) return null;
  if (!roles.includes('either')) return [...roles];
  const inTurn = (isTimeFirst: boolean): Role[] =>
    roles.map((_, place) => ((place % 2 === 0) === isTimeFirst ? 'time' : 'height'));
  const fits = (turn: readonly Role[]): boolean =>
    roles.every((role, place) => role === 'either' || role === turn[place]);
  const isKnown = roles.some((role) => role !== 'either');
  if (isKnown) {
    const turn = [inTurn(true), inTurn(false)].find(fits);
    if (turn !== undefined && roles.length % 2 === 0) return turn;
    const other = roles.includes('time') ? 'height' : 'time';
    return roles.map((role) => (role === 'either' ? other : role));
  }
  const isTimeFirst = isHeadingTimeFirst(heading);
  return isTimeFirst === null ? null : inTurn(isTimeFirst);
}

function isHeadingTimeFirst(heading: string | null): boolean | null {
  const time = heading?.search(TIME_WORD) ?? -1;
  const height = heading?.search(HEIGHT_WORD) ?? -1;
  return time < 0 || height < 0 ? null : time < height;
}

/** HW and LW in the heading, once for each event or once for each of its two columns. */
function kindsOf(heading: string | null, events: number): ('high' | 'low')[] | null {
  const kinds = [...(heading ?? '').matchAll(KIND_WORD)].map(({ 0: word }) =>
    word.toLowerCase().startsWith('h') ? ('high' as const) : ('low' as const),
  );
  if (kinds.length === events) return kinds;
  if (kinds.length !== events * 2) return null;
  const isTwice = kinds.every((kind, place) => kind === kinds[place - (place % 2)]);
  return isTwice ? kinds.filter((_, place) => place % 2 === 0) : null;
}
