import { screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it } from 'vitest';
import { isCalendarDay } from '#shared/kernel/time.ts';
import { setWideScreen } from '../support/screens-setup.ts';
import type { MadeUpSession } from './made-up-replies.ts';
import { account, calendar, idOf, sessions, takenByYou } from './made-up-replies.ts';
import type { Answers, Asked } from './open-page.tsx';
import { openPage, Refuses } from './open-page.tsx';

const may = '/?month=2027-05';

function serverWith(shown: readonly MadeUpSession[] = sessions, answers: Answers = {}): Answers {
  return {
    seeAccount: () => account(),
    seeCalendar: ({ url }: Asked) => {
      const from = url.searchParams.get('from') ?? '';
      const to = url.searchParams.get('to') ?? '';
      if (!isCalendarDay(from) || !isCalendarDay(to))
        throw new Refuses('not-understood', 'No days');
      return calendar(from, to, shown);
    },
    ...answers,
  };
}

function cellOf(day: string): HTMLElement {
  const cell = document.querySelector<HTMLElement>(`td[data-date="${day}"]`);
  if (cell === null) throw new Error(`No cell for ${day}`);
  return cell;
}

describe('the month', () => {
  it('names its month in the heading, the tab and the arrows', async () => {
    openPage(may, serverWith());
    expect(await screen.findByRole('heading', { level: 1, name: 'May 2027' })).toBeInTheDocument();
    expect(screen.getByRole('link', { name: 'April 2027' })).toBeInTheDocument();
    expect(screen.getByRole('link', { name: 'June 2027' })).toBeInTheDocument();
    expect(document.title).toBe('May 2027 · Ebbfolk');
  });

  it('links to each session by a name that says how it stands', async () => {
    openPage(may, serverWith());
    const link = await screen.findByRole('link', { name: 'Gull Ledges, two gaps, one in doubt' });
    expect(link).toHaveAttribute('href', `/sessions/${idOf(107)}`);
    const names = screen.getAllByRole('link').map((each) => each.textContent);
    expect(names.join('\n')).toContain('Kettle Reef, done');
    expect(names.join('\n')).toContain('Gull Ledges, stood down');
    expect(names.join('\n')).toContain('Gull Ledges, covered, you are on the crew');
  });

  it('says of each day its low water and its sessions', async () => {
    openPage(may, serverWith());
    await screen.findByRole('link', { name: 'Gull Ledges, two gaps, one in doubt' });
    expect(cellOf('2027-05-09')).toHaveAccessibleName(
      'Sunday 9 May, low water 10:05, 0.8 metres, one session',
    );
    expect(cellOf('2027-05-12')).toHaveAccessibleName(
      'Wednesday 12 May, low water 12:05, 1.3 metres, no sessions',
    );
    expect(cellOf('2027-05-08')).toHaveAccessibleName(
      'Saturday 8 May, low water 09:28, 0.7 metres, springs, range 4.7 metres, two sessions',
    );
  });

  it('draws one floor of water for each of its weeks', async () => {
    openPage(may, serverWith());
    await screen.findByRole('link', { name: 'Gull Ledges, two gaps, one in doubt' });
    expect(document.querySelectorAll('[data-week-floor]')).toHaveLength(6);
  });

  it('lets two sessions stand on a day and says of a third that there are more', async () => {
    const user = userEvent.setup();
    const { router } = openPage(may, serverWith());
    const more = await screen.findByRole('link', { name: 'and two more, one with a gap' });
    const day = within(cellOf('2027-05-25'));
    expect(day.getAllByRole('link')).toHaveLength(2);
    await user.click(more);
    await waitFor(() => expect(day.getAllByRole('link')).toHaveLength(3));
    expect(router.state.location.search).toContain('day=2027-05-25');
  });

  it('opens a session in this page when its sign is pressed', async () => {
    const user = userEvent.setup();
    const { router } = openPage(may, serverWith());
    await user.click(
      await screen.findByRole('link', { name: 'Gull Ledges, two gaps, one in doubt' }),
    );
    await waitFor(() => expect(router.state.location.pathname).toBe(`/sessions/${idOf(107)}`));
  });

  it('shows only what the filters in the address leave', async () => {
    openPage(`${may}&mine=1`, serverWith());
    await screen.findAllByRole('link', { name: /you are on the crew/ });
    expect(screen.queryByRole('link', { name: 'Gull Ledges, two gaps, one in doubt' })).toBeNull();
  });

  it('keeps a filter in the address', async () => {
    const user = userEvent.setup();
    const { router } = openPage(may, serverWith());
    await screen.findByRole('link', { name: 'Gull Ledges, two gaps, one in doubt' });
    await user.click(screen.getByRole('checkbox', { name: 'Only gaps' }));
    await waitFor(() => expect(router.state.location.search).toBe('?month=2027-05&gaps=1'));
    expect(screen.queryByRole('link', { name: /covered/ })).toBeNull();
    await user.selectOptions(screen.getByRole('combobox', { name: 'Shore' }), 'Skerrow Flat');
    await waitFor(() =>
      expect(screen.queryByRole('link', { name: /^Gull Ledges, two gaps/ })).toBeNull(),
    );
  });

  it('goes from day to day by arrows, and into a session by Enter', async () => {
    const user = userEvent.setup();
    const { router } = openPage(may, serverWith());
    const link = await screen.findByRole('link', { name: 'Gull Ledges, two gaps, one in doubt' });
    link.focus();
    await user.keyboard('{ArrowDown}');
    expect(cellOf('2027-05-16')).toHaveFocus();
    await user.keyboard('{ArrowUp}{ArrowLeft}{ArrowLeft}');
    expect(cellOf('2027-05-07')).toHaveFocus();
    await user.keyboard('{Enter}');
    await waitFor(() => expect(router.state.location.pathname).toBe(`/sessions/${idOf(104)}`));
  });

  it('says beside it which is your next session and what you may take', async () => {
    openPage(may, serverWith());
    const aside = await screen.findByRole('complementary', { name: 'For you' });
    expect(
      await within(aside).findByRole('link', { name: 'Gull Ledges, Friday 7 May' }),
    ).toBeInTheDocument();
    expect(within(aside).getByText('Sun 9 May, 08:05 to 10:35')).toBeInTheDocument();
    expect(within(aside).getByText('Times in BST')).toBeInTheDocument();
  });

  it('says when a month has no session, and leads on', async () => {
    openPage(may, serverWith([]));
    expect(await screen.findByText('No sessions in May 2027.')).toBeInTheDocument();
    expect(screen.getByRole('link', { name: 'Look at June 2027' })).toHaveAttribute(
      'href',
      '/?month=2027-06',
    );
  });

  it('says what happened when it could not be loaded, and tries again', async () => {
    const user = userEvent.setup();
    let isUp = false;
    const server = serverWith();
    openPage(may, {
      ...server,
      seeCalendar: (asked) => {
        if (!isUp) throw new Refuses('unavailable', 'The database is not there just now');
        return server.seeCalendar?.(asked);
      },
    });
    expect(await screen.findByRole('alert')).toHaveTextContent(
      'The database is not there just now.',
    );
    isUp = true;
    await user.click(screen.getByRole('button', { name: 'Try again' }));
    expect(
      await screen.findByRole('link', { name: 'Gull Ledges, two gaps, one in doubt' }),
    ).toBeInTheDocument();
  });
});

