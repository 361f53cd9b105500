import { screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it } from 'vitest';
import { LONGEST_TEXT } from '#frontend/features/tides/read-table-file.ts';
import { longestTableCharacters } from '#shared/contracts/tide-tables.ts';
import { account, idOf } from './made-up-replies.ts';
import { coordinator } from './made-up-shores.ts';
import { mistakenTable, readTable, tables } from './made-up-tables.ts';
import type { Answers, Asked } from './open-page.tsx';
import { openPage, Refuses } from './open-page.tsx';

const text = '2027-01-01\t03:12\tLW\t0.9';

function serverWith(answers: Answers = {}): Answers {
  return {
    seeAccount: coordinator,
    seeTables: tables,
    previewTable: () => readTable(),
    acceptTable: () => ({ id: idOf(73), moved: 1 }),
    takeBackTable: () => ({ id: idOf(71) }),
    ...answers,
  };
}

const bodiesOf = (asked: readonly Asked[], name: Asked['endpoint']) =>
  asked.filter(({ endpoint }) => endpoint === name).map(({ body }) => body);

async function openTables(answers: Answers = {}) {
  const page = openPage('/tide-tables', serverWith(answers));
  await screen.findByRole('heading', { level: 2, name: 'Add an official table' });
  return { ...page, user: userEvent.setup() };
}

/** Fills the form and has the table read. */
async function read(answers: Answers = {}) {
  const page = await openTables(answers);
  const { user } = page;
  await user.selectOptions(screen.getByLabelText('Tide station'), 'made-up/outer-skerrow');
  await user.type(screen.getByLabelText('What the table is called'), 'Harbour 2027');
  await user.click(screen.getByRole('radio', { name: /^Local clock time/ }));
  const table = screen.getByRole('textbox', { name: 'The table' });
  await user.click(table);
  await user.paste(text);
  await user.click(screen.getByRole('button', { name: 'Read it' }));
  return page;
}

describe('the official tide tables', () => {
  it('lists those in force apart from those taken back', async () => {
    await openTables();
    const inForce = within(screen.getByRole('region', { name: 'In force' }));
    expect(inForce.getByRole('heading', { name: 'Skerrow harbour tables 2027' })).toBeVisible();
    expect(
      inForce.getByText(
        'Outer Skerrow, 1 January 2027 to 31 December 2027, 1410 high and low waters',
      ),
    ).toBeVisible();
    expect(
      inForce.getByText(/^Printed in UTC\+01:00 all year. In force since 4 January 2027/),
    ).toBeVisible();
    const takenBack = within(screen.getByRole('region', { name: 'Taken back' }));
    expect(takenBack.getByText(/taken back on 10 February 2026/)).toBeVisible();
    expect(takenBack.queryByRole('button')).toBeNull();
  });

  it('takes one back only on a yes, and keeps what was typed meanwhile', async () => {
    const { asked, user } = await openTables();
    await user.type(screen.getByLabelText('What the table is called'), 'Harbour 2028');
    const takeBack = { name: 'Take back Skerrow harbour tables 2027' };
    await user.click(screen.getByRole('button', takeBack));
    const dialog = await screen.findByRole('alertdialog', {
      name: 'Take back Skerrow harbour tables 2027?',
    });
    await user.click(within(dialog).getByRole('button', { name: 'Leave it in force' }));
    await waitFor(() => expect(screen.queryByRole('alertdialog')).toBeNull());
    expect(bodiesOf(asked, 'takeBackTable')).toEqual([]);

    await user.click(screen.getByRole('button', takeBack));
    await user.click(await screen.findByRole('button', { name: 'Take it back' }));
    expect(
      await screen.findByText(
        'Skerrow harbour tables 2027 is taken back. The prediction counts again.',
      ),
    ).toHaveFocus();
    expect(
      asked.filter(({ endpoint }) => endpoint === 'takeBackTable').map(({ url }) => url.pathname),
    ).toEqual([`/api/tide-tables/${idOf(71)}/take-back`]);
    expect(screen.getByLabelText('What the table is called')).toHaveValue('Harbour 2028');
  });

  it('says so when taking back is refused', async () => {
    const { user } = await openTables({
      takeBackTable: () => {
        throw new Refuses('not-found', 'There is no such table in force');
      },
    });
    await user.click(screen.getByRole('button', { name: /^Take back/ }));
    await user.click(await screen.findByRole('button', { name: 'Take it back' }));
    expect(await screen.findByRole('alert')).toHaveTextContent(
      'The table was not taken back.There is no such table in force.',
    );
  });

  it('is for coordinators and administrators, and asks for nothing for others', async () => {
    const { asked } = openPage('/tide-tables', serverWith({ seeAccount: () => account() }));
    expect(
      await screen.findByText(/Coordinators and administrators look after/),
    ).toBeInTheDocument();
    expect(asked.map(({ endpoint }) => endpoint)).not.toContain('seeTables');
  });

  it('says what to do when there is no shore, and when they cannot be loaded', async () => {
    openPage('/tide-tables', serverWith({ seeTables: () => ({ tables: [], stations: [] }) }));
    expect(await screen.findByText(/there is no shore yet/)).toBeInTheDocument();
    expect(screen.getByText(/No official table is in force/)).toBeInTheDocument();
  });

  it('offers another try when they cannot be loaded', async () => {
    openPage(
      '/tide-tables',
      serverWith({
        seeTables: () => {
          throw new TypeError('no network');
        },
      }),
    );
    expect(await screen.findByRole('alert')).toHaveTextContent('could not be loaded');
    expect(screen.getByRole('button', { name: 'Try again' })).toBeInTheDocument();
  });
});

