import { describe, expect, it } from 'vitest';
import { OFFICIAL_TABLE_LIMIT_BYTES } from '#shared/domain/tides/official-table-lines.ts';
import { readOfficialTable } from '#shared/domain/tides/official-table.ts';
import type { TableQuestions } from '#shared/domain/tides/official-table.ts';
import type { OfficialTable } from '#shared/domain/tides/official-table-reading.ts';
import { fromIso, toIso } from '#shared/kernel/time.ts';
import { exampleCurve, plainLines, tableOf } from './official-table-example.ts';

const LONDON = 'Europe/London';
const curve = exampleCurve();

/** 400 events, marked; no clock change in them. */
const events = tableOf(curve, fromIso('2027-04-01T00:00Z'), fromIso('2027-10-01T00:00Z')).slice(
  0,
  400,
);
const lines = plainLines(events, LONDON);

describe('a text that is no table', () => {
  it.each([
    ['nothing', '', 'empty'],
    ['blank lines', ' \n\t\n', 'empty'],
    ['a spreadsheet', 'PK\u0003\u0004\u0014\u0000\u0006xl/worksheets', 'spreadsheet'],
    ['an older spreadsheet', '\u00d0\u00cf\u0011\u00e0\u00a1', 'spreadsheet'],
    ['a printed page', '%PDF-1.7 1 0 obj', 'not-text'],
    ['a picture', '\ufffdPNG\u001a\u0000\u0000', 'not-text'],
    ['a heading alone', 'Date,Time,Height (m)\n', 'header-only'],
    ['a letter', 'Dear all,\nthe table follows on 3 May.\n', 'not-a-table'],
    ['more lines than any year has', '2027-01-01 00:31 1.2\n'.repeat(10_001), 'too-large'],
    ['a line without an end', `2027-01-01${' 00:31 1.2'.repeat(100_000)}`, 'not-a-table'],
    ['too much', '1'.repeat(OFFICIAL_TABLE_LIMIT_BYTES + 1), 'too-large'],
  ])('is refused as a whole: %s', (_, text, why) => {
    expect(whyRefused(text, { zone: LONDON })).toBe(why);
  });

  it('is refused for a zone that is none', () => {
    expect(whyRefused(lines.join('\n'), { zone: 'BST' })).toBe('no-such-zone');
  });
});

describe('what a table leaves open', () => {
  const twoDays = '01/02/2027 00:31 1.23 06:40 5.61';

  it('is asked: which number is the day, when the dates do not tell', () => {
    expect(whyRefused(twoDays, { zone: LONDON })).toBe('date-order-unclear');
    const asDay = read(twoDays, { zone: LONDON, dateOrder: 'day-first' });
    const asMonth = read(twoDays, { zone: LONDON, dateOrder: 'month-first' });
    expect(toIso(asDay.events[0]?.at ?? 0)).toBe('2027-02-01T00:31:00.000Z');
    expect(toIso(asMonth.events[0]?.at ?? 0)).toBe('2027-01-02T00:31:00.000Z');
  });

  it.each([
    ['a number above 12', '13/02/2027 01:31 1.23 07:40 5.61', 'day-first'],
    ['dates a day apart', '02/02/2027 01:21 1.23 07:30 5.61', 'day-first'],
    ['dates a day apart, months first', '01/03/2027 01:21 1.23 07:30 5.61', 'month-first'],
  ])('is decided by the whole table where it can be: %s', (_, next, order) => {
    expect(read(`${twoDays}\n${next}`, { zone: LONDON }).layout.dateOrder).toBe(order);
  });

  it('is asked: the year, when the dates have none', () => {
    const text = 'Sun 1 Feb 00:31 1.23 06:40 5.61';
    expect(whyRefused(text, { zone: LONDON })).toBe('year-needed');
    expect(toIso(read(text, { zone: LONDON, year: 2026 }).events[0]?.at ?? 0)).toBe(
      '2026-02-01T00:31:00.000Z',
    );
  });

  it('is asked: the units, when whole numbers could be any', () => {
    const text = '2027-02-01 00:31 1 06:40 6';
    expect(whyRefused(text, { zone: LONDON })).toBe('units-unclear');
    expect(read(text, { zone: LONDON, units: 'm' }).events[1]?.heightM).toBe(6);
  });
});

