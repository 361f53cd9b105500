import { screen, waitFor, within } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it } from 'vitest';
import type { SessionView } from '#shared/contracts/sessions.ts';
import type { ProblemReply } from '#shared/contracts/problem.ts';
import { account, idOf, openGap, session, takenByYou } from './made-up-replies.ts';
import type { Answers } from './open-page.tsx';
import { openPage, Refuses } from './open-page.tsx';

const address = `/sessions/${idOf(107)}`;

/** A server that keeps one session and changes its last slot as it is claimed and released. */
function serverWith(answers: Answers = {}): Answers {
  let kept: SessionView = session();
  const put = (slot: SessionView['slots'][number]) => {
    kept = { ...kept, slots: kept.slots.map((other) => (other.id === slot.id ? slot : other)) };
    return slot;
  };
  return {
    seeAccount: () => account(),
    seeSession: () => kept,
    claimSlot: () => put(takenByYou()),
    releaseSlot: () => put(openGap()),
    ...answers,
  };
}

function slotNamed(name: RegExp, index = 0): HTMLElement {
  const list = screen.getByRole('region', { name: 'Slots and crew' });
  const rows = within(list).getAllByRole('listitem');
  const row = rows.filter((item) => {
    const heading = within(item).queryByRole('heading', { level: 3 });
    return heading !== null && name.test(heading.textContent);
  })[index];
  if (row === undefined) throw new Error(`No slot named ${name}`);
  return row;
}

