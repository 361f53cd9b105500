import { screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it } from 'vitest';
import type { EndpointName } from '#shared/contracts/endpoints.ts';
import { planSettings } from '#shared/contracts/season-plans.ts';
import type { PlanSettings } from '#shared/contracts/season-plans.ts';
import { setWideScreen } from '../support/screens-setup.ts';
import {
  dates,
  ines,
  madePlan,
  plan,
  planId,
  plans,
  preview,
  reading,
  shoreIds,
  slotKindIds,
  skippedOn,
} from './made-up-plans.ts';
import { account, calendar, idOf } from './made-up-replies.ts';
import type { Answers, Asked } from './open-page.tsx';
import { openPage, Refuses } from './open-page.tsx';

const server: Answers = {
  seeAccount: () => ines(),
  seePlans: () => plans(),
  seePlan: () => plan(),
  previewPlan: () => preview(),
  readPattern: () => reading(),
};

function bodiesOf(asked: readonly Asked[], endpoint: EndpointName): PlanSettings[] {
  return asked
    .filter((one) => one.endpoint === endpoint)
    .map(({ body }) => planSettings.parse(body));
}

const headline = (text: string) => screen.findByRole('heading', { level: 2, name: text });
const button = (name: string | RegExp) => screen.getByRole('button', { name });
const opened = `/season-plans/${planId}`;

describe('the season plans', () => {
  it('say in one sentence that there are none, with the way to write one', async () => {
    openPage('/season-plans', server);
    const link = await screen.findByRole('link', { name: 'Write a season plan' });
    expect(link).toHaveAttribute('href', '/season-plans/new');
    expect(screen.getByText('No season is planned yet.')).toBeInTheDocument();
  });

  it('say of each plan what has been made of it', async () => {
    const listed = {
      id: planId,
      name: 'Saturday families',
      shoreName: 'Gull Ledges',
      sentence: 'Every Saturday',
      fromOn: '2027-05-01',
      toOn: '2027-10-23',
      made: 11,
      published: 0,
    } as const;
    openPage('/season-plans', { ...server, seePlans: () => plans([listed]) });
    expect(await screen.findByRole('link', { name: 'Saturday families' })).toHaveAttribute(
      'href',
      opened,
    );
    expect(
      screen.getByText('Gull Ledges. Every Saturday, 1 May to 23 October 2027.'),
    ).toBeInTheDocument();
    expect(screen.getByText('Eleven sessions, none published')).toBeInTheDocument();
  });

  it('are a way in the navigation for coordinators and for nobody else', async () => {
    openPage('/season-plans', server);
    const link = await screen.findByRole('link', { name: 'Season plan' });
    expect(link).toHaveAttribute('aria-current', 'page');
    expect(screen.getByRole('link', { name: 'Shores' })).not.toHaveAttribute('aria-current');
  });

  it.each(['/season-plans', '/season-plans/new', opened])(
    'tell a volunteer who comes to %s who plans, and ask the server for nothing',
    async (address) => {
      const { asked } = openPage(address, { ...server, seeAccount: () => account() });
      expect(await screen.findByText(/Coordinators plan the season\./)).toBeInTheDocument();
      expect(asked.map(({ endpoint }) => endpoint)).toEqual(['seeAccount']);
    },
  );

  it('are no way in the navigation for a volunteer, who still sees the shores', async () => {
    openPage('/', {
      seeAccount: () => account(),
      seeCalendar: () => calendar('2027-04-26', '2027-06-06'),
    });
    expect(await screen.findByRole('link', { name: 'Shores' })).toBeInTheDocument();
    expect(screen.queryByRole('link', { name: 'Season plan' })).toBeNull();
  });
});