describe('a table in feet', () => {
  const inFeet = events.map(({ heightM }, place) =>
    (lines[place] ?? '').replace(/,[^,]*,(?=[HL])/, `,${(heightM / 0.3048).toFixed(1)},`),
  );

  it.each([
    ['the heading says so', 'Date,Time,Height (ft),Type', 'table'],
    ['no tide is as high in metres', 'Date,Time,Height,Type', 'sizes'],
  ])('is known for one: %s', (_, heading, from) => {
    const table = read([heading, ...inFeet].join('\n'), { zone: LONDON });
    expect([table.units, table.layout.unitsFrom]).toEqual(['ft', from]);
    for (const [place, event] of table.events.entries()) {
      expect(Math.abs(event.heightM - (events[place]?.heightM ?? NaN))).toBeLessThan(0.016);
    }
  });
});

describe('a table with two heights in different units', () => {
  it('names a line in which they are not one height', () => {
    const text = '2027-02-01 00:31 4.0 122 L\n2027-02-01 06:40 18.4 56 H\n'.concat(
      Array.from({ length: 12 }, (_, day) => `2027-02-${day + 10} 06:40 18.4 561 H`).join('\n'),
    );
    const table = read(text, { zone: LONDON });
    expect(table.problems.filter(({ why }) => why === 'heights-disagree')).toEqual([
      expect.objectContaining({ row: 2, isLeftOut: true }),
    ]);
  });
});

describe('a table with time and height in each other’s columns', () => {
  const swapped = (line: string): string => {
    const [on = '', clock = '', height = '', mark = ''] = line.split(',');
    return [on, height, clock, mark].join(',');
  };

  it('is read by what stands in them, and says that the heading is wrong', () => {
    const table = read(['Date,Time,Height (m),Type', ...lines.map(swapped)].join('\n'));
    expect(table.events.map(({ at }) => at)).toEqual(events.map(({ at }) => at));
    expect(table.problems).toEqual([
      expect.objectContaining({ row: 1, why: 'heading-swapped', isLeftOut: false }),
    ]);
  });

  it('says so of a single line, and leaves it out', () => {
    const table = read(lines.map((line, place) => (place === 9 ? swapped(line) : line)).join('\n'));
    expect(table.events).toHaveLength(399);
    expect(table.problems).toEqual([
      expect.objectContaining({
        row: 10,
        why: 'swapped',
        message: 'Time and height stand in each other’s columns.',
      }),
    ]);
  });
});

describe('400 lines of which 7 are bad', () => {
  const bad = new Map<number, readonly [string, string]>([
    [20, ['2027-02-30,04:10,1.20,L', 'not-a-date']],
    [60, [replaced(60, 1, '25:61'), 'not-a-time']],
    [100, [replaced(100, 2, '99.0'), 'height-out-of-range']],
    [150, [replaced(150, 2, ''), 'missing']],
    [200, [lines[198] ?? '', 'repeated']],
    [250, [replaced(250, 0, '2027-09-30'), 'out-of-order']],
    [300, [replaced(300, 2, 'high'), 'not-a-height']],
  ]);
  const text = lines.map((line, place) => bad.get(place + 1)?.[0] ?? line).join('\n');

  it('lists the seven by their rows, and reads the rest', () => {
    const table = read(text);
    expect(table.problems.map(({ row, why }) => [row, why])).toEqual(
      [...bad].map(([row, [, why]]) => [row, why]),
    );
    expect(table.problems.every(({ isLeftOut }) => isLeftOut)).toBe(true);
    expect(table.events).toEqual(
      events.filter((_, place) => !bad.has(place + 1)).map((event) => event),
    );
  });
});

