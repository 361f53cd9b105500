import { createPublicKey, generateKeyPairSync, sign } from 'node:crypto';
import type { KeyObject } from 'node:crypto';
import { createServer } from 'node:http';
import type { AddressInfo } from 'node:net';

/** What the provider does differently from an honest one, for the next token. */
export interface Misdeed {
  readonly header?: Readonly<Record<string, unknown>>;
  readonly claims?: Readonly<Record<string, unknown>>;
  /** Signs with a key that is not published. */
  readonly signsWithUnknownKey?: boolean;
  /** Changes the payload after signing. */
  readonly tampersWith?: Readonly<Record<string, unknown>>;
  readonly leavesOutIdToken?: boolean;
}

/** A small OpenID Connect provider that can be told to lie. */
export interface HostileProvider {
  readonly issuer: string;
  misdeed: Misdeed;
  /** The nonce that an honest token carries. */
  nonce: string;
  close(): Promise<void>;
}

const clientId = 'tests';

export async function startHostileProvider(): Promise<HostileProvider> {
  const honest = generateKeyPairSync('rsa', { modulusLength: 2048 }).privateKey;
  const unknown = generateKeyPairSync('rsa', { modulusLength: 2048 }).privateKey;
  const server = createServer((request, response) => {
    const reply = (body: object): void => {
      response.setHeader('content-type', 'application/json').end(JSON.stringify(body));
    };
    if (request.url === '/.well-known/openid-configuration') reply(metadata(provider.issuer));
    else if (request.url === '/jwks') {
      reply({
        keys: [
          {
            ...createPublicKey(honest).export({ format: 'jwk' }),
            kid: 'one',
            alg: 'RS256',
            use: 'sig',
          },
        ],
      });
    } else if (request.url === '/token') {
      const { misdeed } = provider;
      const token = idToken(provider, misdeed.signsWithUnknownKey === true ? unknown : honest);
      reply({
        access_token: 'access',
        token_type: 'Bearer',
        expires_in: 60,
        ...(misdeed.leavesOutIdToken === true ? {} : { id_token: token }),
      });
    } else response.writeHead(404).end();
  });
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  const provider: HostileProvider = {
    issuer: `http://127.0.0.1:${(server.address() as AddressInfo).port}`,
    misdeed: {},
    nonce: '',
    close: () =>
      new Promise((resolve, reject) => {
        server.close((error) => (error === undefined ? resolve() : reject(error)));
        server.closeAllConnections();
      }),
  };
  return provider;
}

function metadata(issuer: string): object {
  return {
    issuer,
    authorization_endpoint: `${issuer}/authorize`,
    token_endpoint: `${issuer}/token`,
    jwks_uri: `${issuer}/jwks`,
    response_types_supported: ['code'],
    subject_types_supported: ['public'],
    id_token_signing_alg_values_supported: ['RS256'],
  };
}

function idToken(provider: HostileProvider, key: KeyObject): string {
  const { header, claims, tampersWith } = provider.misdeed;
  const now = Math.floor(Date.now() / 1000);
  const honest = {
    iss: provider.issuer,
    sub: 'hana',
    aud: clientId,
    exp: now + 60,
    iat: now,
    nonce: provider.nonce,
    email: 'Hana@Example.org',
    email_verified: true,
    ...claims,
  };
  const part = (value: object): string => Buffer.from(JSON.stringify(value)).toString('base64url');
  const head = part({ alg: 'RS256', kid: 'one', ...header });
  const signature =
    header?.['alg'] === 'none'
      ? ''
      : sign('sha256', Buffer.from(`${head}.${part(honest)}`), key).toString('base64url');
  return `${head}.${part({ ...honest, ...tampersWith })}.${signature}`;
}
