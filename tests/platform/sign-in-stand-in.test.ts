import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import { openIdProvider } from '#backend/platform/sign-in/identity-provider.ts';
import type { IdentityProvider } from '#backend/platform/sign-in/identity-provider.ts';
import { startDevIdp } from '#dev-idp/provider.ts';
import type { DevIdp } from '#dev-idp/provider.ts';
import { demoPeople, demoRefusedPeople } from '#shared/demo/demo-people.ts';

const callbackUrl = 'http://localhost:3700/auth/callback';
const wish = {
  port: 0,
  clientId: 'rota',
  clientSecret: 'rota-secret',
  redirectUris: [callbackUrl],
  postLogoutUris: ['http://localhost:3700/sign-in'],
};

let idp: DevIdp;
let provider: IdentityProvider;

beforeAll(async () => {
  idp = await startDevIdp(wish);
  provider = openIdProvider({
    issuer: idp.issuer,
    clientId: wish.clientId,
    clientSecret: wish.clientSecret,
    callbackUrl,
  });
});

afterAll(() => idp.close());

/**
 * A browser as far as signing in needs one: at the provider it keeps cookies, follows redirects,
 * and submits the form with which the provider ends the session of the person before.
 */
function visitor() {
  const cookies = new Map<string, string>();
  const go = async (address: string, form?: Record<string, string>): Promise<Response> => {
    const response = await fetch(address, {
      redirect: 'manual',
      headers: { cookie: [...cookies].map(([name, value]) => `${name}=${value}`).join('; ') },
      ...(form === undefined ? {} : { method: 'POST', body: new URLSearchParams(form) }),
    });
    for (const line of response.headers.getSetCookie()) {
      const [, name = '', value = ''] = /^([^=]+)=([^;]*)/.exec(line) ?? [];
      cookies.set(name, value);
    }
    const next = response.headers.get('location');
    if (next === null) return submitted(response);
    const target = new URL(next, address);
    return target.origin === idp.issuer ? go(target.href) : response;
  };
  const submitted = async (response: Response): Promise<Response> => {
    const html = await response.clone().text();
    if (!html.includes('document.forms[0].submit()')) return response;
    const inputs = html.matchAll(/<input type="hidden" name="([^"]+)" value="([^"]+)"/g);
    return go(
      /action="([^"]+)"/.exec(html)?.[1] ?? '',
      Object.fromEntries([...inputs].map(([, name = '', value = '']) => [name, value])),
    );
  };
  return go;
}

/** Signs in by choosing somebody, and answers the address that the browser is sent back to. */
async function choose(goTo: string, choice: Record<string, string>, go = visitor()): Promise<URL> {
  const page = await go(goTo);
  expect(new URL(page.url).pathname).toMatch(/^\/choose\//);
  const back = await go(page.url, choice);
  return new URL(back.headers.get('location') ?? '', page.url);
}

describe('the stand-in for sign-in', () => {
  it.each([...demoPeople, ...demoRefusedPeople])(
    'hands over $name with the address, and whether it is verified',
    async ({ subject, email, isEmailVerified }) => {
      const { goTo, checks } = await provider.begin();
      const back = await choose(goTo, { subject });
      const identity = await provider.finish(back, checks);
      expect(identity).toMatchObject({ issuer: idp.issuer, subject, email, isEmailVerified });
    },
  );

  it('asks again at the next sign-in, so that people can be changed', async () => {
    const go = visitor();
    const first = await provider.begin();
    await choose(first.goTo, { subject: demoPeople[0].subject }, go);
    const second = await provider.begin();
    const back = await choose(second.goTo, { subject: demoPeople[1].subject }, go);
    const identity = await provider.finish(back, second.checks);
    expect(identity.subject).toBe(demoPeople[1].subject);
  });

  it.each([{ cancel: 'yes' }, { subject: 'nobody-of-this-name' }])(
    'sends back without anybody when the choice is %o',
    async (choice) => {
      const { goTo, checks } = await provider.begin();
      const back = await choose(goTo, choice);
      expect(back.searchParams.get('error')).toBe('access_denied');
      await expect(provider.finish(back, checks)).rejects.toThrow();
    },
  );

  it('gives nothing for a code without the verifier that belongs to it', async () => {
    const { goTo, checks } = await provider.begin();
    const back = await choose(goTo, { subject: demoPeople[0].subject });
    await expect(
      provider.finish(back, { ...checks, codeVerifier: 'x'.repeat(43) }),
    ).rejects.toThrow();
  });

  it('refuses a sign-in without PKCE', async () => {
    const { goTo } = await provider.begin();
    const without = new URL(goTo);
    without.searchParams.delete('code_challenge');
    without.searchParams.delete('code_challenge_method');
    const answer = await visitor()(without.href);
    const back = new URL(answer.headers.get('location') ?? '');
    expect(back.searchParams.get('error')).toBe('invalid_request');
  });

  it('sends nobody back to an address that it does not know', async () => {
    const { goTo } = await provider.begin();
    const elsewhere = new URL(goTo);
    elsewhere.searchParams.set('redirect_uri', 'http://localhost:3700/elsewhere');
    const answer = await visitor()(elsewhere.href);
    expect(answer.status).toBe(400);
    expect(answer.headers.get('location')).toBeNull();
    expect(await answer.text()).toContain('This sign-in did not work');
  });

  it('loads nothing from outside on its pages', async () => {
    const { goTo } = await provider.begin();
    const page = await visitor()(goTo);
    expect(page.headers.get('content-security-policy')).toContain("default-src 'none'");
    expect(await page.text()).not.toMatch(/(?:src|href)=|url\((?!\/)/);
  });

  it('refuses to start in production', async () => {
    vi.stubEnv('NODE_ENV', 'production');
    try {
      await expect(startDevIdp(wish)).rejects.toThrow(/production/);
    } finally {
      vi.unstubAllEnvs();
    }
  });
});