describe('the strand list', () => {
  it('opens with the sessions that one may take, and claims on the spot', async () => {
    setWideScreen(false);
    const user = userEvent.setup();
    const { asked } = openPage(may, serverWith(sessions, { claimSlot: () => takenByYou() }));
    const list = await screen.findByRole('region', { name: 'Sessions you may take' });
    expect(within(list).getAllByRole('listitem')).toHaveLength(3);
    await user.click(
      within(list).getByRole('button', { name: 'Claim pool guide, Gull Ledges, 9 May' }),
    );
    await waitFor(() =>
      expect(asked.filter(({ endpoint }) => endpoint === 'claimSlot')).toHaveLength(1),
    );
  });

  it('shows the rest of them on demand', async () => {
    setWideScreen(false);
    const user = userEvent.setup();
    openPage(may, serverWith());
    await user.click(await screen.findByRole('button', { name: 'Two more' }));
    const list = screen.getByRole('region', { name: 'Sessions you may take' });
    expect(within(list).getAllByRole('listitem')).toHaveLength(5);
  });

  it('folds days that no low water serves into one line with the reasons', async () => {
    setWideScreen(false);
    openPage(may, serverWith());
    expect(await screen.findByText('Wed 12 May to Wed 19 May')).toBeInTheDocument();
    expect(screen.getByText('eight days, low water too high or out of hours')).toBeInTheDocument();
  });

  it('names each session with its times', async () => {
    setWideScreen(false);
    openPage(may, serverWith());
    expect(
      await screen.findByRole('link', {
        name: 'Gull Ledges, two gaps, one in doubt, 08:05 to 10:35',
      }),
    ).toHaveAttribute('href', `/sessions/${idOf(107)}`);
  });

  it('begins with today where the address names no month', async () => {
    setWideScreen(false);
    openPage('/', serverWith());
    expect(await screen.findByRole('heading', { name: 'April 2027' })).toBeInTheDocument();
    expect(screen.getByText('today')).toBeInTheDocument();
  });
});