describe('a table before it is read', () => {
  it('asks for the station and the clock outright, and sends nothing without them', async () => {
    const { asked, user } = await openTables();
    expect(
      screen.getAllByRole('radio').filter((radio) => 'checked' in radio && radio.checked),
    ).toEqual([]);
    await user.click(screen.getByRole('button', { name: 'Read it' }));
    expect(screen.getByLabelText('Tide station')).toHaveAccessibleDescription(
      'Choose a tide station.',
    );
    expect(screen.getByText('Say which clock the times are printed in.')).toBeInTheDocument();
    expect(bodiesOf(asked, 'previewTable')).toEqual([]);
  });

  it.each([
    ['UTC all year', null, 'UTC'],
    ['Another fixed offset from UTC all year', '+1', '+01:00'],
    ['Another fixed offset from UTC all year', '−3:30', '-03:30'],
  ])('sends the clock that was chosen: %s %s', async (choice, offset, zone) => {
    const { asked, user } = await openTables();
    await user.selectOptions(screen.getByLabelText('Tide station'), 'made-up/outer-skerrow');
    await user.type(screen.getByLabelText('What the table is called'), 'Harbour 2027');
    await user.click(screen.getByRole('radio', { name: choice }));
    if (offset !== null) {
      await user.type(screen.getByRole('textbox', { name: 'Offset from UTC' }), offset);
    }
    await user.selectOptions(screen.getByLabelText('Heights in'), 'Feet');
    await user.click(screen.getByRole('textbox', { name: 'The table' }));
    await user.paste(text);
    await user.click(screen.getByRole('button', { name: 'Read it' }));
    await screen.findByRole('heading', { name: 'What was read' });
    expect(bodiesOf(asked, 'previewTable')).toEqual([
      {
        stationId: 'made-up/outer-skerrow',
        name: 'Harbour 2027',
        zone,
        units: 'ft',
        dateOrder: null,
        year: null,
        text,
      },
    ]);
  });

  it('refuses an offset that is none, beside it', async () => {
    const { asked, user } = await openTables();
    await user.selectOptions(screen.getByLabelText('Tide station'), 'made-up/outer-skerrow');
    await user.click(screen.getByRole('radio', { name: /^Another fixed/ }));
    const offset = screen.getByRole('textbox', { name: 'Offset from UTC' });
    await user.type(offset, 'one hour');
    await user.click(screen.getByRole('button', { name: 'Read it' }));
    expect(offset).toHaveAccessibleDescription('Write the offset like +01:00.');
    expect(bodiesOf(asked, 'previewTable')).toEqual([]);
  });

  it('takes the text of a file, in UTF-8 or the older western encoding', async () => {
    const { user } = await openTables();
    const file = screen.getByLabelText('A text file (CSV or plain text)');
    const table = screen.getByRole('textbox', { name: 'The table' });
    await user.upload(file, new File(['Marée;1,2'], 'tides.csv'));
    await waitFor(() => expect(table).toHaveValue('Marée;1,2'));
    const older = new Uint8Array([0x4d, 0x61, 0x72, 0xe9, 0x65]);
    await user.upload(file, new File([older], 'tides.txt'));
    await waitFor(() => expect(table).toHaveValue('Marée'));
    expect(screen.getByText('tides.txt stands below.')).toBeInTheDocument();
  });

  it.each([
    ['a spreadsheet by its name', new File(['x'], 'tides.xlsx'), /is a spreadsheet/],
    [
      'a spreadsheet by its first bytes',
      new File([new Uint8Array([0x50, 0x4b, 0x03, 0x04])], 'tides.csv'),
      /is a spreadsheet/,
    ],
    ['a PDF', new File(['%PDF-1.7'], 'tides.pdf'), /is a PDF/],
    ['too large a file', new File([new Uint8Array(LONGEST_TEXT + 1)], 'big.txt'), /under 5 MB/],
  ])('answers %s clearly and sends nothing', async (_, file, answer) => {
    const { asked, user } = await openTables();
    const picker = screen.getByLabelText('A text file (CSV or plain text)');
    await user.upload(picker, file);
    expect(await screen.findByText(answer)).toBeInTheDocument();
    expect(picker).toBeInvalid();
    expect(screen.getByRole('textbox', { name: 'The table' })).toHaveValue('');
    expect(asked.map(({ endpoint }) => endpoint)).not.toContain('previewTable');
  });

  it('takes no more than the server does', () => {
    expect(LONGEST_TEXT).toBe(longestTableCharacters);
  });

  it('keeps everything typed when the server refuses it, what is wrong beside its field', async () => {
    await read({
      previewTable: () => {
        throw new Refuses('not-understood', 'Some of what was sent could not be read', undefined, [
          { where: 'body', field: 'name', message: 'Write something here' },
        ]);
      },
    });
    const name = screen.getByLabelText('What the table is called');
    await waitFor(() => expect(name).toHaveAccessibleDescription('Write something here'));
    expect(name).toHaveValue('Harbour 2027');
    expect(screen.getByRole('textbox', { name: 'The table' })).toHaveValue(text);
  });

  it('keeps everything typed when no answer comes', async () => {
    await read({
      previewTable: () => {
        throw new TypeError('no network');
      },
    });
    expect(await screen.findByText('The table was not read.')).toBeInTheDocument();
    expect(screen.getByRole('textbox', { name: 'The table' })).toHaveValue(text);
  });
});

