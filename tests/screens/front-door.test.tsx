import { screen, waitFor } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { describe, expect, it } from 'vitest';
import { account, calendar, callum, frontDoor } from './made-up-replies.ts';
import { openPage, Refuses } from './open-page.tsx';

describe('the sign-in page', () => {
  it('leads to signing in, and back to where one was going', async () => {
    openPage('/sign-in?returnTo=%2Fsessions%2F1', { seeFrontDoor: () => frontDoor() });
    expect(await screen.findByRole('link', { name: 'Sign in' })).toHaveAttribute(
      'href',
      '/auth/sign-in?returnTo=%2Fsessions%2F1',
    );
  });

  it.each(['https://elsewhere.test/', '//elsewhere.test/', 'javascript:alert(1)'])(
    'never leads on to %s, which is no path of this site',
    async (returnTo) => {
      openPage(`/sign-in?${new URLSearchParams({ returnTo }).toString()}`, {
        seeFrontDoor: () => frontDoor(),
      });
      expect(await screen.findByRole('link', { name: 'Sign in' })).toHaveAttribute(
        'href',
        '/auth/sign-in?returnTo=%2F',
      );
    },
  );

  it('says whether the next session is on, with its zone', async () => {
    openPage('/sign-in', { seeFrontDoor: () => frontDoor() });
    expect(await screen.findByText('On')).toBeInTheDocument();
    expect(screen.getByText(/times in BST/)).toBeInTheDocument();
    expect(
      screen.getByText(/volunteers of Gull Ledges, Kettle Reef and Skerrow Flat\./),
    ).toBeInTheDocument();
    expect(screen.getByRole('img', { name: /^The water for 14 days/ })).toBeInTheDocument();
  });

  it('says that the next session is stood down, and gives no times to come at', async () => {
    openPage('/sign-in', { seeFrontDoor: () => frontDoor('stood-down') });
    expect(await screen.findByText('Stood down')).toBeInTheDocument();
    expect(screen.queryByText(/The party meets/)).toBeNull();
  });

  it('says that no session is planned', async () => {
    openPage('/sign-in', { seeFrontDoor: () => frontDoor('none') });
    expect(await screen.findByText('No session is planned.')).toBeInTheDocument();
  });

  it('still leads in when the next session could not be loaded', async () => {
    openPage('/sign-in', {
      seeFrontDoor: () => {
        throw new Refuses('unavailable', 'Not just now');
      },
    });
    expect(await screen.findByRole('alert')).toHaveTextContent('Not just now.');
    expect(screen.getByRole('link', { name: 'Sign in' })).toBeInTheDocument();
  });
});

describe('a sign-in that does not lead in', () => {
  it.each([
    ['not-invited', 'You are not in the group yet'],
    ['email-not-verified', 'Your address is not verified'],
    ['paused', 'Your place in the group is paused'],
    ['other-identity', 'Your address belongs to another sign-in'],
    ['failed', 'The sign-in did not go through'],
    ['anything-else', 'The sign-in did not go through'],
  ])('for %s says "%s" and what to do next', async (why, title) => {
    openPage(`/sign-in/refused?why=${why}`, {});
    expect(await screen.findByRole('heading', { level: 1, name: title })).toBeInTheDocument();
    expect(screen.getByRole('link', { name: 'Try again' })).toHaveAttribute(
      'href',
      '/auth/sign-in?returnTo=%2F',
    );
    expect(screen.getByRole('button', { name: 'Sign out at the sign-in page' })).toBeEnabled();
  });
});

describe('the frame of every page', () => {
  it('sends who is not signed in to the sign-in page, to come back here', async () => {
    const { router } = openPage('/?month=2027-05', {
      seeAccount: () => account(null),
      seeFrontDoor: () => frontDoor(),
    });
    await waitFor(() => expect(router.state.location.pathname).toBe('/sign-in'));
    expect(new URLSearchParams(router.state.location.search).get('returnTo')).toBe(
      '/?month=2027-05',
    );
  });

  it('says who is signed in as what, and the low water of today', async () => {
    openPage('/', {
      seeAccount: () => account({ ...callum, roles: ['volunteer', 'coordinator', 'trainer'] }),
      seeCalendar: () => calendar('2027-04-26', '2027-05-02'),
    });
    expect(await screen.findByText('Callum Marrack')).toBeInTheDocument();
    expect(screen.getByText('coordinator, trainer')).toBeInTheDocument();
    expect(screen.getByText('13:43 BST, 1.8 m')).toBeInTheDocument();
  });

  it('moves the focus to the heading of a page that is reached from within', async () => {
    const user = userEvent.setup();
    openPage('/nowhere', {
      seeAccount: () => account(),
      seeCalendar: () => calendar('2027-04-26', '2027-05-02'),
    });
    await user.click(await screen.findByRole('link', { name: 'Go to the calendar' }));
    expect(await screen.findByRole('heading', { level: 1, name: 'April 2027' })).toHaveFocus();
  });

  it('offers a way past its head', async () => {
    openPage('/nowhere', { seeAccount: () => account() });
    expect(await screen.findByRole('link', { name: 'Skip to the page' })).toHaveAttribute(
      'href',
      '#main',
    );
    expect(document.querySelector('main')).toHaveAttribute('id', 'main');
  });

  it('says what happened when the account could not be loaded', async () => {
    openPage('/', {
      seeAccount: () => {
        throw new Refuses('unexpected', 'Something went wrong');
      },
    });
    expect(await screen.findByRole('alert')).toHaveTextContent('This page could not be shown.');
  });
});