describe('a bad line', () => {
  it('is reported when it is the first below the heading', () => {
    const table = read(['Date,Time,Height (m)', '2027-04-XX,00:31,1.2,L', ...lines].join('\n'));
    expect(table.events).toHaveLength(400);
    expect(table.problems).toEqual([expect.objectContaining({ row: 2, why: 'not-a-date' })]);
  });

  it('with a high water lower than the lows beside it is left out, marked or not', () => {
    for (const withMark of [true, false]) {
      const text = lines
        .map((line, place) =>
          events[place]?.kind === 'high' && place > 50 && place < 53
            ? replaced(place + 1, 2, '0.05')
            : line,
        )
        .map((line) => (withMark ? line : line.replace(/,[HL]$/, '')))
        .join('\n');
      const table = read(text);
      expect(table.events).toHaveLength(399);
      expect(table.problems.map(({ why }) => why)).toEqual(['not-alternating']);
    }
  });

  it('that is missing shows as two highs or lows that follow one another', () => {
    const table = read(lines.filter((_, place) => place !== 70).join('\n'));
    expect(table.events).toHaveLength(399);
    expect(table.problems).toEqual([
      expect.objectContaining({ row: 71, why: 'not-alternating', isLeftOut: false }),
    ]);
  });

  it('with a slip in its year is left out, even where no line follows it', () => {
    const table = read([...lines, '2207-09-30,23:10,1.20,L'].join('\n'));
    expect(table.events).toHaveLength(400);
    expect(table.problems).toEqual([expect.objectContaining({ row: 401, why: 'out-of-order' })]);
  });

  it('less than two hours after another is doubtful', () => {
    const text = [
      '2027-05-01 00:31 1.0 L',
      '2027-05-01 06:40 5.0 H',
      '2027-05-01 08:10 4.8 L',
      '2027-05-01 12:30 5.2 H',
    ].join('\n');
    expect(read(text).problems).toEqual([
      expect.objectContaining({ row: 3, why: 'close-together', isLeftOut: false }),
    ]);
  });

  it('says neither AM nor PM on a twelve hour clock', () => {
    const text = [
      '2027-05-01 12:31 AM 1.0 L',
      '2027-05-01 06:40 AM 5.0 H',
      '2027-05-01 12:50 0.8 L',
      '2027-05-01 06:59 PM 5.2 H',
    ].join('\n');
    const table = read(text);
    expect(table.clock).toBe(12);
    expect(table.problems).toEqual([expect.objectContaining({ row: 3, why: 'not-a-time' })]);
  });

  it('that marks high and low the other way round throughout is named once, and all is read', () => {
    const exchanged = lines.map((line) =>
      line.replace(/[HL]$/, (mark) => (mark === 'H' ? 'L' : 'H')),
    );
    const table = read(exchanged.join('\n'));
    expect(table.events).toHaveLength(400);
    expect(table.problems.map(({ why }) => why)).toEqual(['marks-exchanged']);
  });
});

describe('clock changes in a table', () => {
  // London, 2027: clocks go forward at 01:00 on 28 March and back at 02:00 on 31 October.
  it('leave no time in the hour that is skipped', () => {
    const table = read('2027-03-28 01:30 1.0 L\n2027-03-28 08:40 5.0 H\n2027-03-28 14:40 1.1 L');
    expect(table.events).toHaveLength(2);
    expect(table.problems).toEqual([expect.objectContaining({ row: 1, why: 'no-such-time' })]);
  });

  it.each([
    ['the first, when nothing tells', '2027-10-30 19:10 5.0 H', '2027-10-31T00:30Z'],
    ['the second, when the first is too soon', '2027-10-30 23:45 5.0 H', '2027-10-31T01:30Z'],
  ])('show an hour twice: it is read as %s, and said', (_, before, iso) => {
    const table = read(`${before}\n2027-10-31 01:30 1.0 L\n2027-10-31 07:40 5.0 H`);
    expect(table.events[1]?.at).toBe(fromIso(iso));
    expect(table.problems.filter(({ why }) => why === 'time-twice')).toEqual([
      expect.objectContaining({ row: 2, isLeftOut: false }),
    ]);
  });

  it('do not touch a table in a fixed zone', () => {
    const text = '2027-03-28 01:30 1.0 L\n2027-03-28 07:40 5.0 H\n2027-10-31 01:30 1.0 L';
    const table = read(text, { zone: 60 });
    expect(table.events.map(({ at }) => toIso(at))).toEqual([
      '2027-03-28T00:30:00.000Z',
      '2027-03-28T06:40:00.000Z',
      '2027-10-31T00:30:00.000Z',
    ]);
  });
});

