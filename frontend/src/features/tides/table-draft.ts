import type { TableText } from '#shared/contracts/tide-tables.ts';
import { LONGEST_TEXT } from './read-table-file.ts';

/** A table as it is being told about, just as it was typed; nothing is chosen beforehand. */
export interface TableDraft {
  readonly stationId: string;
  readonly name: string;
  readonly zoneKind: '' | 'local' | 'utc' | 'fixed';
  readonly offset: string;
  readonly units: '' | NonNullable<TableText['units']>;
  readonly dateOrder: '' | NonNullable<TableText['dateOrder']>;
  readonly year: string;
  readonly text: string;
}

/** What is wrong, beside the part of the request that it is about. */
export type TableErrors = Readonly<Partial<Record<keyof TableText, string>>>;

/** What has come of a table that is in force now. */
export interface Accepted {
  readonly name: string;
  readonly moved: number;
}

export const emptyTable: TableDraft = {
  stationId: '',
  name: '',
  zoneKind: '',
  offset: '',
  units: '',
  dateOrder: '',
  year: '',
  text: '',
};

/**
 * What a draft asks of the server, or what of it cannot be sent: choices that nobody made, an
 * offset or a year that is none, and more text than the server reads.
 */
export function readTable(
  draft: TableDraft,
  stations: readonly { readonly id: string; readonly zone: string }[],
): { readonly table: TableText | null; readonly errors: TableErrors } {
  const station = stations.find(({ id }) => id === draft.stationId);
  const zone = zoneOf(draft, station?.zone);
  const year = draft.year.trim() === '' ? null : Number(draft.year.trim());
  const errors: TableErrors = {
    ...(station === undefined ? { stationId: 'Choose a tide station.' } : {}),
    ...(zone === null ? { zone: whyNoZone(draft) } : {}),
    ...(year !== null && !Number.isInteger(year) ? { year: 'Write a year like 2027.' } : {}),
    ...(draft.text.length > LONGEST_TEXT ? { text: 'This is far more than a year of tides.' } : {}),
  };
  if (station === undefined || zone === null || Object.keys(errors).length > 0) {
    return { table: null, errors };
  }
  const table: TableText = {
    stationId: station.id,
    name: draft.name,
    zone,
    units: draft.units === '' ? null : draft.units,
    dateOrder: draft.dateOrder === '' ? null : draft.dateOrder,
    year,
    text: draft.text,
  };
  return { table, errors };
}

/** Whether two requests read the same table in the same way. */
export function isSameTable(one: TableText, other: TableText): boolean {
  return (Object.keys(one) as (keyof TableText)[]).every((key) => one[key] === other[key]);
}

function zoneOf(draft: TableDraft, stationZone: string | undefined): string | null {
  switch (draft.zoneKind) {
    case 'local':
      return stationZone ?? null;
    case 'utc':
      return 'UTC';
    case 'fixed':
      return offsetOf(draft.offset);
    case '':
      return null;
  }
}

function whyNoZone({ zoneKind, stationId }: TableDraft): string {
  if (zoneKind === 'fixed') return 'Write the offset like +01:00.';
  return zoneKind === 'local' && stationId === ''
    ? 'Choose the tide station first.'
    : 'Say which clock the times are printed in.';
}

/** An offset from UTC as the server takes it, '+01:00', from '+1', '+1:00' and the like. */
function offsetOf(text: string): string | null {
  const plain = text.trim().replace('−', '-');
  const { sign, hours, minutes } =
    /^(?<sign>[+-])(?<hours>\d{1,2})(?::?(?<minutes>[0-5]\d))?$/.exec(plain)?.groups ?? {};
  if (sign === undefined || hours === undefined) return null;
  return `${sign}${hours.padStart(2, '0')}:${minutes ?? '00'}`;
}
