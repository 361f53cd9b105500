import type { Instant } from '#shared/kernel/time.ts';

/** A high or low water as an official table gives it. */
export interface TableEvent {
  readonly at: Instant;
  readonly kind: 'high' | 'low';
  /** Above the datum of the table. */
  readonly heightM: number;
  /** The line of the text, the first being 1. */
  readonly row: number;
}

export type HeightUnit = 'm' | 'cm' | 'ft';

export const METRES: Readonly<Record<HeightUnit, number>> = { m: 1, cm: 0.01, ft: 0.3048 };

/** The zone in which a table is printed: an IANA name (local clock), or minutes ahead of UTC. */
export type TableZone = string | number;

/** Which number of a date such as 3/4/2027 is the day. */
export type DateOrder = 'day-first' | 'month-first';

export type ProblemWhy =
  | 'not-a-date'
  | 'not-a-time'
  | 'no-such-time'
  | 'time-twice'
  | 'not-a-height'
  | 'height-out-of-range'
  | 'heights-disagree'
  | 'missing'
  | 'swapped'
  | 'heading-swapped'
  | 'marks-exchanged'
  | 'not-alternating'
  | 'close-together'
  | 'out-of-order'
  | 'repeated';

/** What is amiss with one line. */
export interface TableProblem {
  readonly row: number;
  readonly why: ProblemWhy;
  /** A sentence for the person who holds the printed page. */
  readonly message: string;
  /** Whether a high or low water of the line was left out; else it was read, and is doubtful. */
  readonly isLeftOut: boolean;
}

/** What was recognised, to be shown before the table is accepted. */
export interface TableLayout {
  /** In words, such as 'date, time, height in cm' and 'separated by tabs'. */
  readonly words: readonly string[];
  readonly unitsFrom: 'given' | 'table' | 'two-columns' | 'sizes';
  readonly dateOrder: 'year-first' | 'month-named' | DateOrder;
  /** How the table itself names its zone; to be held against the zone it was read in. */
  readonly zoneSaid: string | null;
}

/** A table as it was read; events in order of time. */
export interface OfficialTable {
  readonly events: readonly TableEvent[];
  readonly problems: readonly TableProblem[];
  readonly layout: TableLayout;
  readonly units: HeightUnit;
  readonly clock: 12 | 24;
}

/** Why a text as a whole cannot be read as a table. */
export type TableRefusal =
  | { readonly why: 'empty' }
  | { readonly why: 'too-large'; readonly limitBytes: number; readonly limitLines: number }
  | { readonly why: 'spreadsheet' }
  | { readonly why: 'not-text' }
  | { readonly why: 'header-only' }
  | { readonly why: 'not-a-table' }
  | { readonly why: 'columns-unclear' }
  | { readonly why: 'units-unclear' }
  | { readonly why: 'year-needed' }
  | { readonly why: 'date-order-unclear'; readonly example: string }
  | { readonly why: 'no-such-zone'; readonly zone: string };