describe('a table as people keep it', () => {
  const expected = ['2027-05-12T23:31 low 1.2', '2027-05-13T05:40 high 5.6'];

  it.each([
    [
      'a running number',
      'No.,Date,Time,Height (m)\n1,2027-05-13,00:31,1.2\n2,2027-05-13,06:40,5.6',
    ],
    ['a coefficient', 'Date,Time,m,Coef\n2027-05-13,00:31,1.2,\n2027-05-13,06:40,5.6,95'],
    [
      'words at the foot',
      'Date,Time,m\n2027-05-13,00:31,1.2\n2027-05-13,06:40,5.6\nAn invented shore.',
    ],
    ['quoted cells', '"Date","Time","m"\n"13/05/2027","00:31","1,20"\n"13/05/2027","06:40","5,60"'],
    ['date and time in one cell', '2027-05-13T00:31,1.20\n2027-05-13T06:40,5.6'],
    ['the date on its first line alone', 'Date;Time;m\nThu 13 May 2027;0031;1.2\n;0640;5.6'],
    ['points in its times', '13.05.2027 00.31 1.20 06.40 5.60'],
    ['its units behind its figures', '13 May 2027 12:31 am 1.2m 6:40 a.m. 5.6m'],
  ])('is read with %s', (_, text) => {
    const table = read(text);
    expect(table.problems).toEqual([]);
    expect(
      table.events.map(({ at, kind, heightM }) => `${toIso(at).slice(0, 16)} ${kind} ${heightM}`),
    ).toEqual(expected);
  });

  it('lists a line of other things below its rows', () => {
    const text = 'Date,Time,m\n2027-05-13,00:31,1.2\n2027-05-13,06:40,5.6\nPrinted in 2026';
    const table = read(text);
    expect(table.events).toHaveLength(2);
    expect(table.problems).toEqual([expect.objectContaining({ row: 4, why: 'missing' })]);
  });
});

describe('a row of high waters followed by its low waters', () => {
  it('takes high and low from the heading, and an empty place for none', () => {
    const text = [
      'Date,HW,m,HW,m,LW,m,LW,m',
      '2027-05-01,06:40,5.0,19:05,5.2,00:31,1.0,12:50,0.8',
      '2027-05-02,07:25,5.1,,,01:10,0.9,13:30,0.7',
    ].join('\n');
    const table = read(text);
    expect(table.problems).toEqual([]);
    expect(table.events.map(({ kind }) => kind).join(' ')).toBe('low high low high low high low');
  });
});

function replaced(row: number, cell: number, text: string): string {
  const cells = (lines[row - 1] ?? '').split(',');
  cells[cell] = text;
  return cells.join(',');
}

function read(text: string, questions: TableQuestions = { zone: LONDON }): OfficialTable {
  const table = readOfficialTable(text, questions);
  if (!table.isGranted) throw new Error(JSON.stringify(table.reasons));
  return table.value;
}

function whyRefused(text: string, questions: TableQuestions): string {
  const table = readOfficialTable(text, questions);
  return table.isGranted ? 'read' : table.reasons[0].why;
}