describe('a new season plan', () => {
  it('begins with half a year of Saturdays by the rules of the first shore', async () => {
    const { asked } = openPage('/season-plans/new', server);
    await headline('4 Saturdays: 3 sessions, 1 skipped');
    expect(bodiesOf(asked, 'previewPlan')[0]).toMatchObject({
      shoreId: shoreIds.gullLedges,
      pattern: 'FREQ=WEEKLY;BYDAY=SA',
      fromOn: '2027-05-01',
      toOn: '2027-10-30',
      minutesBeforeLow: 120,
      minutesAfterLow: 30,
      minimumMinutes: 90,
      earliestClock: '07:00',
      latestClock: '18:00',
      lowestLevelM: 1.3,
      slots: [
        { slotKindId: slotKindIds.leader, count: 1 },
        { slotKindId: slotKindIds.backMarker, count: 1 },
        { slotKindId: slotKindIds.poolGuide, count: 2 },
      ],
    });
  });

  it('takes the rules of another shore where nobody has changed them', async () => {
    const user = userEvent.setup();
    const { asked } = openPage('/season-plans/new', server);
    await headline('4 Saturdays: 3 sessions, 1 skipped');
    const shortest = screen.getByLabelText('No shorter than');
    await user.clear(shortest);
    await user.type(shortest, '2:00');
    await user.selectOptions(screen.getByLabelText('Shore'), 'Kettle Reef');
    await waitFor(() =>
      expect(bodiesOf(asked, 'previewPlan').at(-1)).toMatchObject({
        shoreId: shoreIds.kettleReef,
        lowestLevelM: 0.9,
        earliestClock: '08:00',
        latestClock: '20:00',
        minimumMinutes: 120,
      }),
    );
  });

  it('is not saved without a name, and says so beside the field', async () => {
    const user = userEvent.setup();
    const { asked } = openPage('/season-plans/new', server);
    await headline('4 Saturdays: 3 sessions, 1 skipped');
    expect(screen.queryByText('Give the plan a name.')).toBeNull();
    await user.click(button('Save the draft'));
    expect(screen.getByLabelText('Name, also of its sessions')).toHaveAccessibleDescription(
      'Give the plan a name.',
    );
    expect(await screen.findByRole('alert')).toHaveFocus();
    expect(asked.map(({ endpoint }) => endpoint)).not.toContain('keepPlan');
  });

  it('is kept first when its sessions are made at once', async () => {
    const user = userEvent.setup();
    const { asked, router } = openPage('/season-plans/new', {
      ...server,
      keepPlan: () => plan(),
      makeSessions: () => madePlan(),
    });
    await headline('4 Saturdays: 3 sessions, 1 skipped');
    await user.type(screen.getByLabelText('Name, also of its sessions'), 'Saturday families');
    await user.click(button('Make three sessions'));
    expect(await screen.findByText('Three sessions made, none published.')).toBeInTheDocument();
    expect(bodiesOf(asked, 'keepPlan')).toMatchObject([{ name: 'Saturday families' }]);
    expect(asked.find(({ endpoint }) => endpoint === 'makeSessions')?.url.pathname).toBe(
      `/api/season-plans/${planId}/make-sessions`,
    );
    expect(router.state.location.pathname).toBe(opened);
  });

  it('is kept once where making its sessions was refused and is tried again', async () => {
    const user = userEvent.setup();
    const refuse = () => {
      throw new Refuses('plan-refused', 'No date of this plan can be made a session of.');
    };
    const { asked } = openPage('/season-plans/new', {
      ...server,
      keepPlan: () => plan(),
      makeSessions: refuse,
    });
    await headline('4 Saturdays: 3 sessions, 1 skipped');
    await user.type(screen.getByLabelText('Name, also of its sessions'), 'Saturday families');
    await user.click(button('Make three sessions'));
    const alert = await screen.findByRole('alert');
    expect(alert).toHaveTextContent('No date of this plan can be made a session of.');
    await user.click(button('Make three sessions'));
    await waitFor(() =>
      expect(asked.filter(({ endpoint }) => endpoint === 'makeSessions')).toHaveLength(2),
    );
    expect(bodiesOf(asked, 'keepPlan')).toHaveLength(1);
  });
});