describe('the page of a session', () => {
  it('says where and when it is, in its heading and in the tab', async () => {
    openPage(address, serverWith());
    expect(
      await screen.findByRole('heading', { level: 1, name: 'Gull Ledges, Sunday 9 May' }),
    ).toBeInTheDocument();
    expect(screen.getByText('Sunday families. In ten days.')).toBeInTheDocument();
    expect(document.title).toBe('Gull Ledges, Sunday 9 May · Ebbfolk');
  });

  it('says the low water, the window and both deadlines of its curve aloud', async () => {
    openPage(address, serverWith());
    expect(
      await screen.findByRole('img', { name: /^Water line for the day at Gull Ledges/ }),
    ).toHaveAccessibleName(
      'Water line for the day at Gull Ledges. Low water 10:05, 0.8 metres. Working window 08:05 to 10:35. Lower shore clear by 10:05. Off the shore by 10:35.',
    );
  });

  it('says the zone of its times, its tide station and who decides', async () => {
    openPage(address, serverWith());
    expect(await screen.findByText('Times in BST.')).toBeInTheDocument();
    expect(
      screen.getByText(
        'Predictions are predictions: pressure, wind and swell move the water. The official tide table and the shore leader on the spot decide.',
      ),
    ).toBeInTheDocument();
    expect(
      screen.getByText(
        'Outer Skerrow, 54.61° N, 1.14° W. Heights in metres above LAT. Invented for these pages.',
      ),
    ).toBeInTheDocument();
  });

  it('gives every reason against a claim with what would mend it, and no button', async () => {
    openPage(address, serverWith());
    await screen.findByText('You may not claim this slot, for two reasons.');
    const row = slotNamed(/Shore leader/);
    const reasons = within(row).getAllByRole('listitem');
    expect(reasons.map((reason) => reason.textContent)).toEqual([
      'Tide safety lapses on 3 May, six days before this session.How to renew it: the refresher on the first Saturday of the month.',
      'Shore leading not held.How to get it: three sessions beside a leader, then a check.',
    ]);
    expect(row.querySelectorAll('[data-gauge]')).toHaveLength(2);
    expect(within(row).queryByRole('button')).toBeNull();
  });

  it('claims a slot and shows at once that it is yours', async () => {
    const user = userEvent.setup();
    const { asked } = openPage(address, serverWith());
    await user.click(await screen.findByRole('button', { name: 'Claim this slot, pool guide' }));
    const row = await waitFor(() => {
      const claimed = slotNamed(/Pool guide/, 1);
      expect(within(claimed).getByText('You')).toBeInTheDocument();
      return claimed;
    });
    expect(asked.map(({ endpoint }) => endpoint)).toContain('claimSlot');
    expect(asked.find(({ endpoint }) => endpoint === 'claimSlot')?.url.pathname).toBe(
      `/api/slots/${idOf(1073)}/claim`,
    );
    expect(row.querySelector('[data-limpet="yours"]')).not.toBeNull();
    expect(within(row).getByRole('heading', { level: 3 })).toHaveFocus();
    expect(within(row).getByRole('button', { name: 'Release this slot' })).toBeInTheDocument();
  });

  it('shows every reason of a refusal by the server, and the refusal takes the focus', async () => {
    const reasons: ProblemReply['reasons'] = [
      { why: 'slot-taken', holderName: 'Dorothy Ashdown', claimedAt: '2027-04-29T12:04:00.000Z' },
      {
        why: 'competency-not-held',
        competencyId: idOf(23),
        competencyName: 'Pool guiding',
        howToGet: 'two sessions beside a pool guide.',
      },
    ];
    const user = userEvent.setup();
    openPage(
      address,
      serverWith({
        claimSlot: () => {
          throw new Refuses('claim-refused', 'This slot cannot be claimed', reasons);
        },
      }),
    );
    await user.click(await screen.findByRole('button', { name: /^Claim this slot/ }));
    const alert = await screen.findByRole('alert');
    expect(alert).toHaveFocus();
    expect(alert).toHaveTextContent('The slot was not claimed.');
    expect(alert).toHaveTextContent('Dorothy Ashdown has claimed it.');
    expect(alert).toHaveTextContent('Pool guiding not held.');
  });

  it('says so when no answer comes, and the claim can be tried again', async () => {
    const user = userEvent.setup();
    openPage(
      address,
      serverWith({
        claimSlot: () => {
          throw new TypeError('no network');
        },
      }),
    );
    await user.click(await screen.findByRole('button', { name: /^Claim this slot/ }));
    expect(await screen.findByRole('alert')).toHaveTextContent(
      'No answer came from the server. Check the connection, then try again.',
    );
    expect(screen.getByRole('button', { name: /^Claim this slot/ })).not.toHaveAttribute(
      'aria-disabled',
    );
  });

  it('is busy while a claim is under way and sends it once', async () => {
    const user = userEvent.setup();
    const { asked } = openPage(address, serverWith({ claimSlot: () => new Promise(() => {}) }));
    const button = await screen.findByRole('button', { name: /^Claim this slot/ });
    await user.click(button);
    await user.click(button);
    expect(button).toHaveAttribute('aria-disabled', 'true');
    expect(button).toHaveTextContent('Claiming');
    expect(asked.filter(({ endpoint }) => endpoint === 'claimSlot')).toHaveLength(1);
  });

  it('asks before a slot is released, and gives it back only on a yes', async () => {
    const user = userEvent.setup();
    const { asked } = openPage(address, serverWith());
    await user.click(await screen.findByRole('button', { name: /^Claim this slot/ }));
    await user.click(await screen.findByRole('button', { name: 'Release this slot' }));
    const dialog = await screen.findByRole('alertdialog', { name: 'Release pool guide?' });
    await user.click(within(dialog).getByRole('button', { name: 'Keep it' }));
    await waitFor(() => expect(screen.queryByRole('alertdialog')).toBeNull());
    expect(asked.map(({ endpoint }) => endpoint)).not.toContain('releaseSlot');

    await user.click(screen.getByRole('button', { name: 'Release this slot' }));
    await user.click(await screen.findByRole('button', { name: 'Release it' }));
    expect(
      await screen.findByRole('button', { name: 'Claim this slot, pool guide' }),
    ).toBeInTheDocument();
    expect(asked.filter(({ endpoint }) => endpoint === 'releaseSlot')).toHaveLength(1);
  });

  it('tells what happened, newest first, in words', async () => {
    openPage(address, serverWith());
    const trail = await screen.findByRole('region', { name: 'Trail' });
    expect(
      within(trail)
        .getAllByRole('listitem')
        .map((line) => line.textContent),
    ).toEqual([
      '24 AprAmara Nwosu released shore leader.',
      '14 AprWei-Ling Foo claimed pool guide.',
      '2 MarInes Thackeray made this session.',
    ]);
  });

  it('says in words that no prediction covers the day', async () => {
    openPage(address, serverWith({ seeSession: () => session({ water: null }) }));
    expect(await screen.findByText('No tide data for this day.')).toBeInTheDocument();
  });

  it('says that nothing is here when there is no such session', async () => {
    openPage(
      address,
      serverWith({
        seeSession: () => {
          throw new Refuses('not-found', 'No such session');
        },
      }),
    );
    expect(
      await screen.findByRole('heading', { level: 1, name: 'Nothing is here' }),
    ).toBeInTheDocument();
  });

  it('sends who is no longer signed in to the sign-in page, to come back here', async () => {
    const { router } = openPage(
      address,
      serverWith({
        seeSession: () => {
          throw new Refuses('not-signed-in', 'Sign in first');
        },
        seeFrontDoor: () => {
          throw new Refuses('unavailable', 'Not now');
        },
      }),
    );
    await waitFor(() => expect(router.state.location.pathname).toBe('/sign-in'));
    expect(new URLSearchParams(router.state.location.search).get('returnTo')).toBe(address);
  });
});
