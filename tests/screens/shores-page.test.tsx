import { screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it } from 'vitest';
import { z } from 'zod';
import { previewShore, shoreWaterSettings } from '#shared/contracts/shores.ts';
import type { NoWindowView } from '#shared/contracts/shores.ts';
import type { CalendarDay } from '#shared/kernel/time.ts';
import { account } from './made-up-replies.ts';
import {
  coordinator,
  preview,
  reason,
  settings,
  shore,
  shoreId,
  shores,
  stations,
} from './made-up-shores.ts';
import type { Answers, Asked } from './open-page.tsx';
import { openPage, Refuses } from './open-page.tsx';
import { setWideScreen } from '../support/screens-setup.ts';

const address = `/shores/${shoreId}`;
const usableOn: CalendarDay = '2027-05-09';

function bodyOf(asked: Asked) {
  return previewShore.body.parse(asked.body);
}

function serverWith(answers: Answers = {}): Answers {
  return {
    seeAccount: coordinator,
    seeShores: () => shores(true),
    seeShore: () => shore(),
    findStations: stations,
    previewShore: (asked) => preview(bodyOf(asked).on ?? usableOn),
    changeShore: () => shore(),
    ...answers,
  };
}

const previews = (asked: readonly Asked[]) =>
  asked.filter(({ endpoint }) => endpoint === 'previewShore').map(bodyOf);

async function openShore(answers: Answers = {}) {
  const page = openPage(address, serverWith(answers));
  const name = await screen.findByRole('textbox', { name: 'Name' });
  await screen.findByText('214 usable days in the year ahead');
  return { ...page, name, user: userEvent.setup() };
}

describe('the list of shores', () => {
  it('names each shore with its tide station, its datum and its next usable day', async () => {
    openPage('/shores', serverWith());
    const row = (await screen.findByRole('link', { name: 'Gull Ledges' })).closest('li');
    expect(row).toHaveTextContent('Outer Skerrow, heights above LAT');
    expect(row).toHaveTextContent('Next usable day Thu 6 May');
    const other = screen.getByRole('link', { name: 'Kettle Reef' }).closest('li');
    expect(other).toHaveTextContent('Its tide station can no longer be used');
    expect(other).toHaveTextContent('No usable day in the coming 60 days');
  });

  it('offers a new shore and the tide tables to those who may, and to nobody else', async () => {
    openPage('/shores', serverWith());
    expect(await screen.findByRole('link', { name: 'Add a shore' })).toBeInTheDocument();
    expect(screen.getByRole('link', { name: 'Tide tables' })).toBeInTheDocument();
  });

  it('offers a volunteer the shores alone', async () => {
    openPage(
      '/shores',
      serverWith({ seeAccount: () => account(), seeShores: () => shores(false) }),
    );
    await screen.findByRole('link', { name: 'Gull Ledges' });
    expect(screen.queryByRole('link', { name: 'Add a shore' })).toBeNull();
    expect(screen.queryByRole('link', { name: 'Tide tables' })).toBeNull();
  });

  it('says so when there is none yet', async () => {
    openPage('/shores', serverWith({ seeShores: () => ({ shores: [], mayMake: true }) }));
    expect(await screen.findByText(/There is no shore yet/)).toBeInTheDocument();
    expect(screen.getByRole('link', { name: 'Add the first' })).toBeInTheDocument();
  });

  it('says what to do when they cannot be loaded', async () => {
    openPage(
      '/shores',
      serverWith({
        seeShores: () => {
          throw new TypeError('no network');
        },
      }),
    );
    expect(await screen.findByRole('alert')).toHaveTextContent('The shores could not be loaded.');
    expect(screen.getByRole('button', { name: 'Try again' })).toBeInTheDocument();
  });
});