describe('the dates of a plan', () => {
  it('are strips that say their window and deadlines', async () => {
    openPage(opened, server);
    expect(
      await screen.findByRole('img', {
        name: 'Water of Saturday 15 May: on the shore 13:17, lower shore clear by 15:17, off the shore by 15:47',
      }),
    ).toBeInTheDocument();
    expect(screen.getByRole('img', { name: 'Water of Saturday 8 May, skipped' })).toBeVisible();
  });

  it('are not asked for again while the plan stands as it was kept', async () => {
    const { asked } = openPage(opened, server);
    await headline('4 Saturdays: 3 sessions, 1 skipped');
    expect(asked.map(({ endpoint }) => endpoint)).not.toContain('previewPlan');
  });

  it('are skipped by hand with a reason, which is sent with the plan', async () => {
    const user = userEvent.setup();
    const { asked } = openPage(opened, { ...server, changePlan: () => plan() });
    await headline('4 Saturdays: 3 sessions, 1 skipped');
    await user.click(button('Skip 15 May'));
    expect(screen.getByLabelText('Reason, may be left empty')).toHaveFocus();
    await user.type(screen.getByLabelText('Reason, may be left empty'), 'School fair');
    await user.keyboard('{Enter}');
    expect(button('Skip 15 May')).toHaveFocus();
    const exceptions = [{ on: '2027-05-15', kind: 'skip', reason: 'School fair' }];
    await waitFor(() =>
      expect(bodiesOf(asked, 'previewPlan').at(-1)?.exceptions).toEqual(exceptions),
    );
    await user.click(button('Save the draft'));
    await waitFor(() => expect(bodiesOf(asked, 'changePlan')).toMatchObject([{ exceptions }]));
  });

  it('are taken by hand, without a reason too', async () => {
    const user = userEvent.setup();
    const { asked } = openPage(opened, server);
    await headline('4 Saturdays: 3 sessions, 1 skipped');
    await user.click(button('Take 8 May'));
    const form = screen.getByLabelText('Reason, may be left empty').closest('form');
    if (form === null) throw new Error('The reason is asked in no form');
    await user.click(within(form).getByRole('button', { name: 'Take 8 May' }));
    await waitFor(() =>
      expect(bodiesOf(asked, 'previewPlan').at(-1)?.exceptions).toEqual([
        { on: '2027-05-08', kind: 'take', reason: null },
      ]),
    );
  });

  it('cannot be taken where no hand may overrule the rules', async () => {
    const dark = skippedOn(
      '2027-05-08',
      [
        {
          why: 'dark',
          lowWaterAt: '2027-05-08T02:00:00.000Z',
          lightFromAt: '2027-05-08T04:40:00.000Z',
          lightToAt: '2027-05-08T19:20:00.000Z',
        },
      ],
      { mayTake: false },
    );
    openPage(opened, { ...server, seePlan: () => plan({ preview: preview([dark]) }) });
    await headline('1 Saturday: 0 sessions, 1 skipped');
    expect(screen.queryByRole('button', { name: /^(?:Take|Skip) / })).toBeNull();
    expect(screen.queryByRole('button', { name: /^Make/ })).toBeNull();
  });

  it('are added off the pattern, each once', async () => {
    const user = userEvent.setup();
    const { asked } = openPage(opened, server);
    await headline('4 Saturdays: 3 sessions, 1 skipped');
    await user.click(button('Add a date'));
    const field = screen.getByLabelText('Date to add');
    await user.type(field, '2027-05-15');
    await user.click(button('Add it'));
    expect(field).toHaveAccessibleDescription('The plan has this day already.');
    await user.clear(field);
    await user.type(field, '2027-05-19');
    await user.click(button('Add it'));
    await waitFor(() =>
      expect(bodiesOf(asked, 'previewPlan').at(-1)?.exceptions).toEqual([
        { on: '2027-05-19', kind: 'add', reason: null },
      ]),
    );
  });

  it('say where the tides come from and what predictions are worth', async () => {
    openPage(opened, server);
    await headline('4 Saturdays: 3 sessions, 1 skipped');
    expect(screen.getByText(/^Predictions are predictions/)).toBeInTheDocument();
    expect(
      screen.getByText('The water of these days is predicted from Outer Skerrow.'),
    ).toBeInTheDocument();
    expect(screen.getByText(/Invented for these pages\.$/).closest('details')).not.toBeNull();
  });
});

