import { granted, refused } from '#shared/kernel/result.ts';
import type { Verdict } from '#shared/kernel/result.ts';
import type { TableRefusal } from './official-table-reading.ts';
import { tokensOf } from './official-table-tokens.ts';
import type { Token } from './official-table-tokens.ts';

/** The largest text that is taken for a table, for whoever receives the upload to apply too. */
export const OFFICIAL_TABLE_LIMIT_BYTES = 5_000_000;

/** A year has some 1,411 highs and lows, here with room for a line to each and more between. */
const LIMIT_LINES = 10_000;

/** A line taken apart. */
export interface TableLine {
  readonly row: number;
  readonly text: string;
  readonly dates: readonly Extract<Token, { shape: 'date' }>[];
  /** Everything but dates, by column; a column keeps its number whatever a line leaves empty. */
  readonly values: ReadonlyMap<number, Token>;
}

export type Separator = 'tabs' | 'semicolons' | 'commas' | 'spaces';

/** The lines of a text by what they are for. */
export interface TableLines {
  readonly separator: Separator;
  /** Whatever stands above the rows; the last may be the heading of the columns. */
  readonly above: readonly string[];
  readonly heading: string | null;
  /** The columns that the heading says to be neither time nor height, such as a running number. */
  readonly otherColumns: ReadonlySet<number>;
  readonly rows: readonly TableLine[];
}

const MARKS: readonly (readonly [Separator, string | null])[] = [
  ['tabs', '\t'],
  ['semicolons', ';'],
  ['commas', ','],
  ['spaces', null],
];

/** The lines by which the separator is judged. */
const SAMPLE = 400;

/** More than any cell holds, so that the columns within it keep numbers of their own. */
const WITHIN_CELL = 16;

const HEADING_WORD =
  /\b(?:date|day|time|hour|height|heights|ht|high|low|hw|lw|water|pred|level|type|m|cm|ft|feet|metres?|meters?)\b/gi;