describe('the water of a shore while it is set up', () => {
  it('is asked with the settings as they stand, for the next usable day', async () => {
    const { asked } = await openShore();
    expect(previews(asked)).toEqual([
      { settings: z.object(shoreWaterSettings.shape).parse(settings), on: null },
    ]);
  });

  it('is asked anew once typing has paused, not at each key', async () => {
    const { asked, user } = await openShore();
    const level = screen.getByRole('textbox', { name: 'Working level' });
    await user.clear(level);
    await user.type(level, '1,75');
    await waitFor(() => expect(previews(asked).at(-1)?.settings.workingLevelM).toBe(1.75));
    expect(previews(asked).length).toBeLessThan(4);
  });

  it('says the window of the day aloud and its levels in the drawing', async () => {
    await openShore();
    expect(
      screen.getByRole('heading', { level: 2, name: 'Sunday 9 May 2027' }),
    ).toBeInTheDocument();
    const drawing = screen.getByRole('img', { name: /^Water line for the day at Gull Ledges/ });
    expect(drawing).toHaveAccessibleName(/Lower shore clear by 10:05. Off the shore by 10:35.$/);
    expect(drawing).toHaveTextContent('working level 1.3 m');
    expect(drawing).toHaveTextContent('cut-off level 2.4 m');
    expect(screen.getByText('Times in BST.')).toBeInTheDocument();
  });

  it('steps to the day after and the day before, and back to the next usable day', async () => {
    const { asked, user } = await openShore();
    await user.click(screen.getByRole('button', { name: 'Day after' }));
    await screen.findByRole('heading', { level: 2, name: 'Monday 10 May 2027' });
    await user.click(screen.getByRole('button', { name: 'Day before' }));
    await user.click(screen.getByRole('button', { name: 'Day before' }));
    await screen.findByRole('heading', { level: 2, name: 'Saturday 8 May 2027' });
    await user.click(screen.getByRole('button', { name: 'Next usable day' }));
    await screen.findByRole('heading', { level: 2, name: 'Sunday 9 May 2027' });
    expect(previews(asked).map(({ on }) => on)).toEqual(
      expect.arrayContaining([null, '2027-05-10', '2027-05-09', '2027-05-08']),
    );
  });

  it('gives every reason of a day without a window, in words and aloud', async () => {
    const reasons: NoWindowView[] = [
      reason({
        why: 'too-high',
        lowWaterAt: '2027-05-09T09:05:00.000Z',
        lowWaterHeightM: 2.04,
        workingLevelM: 1.3,
      }),
      reason({
        why: 'out-of-hours',
        lowWaterAt: '2027-05-09T20:40:00.000Z',
        earliestAt: '2027-05-09T06:00:00.000Z',
        latestAt: '2027-05-09T17:00:00.000Z',
      }),
    ];
    await openShore({ previewShore: () => preview(usableOn, reasons) });
    expect(screen.getByText('No working window this day.')).toBeInTheDocument();
    expect(screen.getByText('Low water 10:05, 2.0 m, above 1.3 m.')).toBeInTheDocument();
    expect(screen.getByText('Low water 21:40, after 18:00.')).toBeInTheDocument();
    expect(screen.getByRole('img', { name: /No working window: low water 10:05/ })).toBeVisible();
  });

  it('keeps the last curve and says so while a figure cannot be read', async () => {
    const { user } = await openShore();
    await user.clear(screen.getByRole('textbox', { name: 'Cut-off level' }));
    expect(
      await screen.findByText(/Some of what decides the water is missing/),
    ).toBeInTheDocument();
    expect(screen.getByRole('img', { name: /^Water line for the day/ })).toBeInTheDocument();
  });

  it('shows beside its field what the server finds wrong with a setting', async () => {
    openPage(
      address,
      serverWith({
        previewShore: () => {
          throw new Refuses('not-understood', 'There is no water to show', undefined, [
            {
              where: 'body',
              field: 'settings.zone',
              message: 'Write a time zone like Europe/London',
            },
          ]);
        },
      }),
    );
    const field = await screen.findByRole('textbox', { name: 'Time zone' });
    await waitFor(() =>
      expect(field).toHaveAccessibleDescription('Write a time zone like Europe/London'),
    );
    expect(field).toBeInvalid();
  });

  it('is folded above the levels on a narrow screen, its window in the line that stays', async () => {
    setWideScreen(false);
    openPage(address, serverWith());
    const line = await screen.findByText(
      /^The water on Sun 9 May: 08:05 to 10:35, 214 usable days/,
    );
    expect(line.closest('details')).not.toHaveAttribute('open');
  });
});

