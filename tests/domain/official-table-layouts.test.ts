import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { METRES } from '#shared/domain/tides/official-table-reading.ts';
import type {
  HeightUnit,
  TableEvent,
  TableZone,
} from '#shared/domain/tides/official-table-reading.ts';
import { readOfficialTable } from '#shared/domain/tides/official-table.ts';
import { clockAt, dayAt, formatDay, fromIso } from '#shared/kernel/time.ts';
import type { CalendarDay, Instant } from '#shared/kernel/time.ts';
import { exampleCurve, tableOf } from './official-table-example.ts';

const MINUTE_MS = 60_000;
const DAY_MS = 86_400_000;
const curve = exampleCurve();

interface Layout {
  readonly zone: TableZone;
  readonly separator: '\t' | ';' | ',' | '  ';
  readonly date: 'iso' | 'slashes' | 'day-first' | 'month-first' | 'named' | 'weekday';
  readonly time: '24' | 'digits' | '12';
  readonly units: HeightUnit;
  readonly hasDecimalComma: boolean;
  readonly eventsARow: 1 | 2 | 4;
  readonly isTimeFirst: boolean;
  readonly isMarked: boolean;
  readonly hasHeading: boolean;
  readonly hasTitle: boolean;
}

const layouts: fc.Arbitrary<Layout> = fc
  .record({
    zone: fc.constantFrom<TableZone>('Europe/London', 'America/Los_Angeles', 0, 600, -210),
    separator: fc.constantFrom('\t', ';', ',', '  ' as const),
    date: fc.constantFrom('iso', 'slashes', 'day-first', 'month-first', 'named', 'weekday'),
    time: fc.constantFrom('24', 'digits', '12'),
    units: fc.constantFrom<HeightUnit>('m', 'cm', 'ft'),
    hasDecimalComma: fc.boolean(),
    eventsARow: fc.constantFrom(1, 2, 4),
    isTimeFirst: fc.boolean(),
    isMarked: fc.boolean(),
    hasHeading: fc.boolean(),
    hasTitle: fc.boolean(),
  })
  .map((layout) => layout as Layout)
  .filter(({ hasDecimalComma, separator }) => !hasDecimalComma || separator !== ',');

/** Somewhere in 2027, for forty days, so that days above 12 tell which number is the day. */
const spans = fc
  .integer({ min: 0, max: 325 })
  .map((day) => fromIso('2027-01-01T00:00Z') + day * DAY_MS);

describe('a table made from a curve', () => {
  it('reads back to itself in every layout', () => {
    fc.assert(
      fc.property(layouts, spans, (layout, fromAt) => {
        const events = tableOf(curve, fromAt, fromAt + 40 * DAY_MS);
        fc.pre(events.every(({ at }) => !isShownTwice(at, layout.zone)));
        const text = written(events, layout);
        const read = readOfficialTable(text, {
          zone: layout.zone,
          ...(layout.hasHeading ? {} : { units: layout.units }),
        });
        if (!read.isGranted) throw new Error(JSON.stringify(read.reasons));
        const { events: found, problems, units, clock } = read.value;
        expect(problems).toEqual([]);
        expect(found.map(({ at, kind }) => [at, kind])).toEqual(
          events.map(({ at, kind }) => [at, kind]),
        );
        const roundedM = layout.units === 'ft' ? 0.0153 : 0.0001;
        found.forEach(({ heightM }, place) => {
          expect(Math.abs(heightM - (events[place]?.heightM ?? NaN))).toBeLessThan(roundedM);
        });
        expect([units, clock]).toEqual([layout.units, layout.time === '12' ? 12 : 24]);
      }),
      { numRuns: 150 },
    );
  }, 60_000);
});

function written(events: readonly TableEvent[], layout: Layout): string {
  const lines: string[] = [];
  if (layout.hasTitle) lines.push('Tide table of an invented shore', 'Page 1');
  if (layout.hasHeading) {
    const unit = `Height (${layout.units})`;
    const each = [
      ...(layout.isTimeFirst ? ['Time', unit] : [unit, 'Time']),
      ...(layout.isMarked ? ['Type'] : []),
    ];
    const cells = Array.from({ length: layout.eventsARow }, () => each).flat();
    lines.push(['Date', ...cells].join(layout.separator));
  }
  const days = new Map<CalendarDay, TableEvent[]>();
  for (const event of events) {
    const { on } = wall(event.at, layout.zone);
    days.set(on, [...(days.get(on) ?? []), event]);
  }
  for (const [on, ofDay] of days) {
    for (let from = 0; from < ofDay.length; from += layout.eventsARow) {
      const cells = ofDay
        .slice(from, from + layout.eventsARow)
        .flatMap((event) => writtenEvent(event, layout));
      lines.push([writtenDate(on, layout), ...cells].join(layout.separator));
    }
  }
  return lines.join('\r\n');
}

function writtenEvent({ at, kind, heightM }: TableEvent, layout: Layout): string[] {
  const decimals = { m: 2, cm: 0, ft: 1 }[layout.units];
  const plain = (heightM / METRES[layout.units]).toFixed(decimals);
  const height = layout.hasDecimalComma ? plain.replace('.', ',') : plain;
  const time = writtenTime(wall(at, layout.zone).clock, layout);
  const mark = layout.isMarked ? [kind === 'high' ? 'HW' : 'LW'] : [];
  return [...(layout.isTimeFirst ? [time, height] : [height, time]), ...mark];
}

function writtenTime(clock: string, layout: Layout): string {
  if (layout.time === '24') return clock;
  if (layout.time === 'digits') return clock.replace(':', '');
  const hour = Number(clock.slice(0, 2));
  const shown = String(hour % 12 === 0 ? 12 : hour % 12).padStart(2, '0');
  return `${shown}:${clock.slice(3)} ${hour < 12 ? 'AM' : 'PM'}`;
}

function writtenDate(on: CalendarDay, layout: Layout): string {
  const [year = '', month = '', day = ''] = on.split('-');
  return {
    iso: on,
    slashes: `${year}/${month}/${day}`,
    'day-first': `${day}/${month}/${year}`,
    'month-first': `${month}/${day}/${year}`,
    named: `${formatDay(on, 'dayMonth')} ${year}`,
    weekday: `${formatDay(on, 'short')} ${year}`,
  }[layout.date];
}

function wall(at: Instant, zone: TableZone): { readonly on: CalendarDay; readonly clock: string } {
  if (typeof zone === 'string') return { on: dayAt(at, zone), clock: clockAt(at, zone) };
  const wallAt = at + zone * MINUTE_MS;
  return { on: dayAt(wallAt, 'UTC'), clock: clockAt(wallAt, 'UTC') };
}

function isShownTwice(at: Instant, zone: TableZone): boolean {
  const { on, clock } = wall(at, zone);
  return [-60, 60].some((minutes) => {
    const other = wall(at + minutes * MINUTE_MS, zone);
    return other.on === on && other.clock === clock;
  });
}
