import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { openIdProvider } from '#backend/platform/sign-in/identity-provider.ts';
import type {
  IdentityProvider,
  SignInChecks,
} from '#backend/platform/sign-in/identity-provider.ts';
import { startHostileProvider } from '../support/hostile-provider.ts';
import type { HostileProvider, Misdeed } from '../support/hostile-provider.ts';

const callbackUrl = 'http://localhost:4999/auth/callback';
const secondsAgo = (seconds: number) => Math.floor(Date.now() / 1000) - seconds;

let hostile: HostileProvider;
let client: IdentityProvider;
let checks: SignInChecks;

beforeAll(async () => {
  hostile = await startHostileProvider();
  client = openIdProvider({
    issuer: hostile.issuer,
    clientId: 'tests',
    clientSecret: 'tests',
    callbackUrl,
  });
});
afterAll(() => hostile.close());
beforeEach(async () => {
  hostile.misdeed = {};
  ({ checks } = await client.begin());
  hostile.nonce = checks.nonce;
});

function comeBack(state = checks.state) {
  return client.finish(new URL(`${callbackUrl}?code=code&state=${state}`), checks);
}

describe('a sign-in', () => {
  it('goes out with PKCE, a state and a nonce, new every time', async () => {
    const [one, two] = [await client.begin(), await client.begin()];
    const query = new URL(one.goTo).searchParams;
    expect(query.get('code_challenge_method')).toBe('S256');
    expect(query.get('code_challenge')).toMatch(/^[\w-]{43}$/);
    expect(query.get('state')).toBe(one.checks.state);
    expect(query.get('nonce')).toBe(one.checks.nonce);
    expect(one.checks.state).not.toBe(two.checks.state);
    expect(one.checks.nonce).not.toBe(two.checks.nonce);
    expect(one.checks.codeVerifier).not.toBe(two.checks.codeVerifier);
  });

  it('is taken from an honest provider, with the address in lower case', async () => {
    expect(await comeBack()).toMatchObject({
      issuer: hostile.issuer,
      subject: 'hana',
      email: 'hana@example.org',
      isEmailVerified: true,
    });
  });

  it('takes "verified" only as true, never as a word', async () => {
    hostile.misdeed = { claims: { email_verified: 'true' } };
    expect(await comeBack()).toMatchObject({ isEmailVerified: false });
  });

  it('is refused with a state that was not asked for', async () => {
    await expect(comeBack('another-state')).rejects.toThrow();
  });

  it.each<[string, () => Misdeed]>([
    ['another issuer', () => ({ claims: { iss: 'http://127.0.0.1:1' } })],
    ['another audience', () => ({ claims: { aud: 'somebody else' } })],
    ['another nonce', () => ({ claims: { nonce: 'guessed' } })],
    ['no nonce', () => ({ claims: { nonce: undefined } })],
    ['a past expiry', () => ({ claims: { iat: secondsAgo(600), exp: secondsAgo(300) } })],
    ['no subject', () => ({ claims: { sub: undefined } })],
    ['algorithm none', () => ({ header: { alg: 'none' } })],
    ['a symmetric algorithm', () => ({ header: { alg: 'HS256' } })],
    ['a key that is not published', () => ({ signsWithUnknownKey: true })],
    ['an unknown key id', () => ({ header: { kid: 'two' } })],
    ['a subject changed after signing', () => ({ tampersWith: { sub: 'amara' } })],
    ['an address changed after signing', () => ({ tampersWith: { email: 'amara@example.org' } })],
    ['no ID token at all', () => ({ leavesOutIdToken: true })],
  ])('is refused with %s', async (_words, misdeed) => {
    hostile.misdeed = misdeed();
    await expect(comeBack()).rejects.toThrow();
  });
});