describe('the rules of a plan', () => {
  it('show what the server refuses beside its field and lose nothing that was typed', async () => {
    const user = userEvent.setup();
    const message = 'A plan spans at most 731 days.';
    openPage(opened, {
      ...server,
      previewPlan: () => {
        throw new Refuses('not-understood', 'The plan cannot be used as it is', undefined, [
          { where: 'body', field: 'toOn', message },
        ]);
      },
    });
    await headline('4 Saturdays: 3 sessions, 1 skipped');
    const to = screen.getByLabelText('To');
    await user.clear(to);
    await user.type(to, '2031-01-01');
    await waitFor(() => expect(to).toHaveAccessibleDescription(message));
    expect(to).toBeInvalid();
    expect(to).toHaveValue('2031-01-01');
    expect(screen.getByText(/These are the dates from before/)).toBeInTheDocument();
    await headline('4 Saturdays: 3 sessions, 1 skipped');
  });

  it('are not sent while a field cannot be read, which is said beside it', async () => {
    const user = userEvent.setup();
    const { asked } = openPage(opened, server);
    await headline('4 Saturdays: 3 sessions, 1 skipped');
    const before = screen.getByLabelText('Before low water');
    await user.clear(before);
    await user.type(before, 'two hours');
    expect(before).toHaveAccessibleDescription(/Write hours and minutes, like 1:30\./);
    await user.click(button('Save the draft'));
    expect(await screen.findByRole('alert')).toHaveTextContent('The plan cannot be used as it is.');
    expect(bodiesOf(asked, 'changePlan')).toHaveLength(0);
    expect(bodiesOf(asked, 'previewPlan')).toHaveLength(0);
  });

  it('build a rule from weekdays of the month and read it back with its next five dates', async () => {
    const user = userEvent.setup();
    const { asked } = openPage(opened, {
      ...server,
      readPattern: ({ body }: Asked) =>
        JSON.stringify(body).includes('BYDAY=1SA,1SU,-1SA,-1SU')
          ? reading('The first and last Saturday of each month')
          : reading(),
    });
    await headline('4 Saturdays: 3 sessions, 1 skipped');
    await user.selectOptions(screen.getByLabelText('Repeats'), 'By weekday of the month');
    await user.click(button('Sunday'));
    await user.click(button('Last of the month'));
    expect(
      await screen.findByText('The first and last Saturday of each month.'),
    ).toBeInTheDocument();
    expect(
      screen.getByText('Sat 1 May, Sat 8 May, Sat 15 May, Sat 22 May and Sat 29 May.'),
    ).toBeInTheDocument();
    await waitFor(() =>
      expect(bodiesOf(asked, 'previewPlan').at(-1)?.pattern).toBe(
        'FREQ=MONTHLY;BYDAY=1SA,1SU,-1SA,-1SU',
      ),
    );
  });

  it('say beside a rule written freely what stands in its way', async () => {
    const user = userEvent.setup();
    const message = '"BYHOUR=3" gives a time on the clock. The tide gives the times.';
    const refuse = () => {
      throw new Refuses('not-understood', 'The plan cannot be used as it is', undefined, [
        { where: 'body', field: 'pattern', message },
      ]);
    };
    openPage(opened, { ...server, readPattern: refuse, previewPlan: refuse });
    await headline('4 Saturdays: 3 sessions, 1 skipped');
    await user.selectOptions(screen.getByLabelText('Repeats'), 'By a rule');
    const rule = screen.getByLabelText('Rule');
    await user.clear(rule);
    await user.type(rule, 'FREQ=WEEKLY;BYHOUR=3');
    await waitFor(() => expect(rule).toHaveAccessibleDescription(expect.stringContaining(message)));
    expect(rule).toHaveValue('FREQ=WEEKLY;BYHOUR=3');
  });

  it('stand as words on a narrow page until they are to be changed', async () => {
    setWideScreen(false);
    const user = userEvent.setup();
    openPage(opened, server);
    await headline('4 Saturdays: 3 sessions, 1 skipped');
    expect(
      screen.getByText('Gull Ledges, every Saturday, 1 May to 22 May 2027'),
    ).toBeInTheDocument();
    expect(screen.queryByLabelText('No shorter than')).toBeNull();
    await user.click(button('Change the rules'));
    expect(screen.getByLabelText('No shorter than')).toHaveValue('1:30');
    expect(button('Make three sessions')).toBeInTheDocument();
  });
});