describe('a table that was read', () => {
  it('says what was recognised, how much, from when to when, and how it agrees', async () => {
    await read();
    expect(await screen.findByRole('heading', { name: 'What was read' })).toHaveFocus();
    expect(screen.getByText(/Friday 1 January 2027 to Friday 31 December 2027/)).toHaveTextContent(
      '1410 high and low waters',
    );
    expect(screen.getByText(/^Recognised: date, time, height in m/)).toBeInTheDocument();
    expect(screen.getByText('It agrees with the prediction for this station.')).toBeInTheDocument();
    expect(
      screen.getByText(
        'Over 1408 high and low waters: median 3 min and 0.04 m; worst 11 min and 0.21 m.',
      ),
    ).toBeInTheDocument();
  });

  it('names what looks like a mistake, and cannot be put in force', async () => {
    const { asked, user } = await read({ previewTable: mistakenTable });
    expect(await screen.findByText('This looks like the wrong time zone.')).toBeInTheDocument();
    const accept = screen.getByRole('button', { name: 'Put this table in force' });
    expect(accept).toHaveAttribute('aria-disabled', 'true');
    expect(accept).toHaveAccessibleDescription(
      'It cannot be put in force while it looks like a mistake.',
    );
    await user.click(accept);
    expect(bodiesOf(asked, 'acceptTable')).toEqual([]);
  });

  it('says why a text is no table at all', async () => {
    await read({
      previewTable: () =>
        readTable({
          refusal: 'There is nothing in it.',
          comparison: null,
          mayAccept: false,
          eventCount: 0,
          firstOn: null,
          lastOn: null,
          clockChanges: [],
          movedSessions: [],
        }),
    });
    expect(await screen.findByText(/There is nothing in it/)).toBeInTheDocument();
    expect(screen.getByRole('button', { name: 'Put this table in force' })).toHaveAttribute(
      'aria-disabled',
      'true',
    );
  });

  it('lists the first fifty rows that are not right, and asks whether they are left out', async () => {
    const problems = Array.from({ length: 57 }, (_, place) => ({
      row: place + 2,
      message: `Row ${place + 2} has no height.`,
    }));
    const { asked, user } = await read({ previewTable: () => readTable({ problems }) });
    expect(await screen.findByText('57 rows are not right')).toBeInTheDocument();
    expect(screen.getByText('Row 51 has no height.')).toBeInTheDocument();
    expect(screen.queryByText('Row 52 has no height.')).toBeNull();
    expect(screen.getByText('And 7 more.')).toBeInTheDocument();
    const accept = screen.getByRole('button', { name: 'Put this table in force' });
    expect(accept).toHaveAttribute('aria-disabled', 'true');
    await user.click(screen.getByRole('checkbox', { name: 'Leave out what could not be read' }));
    await user.click(accept);
    await screen.findByText(/is in force/);
    expect(bodiesOf(asked, 'acceptTable')).toMatchObject([{ leavesOutProblems: true }]);
  });

  it('lays out the days round a clock change as the page is printed, and no day without water', async () => {
    await read();
    const day = await screen.findByRole('table', { name: 'Sun 28 Mar BST, the clocks change' });
    expect(within(day).getByRole('row', { name: '07:47 high 4.41 m' })).toBeInTheDocument();
    expect(screen.queryByText('Sun 29 Mar')).toBeNull();
  });

  it('moves only the sessions that are ticked, none of them beforehand', async () => {
    const { asked, user } = await read();
    const moving = await screen.findByRole('region', { name: 'Sessions whose low water moves' });
    const first = within(moving).getAllByRole('listitem')[0];
    expect(first).toHaveTextContent('Gull Ledges, Sun 9 May, Sunday families');
    expect(first).toHaveTextContent(
      'Low water 10:05 BST, by the table 10:17: 12 min later, 0.1 m lower',
    );
    expect(first).toHaveTextContent('New times: on the shore 08:17, off the shore by 10:47');
    expect(within(moving).getByText(/No working window is left/)).toBeInTheDocument();
    expect(within(moving).getByText('one session by five minutes or less')).toBeInTheDocument();
    const tick = within(moving).getByRole('checkbox', { name: /Gull Ledges, Sun 9 May$/ });
    expect(tick).not.toBeChecked();
    await user.click(tick);
    await user.click(screen.getByRole('button', { name: 'Put this table in force' }));
    expect(await screen.findByText('Harbour 2027 is in force. One session moved.')).toHaveFocus();
    expect(bodiesOf(asked, 'acceptTable')).toMatchObject([
      { zone: 'Europe/London', text, leavesOutProblems: false, movesSessionIds: [idOf(109)] },
    ]);
    expect(screen.getByRole('textbox', { name: 'The table' })).toHaveValue('');
  });

  it('must be read again once something was changed', async () => {
    const { user } = await read();
    const accept = await screen.findByRole('button', { name: 'Put this table in force' });
    expect(accept).not.toHaveAttribute('aria-disabled');
    await user.type(screen.getByLabelText('What the table is called'), ' b');
    expect(accept).toHaveAccessibleDescription(
      'Something above was changed since. Read it again first.',
    );
  });

  it('keeps the table and says why when it is refused at the last', async () => {
    const { user } = await read({
      acceptTable: () => {
        throw new Refuses('table-refused', 'Another table is in force for some of these days');
      },
    });
    await user.click(await screen.findByRole('button', { name: 'Put this table in force' }));
    const alert = await screen.findByRole('alert');
    expect(alert).toHaveTextContent('Another table is in force for some of these days.');
    expect(screen.getByRole('textbox', { name: 'The table' })).toHaveValue(text);
  });
});