const OTHER_COLUMN = /^(?:#|no\.?|number|row|line|coef\w*\.?|range|moon.*|week)$/i;

/** Longer ones are prose: no row of a day is a quarter of this. */
const LONGEST_LINE = 1_000;

/** Refuses what is no text before it is looked at any further. */
export function linesOf(text: string): Verdict<TableLines, TableRefusal> {
  const tooLarge = refused({
    why: 'too-large',
    limitBytes: OFFICIAL_TABLE_LIMIT_BYTES,
    limitLines: LIMIT_LINES,
  } as const);
  if (text.length > OFFICIAL_TABLE_LIMIT_BYTES) return tooLarge;
  const binary = binaryKind(text);
  if (binary !== null) return refused({ why: binary });
  const lines = text.replace(/^\ufeff/, '').split(/\r\n|\n|\r/);
  if (lines.length > LIMIT_LINES) return tooLarge;
  if (lines.every((line) => line.trim() === '')) return refused({ why: 'empty' });
  return inColumns(lines);
}

/** What older spreadsheets begin with, as text that was decoded byte by byte. */
const OLD_SPREADSHEET = '\u00d0\u00cf\u0011';

/** Bytes that were no text in the encoding they were read in: a few may be accents, more are not. */
const MOST_UNREADABLE = 0.01;

function binaryKind(text: string): 'spreadsheet' | 'not-text' | null {
  let unreadable = 0;
  let controls = 0;
  for (let place = 0; place < text.length; place += 1) {
    const code = text.charCodeAt(place);
    if (code === 0xfffd) unreadable += 1;
    else if (code < 0x20 && !(code >= 0x09 && code <= 0x0d)) controls += 1;
  }
  // Zip archives, as most spreadsheets are, begin with PK and a control character.
  if (text.startsWith(OLD_SPREADSHEET)) return 'spreadsheet';
  if (text.startsWith('PK') && controls > 0) return 'spreadsheet';
  const isBinary = controls > 0 || unreadable > text.length * MOST_UNREADABLE;
  return isBinary || text.startsWith('%PDF') ? 'not-text' : null;
}

function inColumns(lines: readonly string[]): Verdict<TableLines, TableRefusal> {
  const sample = lines.filter((line) => /\d/.test(line)).slice(0, SAMPLE);
  let best: { readonly separator: Separator; readonly mark: string | null } | null = null;
  let bestScore = 0;
  for (const [separator, mark] of MARKS) {
    const marked = sample.filter((line) => mark !== null && line.includes(mark)).length;
    if (mark !== null && marked * 2 < sample.length) continue;
    const score = sample.reduce((sum, line) => sum + fitness(lineOf(line, 0, mark)), 0);
    if (score > bestScore) {
      best = { separator, mark };
      bestScore = score;
    }
  }
  if (best === null) {
    return refused({ why: lines.some(isHeading) ? 'header-only' : 'not-a-table' });
  }
  const { separator, mark } = best;
  const parsed = lines.map((line, index) => lineOf(line, index + 1, mark));
  const firstFit = parsed.findIndex((line) => fitness(line) > 0);
  const shape = piecesOf(parsed[firstFit]);
  const heading = lines.slice(0, firstFit).findLastIndex(isHeading);
  // A first line that cannot be read must be reported, not be taken for a title.
  const first = parsed.findIndex(
    (line, index) =>
      index === firstFit ||
      (index > heading && line.dates.length < 2 && piecesOf(line) === shape && isRow(line)),
  );
  return granted({
    separator,
    above: lines.slice(0, first),
    heading: lines[heading] ?? null,
    otherColumns: otherColumns(lines[heading] ?? '', mark),
    rows: parsed.slice(first).filter(isRow),
  });
}

function otherColumns(heading: string, mark: string | null): Set<number> {
  const columns = mark === null ? [] : cellsOf(heading, mark);
  return new Set(
    columns.flatMap((cell, place) => (OTHER_COLUMN.test(cell.trim()) ? [place * WITHIN_CELL] : [])),
  );
}

function piecesOf(line: TableLine | undefined): number {
  return line === undefined ? 0 : line.dates.length + line.values.size;
}

function isRow({ text }: TableLine): boolean {
  return /\d/.test(text) && !text.trimStart().startsWith('#');
}

function isHeading(line: string): boolean {
  const words = line.toLowerCase().match(HEADING_WORD) ?? [];
  return new Set(words).size >= 2 && tokensOf(line).every(({ shape }) => shape !== 'date');
}

function lineOf(text: string, row: number, mark: string | null): TableLine {
  const dates: Extract<Token, { shape: 'date' }>[] = [];
  const values = new Map<number, Token>();
  const cells = text.length > LONGEST_LINE ? [] : cellsOf(text, mark);
  cells.forEach((cell, place) => {
    let column = place * WITHIN_CELL;
    for (const token of tokensOf(cell)) {
      if (token.shape === 'date') dates.push(token);
      // Among spaces a word would push the columns after it out of place.
      else if (mark !== null || token.shape !== 'word') {
        values.set(column, token);
        column += 1;
      }
    }
  });
  return { row, text, dates, values };
}

function cellsOf(text: string, mark: string | null): string[] {
  if (mark === null) return [text];
  const cells: string[] = [];
  let cell = '';
  let isQuoted = false;
  for (const character of text) {
    if (character === '"') isQuoted = !isQuoted;
    else if (character === mark && !isQuoted) {
      cells.push(cell);
      cell = '';
    } else cell += character;
  }
  return [...cells, cell];
}

/** How well a line fits a row: a date, and a time for every height or for every two. */
function fitness({ dates, values }: TableLine): number {
  if (dates.length !== 1) return 0;
  let times = 0;
  let heights = 0;
  let all = 0;
  for (const token of values.values()) {
    if (token.shape !== 'time' && token.shape !== 'figure') continue;
    all += 1;
    if (token.shape === 'time' || token.isSurelyClock) times += 1;
    else if (token.clock === null) heights += 1;
  }
  if (all === 0) return 0;
  if (all % 2 === 0 && times <= all / 2 && heights <= all / 2) return 2;
  return all % 3 === 0 && times <= all / 3 && heights <= (all / 3) * 2 ? 1 : 0;
}