describe('a plan of which sessions are made', () => {
  const made: Answers = { ...server, seePlan: () => madePlan([604]) };

  it('shows its rules as words only, says why, and links each date to its session', async () => {
    openPage(opened, made);
    expect(await screen.findByText('Three sessions made, one published.')).toBeInTheDocument();
    expect(screen.getByText(/its rules stay as they are/)).toBeInTheDocument();
    expect(screen.queryByRole('textbox')).toBeNull();
    expect(screen.getByRole('link', { name: 'draft session of 1 May' })).toHaveAttribute(
      'href',
      `/sessions/${idOf(601)}`,
    );
    expect(screen.getByRole('link', { name: 'published session of 22 May' })).toBeInTheDocument();
    expect(screen.getAllByRole('checkbox')).toHaveLength(2);
  });

  it('publishes all its drafts', async () => {
    const user = userEvent.setup();
    const { asked } = openPage(opened, {
      ...made,
      publishSessions: () => madePlan([601, 603, 604]),
    });
    await user.click(await screen.findByRole('button', { name: 'Publish all two' }));
    expect(await screen.findByText('Three sessions made, three published.')).toBeInTheDocument();
    expect(asked.find(({ endpoint }) => endpoint === 'publishSessions')?.body).toEqual({
      sessionIds: [idOf(601), idOf(603)],
    });
    expect(screen.queryByRole('button', { name: /^Publish/ })).toBeNull();
  });

  it('publishes those that are ticked and no others', async () => {
    const user = userEvent.setup();
    const { asked } = openPage(opened, { ...made, publishSessions: () => madePlan([603, 604]) });
    await user.click(await screen.findByRole('checkbox', { name: 'Publish 15 May' }));
    await user.click(button('Publish the one ticked'));
    expect(await screen.findByText('Three sessions made, two published.')).toBeInTheDocument();
    expect(asked.find(({ endpoint }) => endpoint === 'publishSessions')?.body).toEqual({
      sessionIds: [idOf(603)],
    });
  });

  it('says why nothing was published', async () => {
    const user = userEvent.setup();
    openPage(opened, {
      ...made,
      publishSessions: () => {
        throw new Refuses('plan-refused', 'None of these sessions is a draft that lies ahead.');
      },
    });
    await user.click(await screen.findByRole('button', { name: 'Publish all two' }));
    expect(await screen.findByRole('alert')).toHaveTextContent(
      'None of these sessions is a draft that lies ahead.',
    );
  });
});

describe('a plan that cannot be shown', () => {
  it('says so where there is none of this address', async () => {
    openPage(opened, {
      ...server,
      seePlan: () => {
        throw new Refuses('not-found', 'There is no such plan');
      },
    });
    expect(await screen.findByRole('heading', { level: 1, name: /not|no /i })).toBeInTheDocument();
  });

  it('can be asked for again', async () => {
    const user = userEvent.setup();
    let isDown = true;
    openPage(opened, {
      ...server,
      seePlan: () => {
        if (isDown) throw new Refuses('unavailable', 'The tides are not ready yet');
        return plan();
      },
    });
    await screen.findByText('The season plan could not be loaded.');
    isDown = false;
    await user.click(button('Try again'));
    await headline(`${dates.length} Saturdays: 3 sessions, 1 skipped`);
  });
});