describe('the form of a shore', () => {
  it('lists the nearest tide stations with id, position, distance, datum and licence', async () => {
    const { user, asked } = await openShore();
    await user.click(screen.getByRole('button', { name: 'Show one other tide station near' }));
    const group = screen.getByRole('radiogroup', { name: 'Tide station' });
    expect(group).toHaveAccessibleDescription(/A name may be its neighbour's/);
    expect(within(group).getByRole('radio', { name: /^Outer Skerrow/ })).toBeChecked();
    const other = within(group).getByRole('radio', { name: 'Inner Skerrow, 12 km away' });
    for (const words of ['made-up/inner-skerrow', '54.70° N, 1.14° W', 'MLLW', 'public-domain']) {
      expect(other).toHaveAccessibleDescription(expect.stringContaining(words));
    }
    await user.click(other);
    await waitFor(() =>
      expect(previews(asked).at(-1)?.settings.tideStationId).toBe('made-up/inner-skerrow'),
    );
  });

  it('sends everything, says that it is saved and that sessions keep their times', async () => {
    const { asked, name, user } = await openShore();
    expect(screen.getByText('Sessions that are made keep their times.')).toBeInTheDocument();
    await user.clear(name);
    await user.type(name, 'Gull Ledge');
    await user.click(screen.getByRole('radio', { name: 'Strict' }));
    await user.click(screen.getByRole('button', { name: 'Save this shore' }));
    expect(await screen.findByText('Gull Ledge is saved.')).toHaveAttribute('role', 'status');
    expect(asked.find(({ endpoint }) => endpoint === 'changeShore')?.body).toEqual({
      ...settings,
      name: 'Gull Ledge',
      ratioPreset: 'strict',
    });
  });

  it('shows what the server refuses beside its fields, and keeps everything typed', async () => {
    const { name, user } = await openShore({
      changeShore: () => {
        throw new Refuses('not-understood', 'The shore was not saved', undefined, [
          { where: 'body', field: 'name', message: 'Another shore has this name.' },
          { where: 'body', field: 'differences.low.laterMinutes', message: 'At most 360' },
        ]);
      },
    });
    await user.clear(name);
    await user.type(name, 'Kettle Reef');
    await user.click(screen.getByRole('button', { name: 'Save this shore' }));
    const alert = await screen.findByRole('alert');
    expect(alert).toHaveFocus();
    expect(alert).toHaveTextContent('The shore was not saved.Two fields need another look.');
    expect(name).toHaveValue('Kettle Reef');
    expect(name).toBeInvalid();
    expect(name).toHaveAccessibleDescription('Another shore has this name.');
    expect(screen.getByRole('textbox', { name: 'Low water later by' })).toHaveAccessibleDescription(
      /At most 360/,
    );
    await user.type(name, ' North');
    expect(name).toBeValid();
  });

  it('sends nothing while a figure is no number, and says so beside it', async () => {
    const { asked, user } = await openShore();
    const level = screen.getByRole('textbox', { name: 'Working level' });
    await user.clear(level);
    await user.type(level, 'low');
    await user.click(screen.getByRole('button', { name: 'Save this shore' }));
    expect(await screen.findByRole('alert')).toHaveTextContent('One field needs another look.');
    expect(level).toHaveAccessibleDescription(/Write a number, like 1.3./);
    expect(asked.map(({ endpoint }) => endpoint)).not.toContain('changeShore');
  });

  it('is busy while it saves and sends once', async () => {
    const { asked, user } = await openShore({ changeShore: () => new Promise(() => {}) });
    const button = screen.getByRole('button', { name: 'Save this shore' });
    await user.click(button);
    await user.click(button);
    expect(button).toHaveTextContent('Saving');
    expect(button).toHaveAttribute('aria-disabled', 'true');
    expect(asked.filter(({ endpoint }) => endpoint === 'changeShore')).toHaveLength(1);
  });

  it('asks a new shore for nothing that has a usual value, and for a choice of adults to party', async () => {
    const user = userEvent.setup();
    const { asked } = openPage('/shores/new', serverWith());
    expect(await screen.findByRole('textbox', { name: 'Before low water' })).toHaveValue('120');
    expect(screen.getByRole('textbox', { name: 'Working level' })).toHaveValue('');
    await user.click(screen.getByRole('button', { name: 'Add this shore' }));
    expect(screen.getByRole('radiogroup', { name: 'How many adults a party needs' })).toBeInvalid();
    expect(screen.getByText('Choose a tide station.')).toBeInTheDocument();
    expect(asked.map(({ endpoint }) => endpoint)).not.toContain('makeShore');
  });

  it('takes the zone of the station that is chosen for a new shore, and leads to the new shore', async () => {
    const user = userEvent.setup();
    const { asked, router } = openPage('/shores/new', serverWith({ makeShore: () => shore() }));
    const write = async (name: string, text: string) =>
      user.type(await screen.findByRole('textbox', { name }), text);
    await write('Name', 'Gull Ledges');
    await write('Latitude', '54.6');
    await write('Longitude', '-1.1');
    await write('Working level', '1.3');
    await write('Cut-off level', '2.4');
    await write('Meeting place', 'Blue hut');
    await user.click(await screen.findByRole('radio', { name: /^Outer Skerrow/ }));
    await user.click(screen.getByRole('radio', { name: 'Schools' }));
    expect(screen.getByRole('textbox', { name: 'Time zone' })).toHaveValue('Europe/London');
    await user.click(screen.getByRole('button', { name: 'Add this shore' }));
    await waitFor(() => expect(router.state.location.pathname).toBe(address));
    expect(await screen.findByText(/Gull Ledges is added/)).toBeInTheDocument();
    expect(asked.find(({ endpoint }) => endpoint === 'makeShore')?.body).toMatchObject({
      name: 'Gull Ledges',
      zone: 'Europe/London',
      differences: { high: { laterMinutes: 0, higherM: 0 } },
      ratioPreset: 'schools',
    });
  });
});

describe('a shore for those who do not change it', () => {
  const reader = {
    seeAccount: () => account(),
    seeShore: () => shore({ mayChange: false, tableYears: [2027] }),
  };

  it('is a page to read: the same facts, no field, and no water asked for', async () => {
    const { asked } = openPage(address, serverWith(reader));
    expect(await screen.findByText('The gully fills first')).toBeInTheDocument();
    expect(screen.getByText('Ring the coastguard and say Gull Ledges')).toBeInTheDocument();
    expect(screen.getByText('10 minutes later, 0.1 m lower')).toBeInTheDocument();
    expect(screen.getByText('An official tide table is in force for 2027.')).toBeInTheDocument();
    expect(screen.getByText(/heads, one to 15/)).toBeInTheDocument();
    expect(screen.queryByRole('textbox')).toBeNull();
    expect(asked.map(({ endpoint }) => endpoint)).not.toContain('previewShore');
  });

  it('says that nothing is here when there is no such shore', async () => {
    openPage(
      address,
      serverWith({
        seeShore: () => {
          throw new Refuses('not-found', 'There is no such shore');
        },
      }),
    );
    expect(
      await screen.findByRole('heading', { level: 1, name: 'Nothing is here' }),
    ).toBeInTheDocument();
  });

  it('does not offer the form of a new shore', async () => {
    openPage(
      '/shores/new',
      serverWith({ seeAccount: () => account(), seeShores: () => shores(false) }),
    );
    expect(
      await screen.findByText('Coordinators and administrators add shores.'),
    ).toBeInTheDocument();
    expect(screen.queryByRole('textbox')).toBeNull();
  });
});
