import type { z } from 'zod';
import { seeTables, tablePreview } from '#shared/contracts/tide-tables.ts';
import type { TablePreview } from '#shared/contracts/tide-tables.ts';
import { idOf, zone } from './made-up-replies.ts';

/** Replies about invented official tide tables, each parsed by its own contract. */
export function tables() {
  return seeTables.reply.parse({
    tables: [
      {
        id: idOf(71),
        stationId: 'made-up/outer-skerrow',
        stationName: 'Outer Skerrow',
        name: 'Skerrow harbour tables 2027',
        zone: '+01:00',
        firstOn: '2027-01-01',
        lastOn: '2027-12-31',
        eventCount: 1410,
        acceptedAt: '2027-01-04T09:30:00.000Z',
        acceptedBy: 'Ines Thackeray',
        takenBackAt: null,
      },
      {
        id: idOf(72),
        stationId: 'made-up/outer-skerrow',
        stationName: 'Outer Skerrow',
        name: 'Skerrow harbour tables 2026',
        zone,
        firstOn: '2026-01-01',
        lastOn: '2026-12-31',
        eventCount: 1409,
        acceptedAt: '2026-01-03T09:30:00.000Z',
        acceptedBy: null,
        takenBackAt: '2026-02-10T09:30:00.000Z',
      },
    ],
    stations: [
      { id: 'made-up/outer-skerrow', name: 'Outer Skerrow', shoreNames: ['Gull Ledges'], zone },
    ],
  });
}

type Written = z.input<typeof tablePreview>;
type Moved = Written['movedSessions'][number];

function moved(number: number, minutes: number, changes: Partial<Moved> = {}): Moved {
  const at = (after: number): string =>
    new Date(Date.UTC(2027, 4, number, 9, 5 + after)).toISOString();
  return {
    sessionId: idOf(100 + number),
    title: 'Sunday families',
    shoreName: 'Gull Ledges',
    zone,
    fromLowWaterAt: at(0),
    toLowWaterAt: at(minutes),
    movedMinutes: minutes,
    heightChangeM: -0.12,
    newStartsAt: at(minutes - 120),
    newOffTheShoreBy: at(minutes + 30),
    ...changes,
  };
}

/** A table that agrees with the prediction, and moves two sessions by more than five minutes. */
export function readTable(changes: Partial<Written> = {}): TablePreview {
  return tablePreview.parse({
    eventCount: 1410,
    firstOn: '2027-01-01',
    lastOn: '2027-12-31',
    layout: 'date, time, height in m; one event a line',
    problems: [],
    refusal: null,
    comparison: {
      verdict: 'agrees',
      sentence: 'It agrees with the prediction for this station.',
      pairs: 1408,
      medianMinutes: 3,
      worstMinutes: 11.4,
      medianM: 0.04,
      worstM: 0.21,
    },
    clockChanges: [
      { on: '2026-03-29', zoneName: '', isChangeDay: true, events: [] },
      {
        on: '2027-03-27',
        zoneName: 'GMT',
        isChangeDay: false,
        events: [{ at: '2027-03-27T00:16:00.000Z', kind: 'low', heightM: 1.11 }],
      },
      {
        on: '2027-03-28',
        zoneName: 'BST',
        isChangeDay: true,
        events: [{ at: '2027-03-28T06:47:00.000Z', kind: 'high', heightM: 4.41 }],
      },
    ],
    movedSessions: [
      moved(8, 3),
      moved(9, 12),
      moved(10, -7, { newStartsAt: null, newOffTheShoreBy: null }),
    ],
    mayAccept: true,
    ...changes,
  });
}

/** The same table read in the wrong zone. */
export function mistakenTable(): TablePreview {
  return readTable({
    comparison: {
      verdict: 'zone-mistake',
      sentence: 'Throughout it is 60 minutes early.',
      pairs: 1408,
      medianMinutes: 60,
      worstMinutes: 71,
      medianM: 0.04,
      worstM: 0.21,
    },
    mayAccept: false,
  });
}
