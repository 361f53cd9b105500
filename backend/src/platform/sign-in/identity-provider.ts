import * as client from 'openid-client';

/** What has to match when the browser comes back. */
export interface SignInChecks {
  readonly state: string;
  readonly nonce: string;
  readonly codeVerifier: string;
}

/** Who the provider says has signed in. The subject is unique within the issuer. */
export interface Identity {
  readonly issuer: string;
  readonly subject: string;
  readonly email: string | null;
  readonly isEmailVerified: boolean;
  readonly idToken: string;
}

export interface IdentityProvider {
  /** The provider's page for signing in, and what to keep until the browser comes back. */
  begin(): Promise<{ readonly goTo: string; readonly checks: SignInChecks }>;
  /** Exchanges the code in the callback's address. Throws when anything does not match. */
  finish(callback: URL, checks: SignInChecks): Promise<Identity>;
  /** The page that ends the provider's own session; null where it has none. */
  endSession(idToken: string, returnTo: string): Promise<string | null>;
}

const clockToleranceSeconds = 30;
const scope = 'openid email profile';

/**
 * An OpenID Connect provider, found by its issuer at first use: authorisation code flow with
 * PKCE, state and nonce; the ID token's signature is checked although it comes over the back
 * channel. Plain http is spoken to loopback issuers only.
 */
export function openIdProvider(settings: {
  readonly issuer: string;
  readonly clientId: string;
  readonly clientSecret: string;
  readonly callbackUrl: string;
}): IdentityProvider {
  let found: Promise<client.Configuration> | null = null;
  const configuration = (): Promise<client.Configuration> => {
    found ??= discover(settings).catch((error: unknown) => {
      found = null;
      throw error;
    });
    return found;
  };
  return {
    async begin() {
      const checks = {
        state: client.randomState(),
        nonce: client.randomNonce(),
        codeVerifier: client.randomPKCECodeVerifier(),
      };
      const goTo = client.buildAuthorizationUrl(await configuration(), {
        redirect_uri: settings.callbackUrl,
        scope,
        state: checks.state,
        nonce: checks.nonce,
        code_challenge: await client.calculatePKCECodeChallenge(checks.codeVerifier),
        code_challenge_method: 'S256',
      });
      return { goTo: goTo.href, checks };
    },
    async finish(callback, checks) {
      const config = await configuration();
      const tokens = await client.authorizationCodeGrant(config, callback, {
        expectedState: checks.state,
        expectedNonce: checks.nonce,
        pkceCodeVerifier: checks.codeVerifier,
        idTokenExpected: true,
      });
      const claims = tokens.claims();
      if (claims === undefined || tokens.id_token === undefined) {
        throw new Error('The provider sent no ID token');
      }
      const told =
        claims['email'] === undefined
          ? await client.fetchUserInfo(config, tokens.access_token, claims.sub)
          : claims;
      return {
        issuer: claims.iss,
        subject: claims.sub,
        email: typeof told['email'] === 'string' ? told['email'].trim().toLowerCase() : null,
        isEmailVerified: told['email_verified'] === true,
        idToken: tokens.id_token,
      };
    },
    async endSession(idToken, returnTo) {
      const config = await configuration();
      if (config.serverMetadata().end_session_endpoint === undefined) return null;
      return client.buildEndSessionUrl(config, {
        id_token_hint: idToken,
        post_logout_redirect_uri: returnTo,
      }).href;
    },
  };
}

async function discover(settings: {
  readonly issuer: string;
  readonly clientId: string;
  readonly clientSecret: string;
}): Promise<client.Configuration> {
  const issuer = new URL(settings.issuer);
  const isLoopback = ['localhost', '127.0.0.1', '[::1]'].includes(issuer.hostname);
  // eslint-disable-next-line @typescript-eslint/no-deprecated -- marked so to stand out; loopback only
  const plainHttp = { execute: [client.allowInsecureRequests] };
  const config = await client.discovery(
    issuer,
    settings.clientId,
    { client_secret: settings.clientSecret, [client.clockTolerance]: clockToleranceSeconds },
    client.ClientSecretBasic(settings.clientSecret),
    issuer.protocol === 'http:' && isLoopback ? plainHttp : {},
  );
  client.enableNonRepudiationChecks(config);
  return config;
}
