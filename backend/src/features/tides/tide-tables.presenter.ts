import type { z } from 'zod';
import type { Shore } from '#backend/features/shores/shores.reader.ts';
import type { StationFacts } from '#backend/platform/tides/tide-stations.ts';
import type { seeTables, TablePreview } from '#shared/contracts/tide-tables.ts';
import { mayAcceptTable } from '#shared/domain/tides/official-table-acceptance.ts';
import { datesRoundClockChanges } from '#shared/domain/tides/official-table-clock-changes.ts';
import type { OfficialTable, TableZone } from '#shared/domain/tides/official-table-reading.ts';
import { dayAt, toIso, yearOf } from '#shared/kernel/time.ts';
import type { TableMove, TableRead } from './read-table.ts';
import { sayComparison, sayTableRefusal } from './say-table.ts';
import { presentHeightM } from './tides.presenter.ts';
import type { TableListed } from './tide-tables.repository.ts';

export function presentTablePreview(read: TableRead): TablePreview {
  const { table, comparison, station, zone } = read;
  const value = table.isGranted ? table.value : null;
  const events = value?.events ?? [];
  const first = events[0];
  const last = events.at(-1);
  return {
    eventCount: events.length,
    firstOn: first === undefined ? null : dayAt(first.at, station.zone),
    lastOn: last === undefined ? null : dayAt(last.at, station.zone),
    layout: value === null ? '' : layoutWords(value),
    problems: (value?.problems ?? []).map(({ row, message }) => ({ row, message })),
    refusal: table.isGranted ? null : sayTableRefusal(table.reasons[0]),
    comparison:
      comparison === null
        ? null
        : {
            verdict: comparison.verdict,
            sentence: sayComparison(comparison),
            pairs: comparison.pairs.length,
            medianMinutes: comparison.medianMinutes ?? 0,
            worstMinutes: comparison.worstMinutes ?? 0,
            medianM: comparison.medianM ?? 0,
            worstM: comparison.worstM ?? 0,
          },
    clockChanges: value === null ? [] : presentClockChanges(value, zone, station.zone),
    movedSessions: read.moves.map(presentMove),
    mayAccept: mayAcceptTable({ table, comparison, leavesOutProblems: true }).isGranted,
  };
}

function layoutWords({ layout }: OfficialTable): string {
  const said =
    layout.zoneSaid === null ? [] : [`the table itself names its zone ${layout.zoneSaid}`];
  return [...layout.words, ...said].join('; ');
}

function presentClockChanges(
  { events }: OfficialTable,
  zone: TableZone,
  shoreZone: string,
): TablePreview['clockChanges'] {
  const years = [...new Set(events.map(({ at }) => yearOf(dayAt(at, shoreZone))))];
  return years.flatMap((year) =>
    datesRoundClockChanges(events, { table: zone, shore: shoreZone }, year).flatMap((change) =>
      change.days.map((day) => ({
        on: day.on,
        zoneName: day.events[0]?.printed.zoneName ?? '',
        isChangeDay: day.on === change.on,
        events: day.events.map(({ event }) => ({
          at: toIso(event.at),
          kind: event.kind,
          heightM: presentHeightM(event.heightM),
        })),
      })),
    ),
  );
}

function presentMove({
  session,
  shore,
  moved,
  window,
}: TableMove): TablePreview['movedSessions'][number] {
  return {
    sessionId: session.id,
    title: session.title,
    shoreName: shore.name,
    zone: shore.zone,
    fromLowWaterAt: toIso(session.lowWaterAt),
    toLowWaterAt: moved.newLowWaterAt === null ? null : toIso(moved.newLowWaterAt),
    movedMinutes: moved.laterMinutes,
    heightChangeM: moved.higherM === null ? null : presentHeightM(moved.higherM),
    newStartsAt: window === null ? null : toIso(window.startsAt),
    newOffTheShoreBy: window === null ? null : toIso(window.offTheShoreBy),
  };
}

export function presentTables(
  tables: readonly TableListed[],
  stations: readonly { readonly station: StationFacts; readonly shores: readonly Shore[] }[],
): z.input<typeof seeTables.reply> {
  const nameOf = (stationId: string): string =>
    stations.find(({ station }) => station.id === stationId)?.station.name ?? stationId;
  return {
    tables: tables.map((table) => ({
      id: table.id,
      stationId: table.stationId,
      stationName: nameOf(table.stationId),
      name: table.name,
      zone: table.zone,
      firstOn: dayAt(table.firstAt, 'UTC'),
      lastOn: dayAt(table.lastAt, 'UTC'),
      eventCount: table.eventCount,
      acceptedAt: toIso(table.acceptedAt),
      acceptedBy: table.acceptedBy,
      takenBackAt: table.takenBackAt === null ? null : toIso(table.takenBackAt),
    })),
    stations: stations.map(({ station, shores }) => ({
      id: station.id,
      name: station.name,
      shoreNames: shores.map(({ name }) => name),
      zone: station.zone,
    })),
  };
}
