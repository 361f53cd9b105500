import { generateKeyPairSync, randomBytes } from 'node:crypto';
import { createServer } from 'node:http';
import type { IncomingMessage, ServerResponse } from 'node:http';
import type { AddressInfo } from 'node:net';
import Provider, { errors, interactionPolicy } from 'oidc-provider';
import type { JWK, KoaContextWithOIDC } from 'oidc-provider';
import { answerFont } from './fonts.ts';
import { choosePage, contentPolicy, errorPage, signedOutPage, signOutPage } from './pages.ts';
import { claimsOf, findPerson } from './people.ts';

interface DevIdpWish {
  /** 0: any free port. */
  readonly port: number;
  readonly clientId: string;
  readonly clientSecret: string;
  readonly redirectUris: readonly string[];
  readonly postLogoutUris: readonly string[];
  /** Kept from one start to the next, so that tokens of the last one still count; else made anew. */
  readonly signingKey?: JWK;
  readonly cookieKey?: string;
}

/** The stand-in, running. The issuer is written with 127.0.0.1 and matches only to the letter. */
export interface DevIdp {
  readonly issuer: string;
  close(): Promise<void>;
}

const host = '127.0.0.1';
const scopes = 'openid email profile';
const hourSeconds = 3_600;
const longestFormBytes = 4_096;

/**
 * Starts the OpenID Connect provider that stands in for the group's own: authorisation code
 * flow with PKCE, one click for each invented person, no passwords. It asks at every sign-in, so
 * that people can be changed. Throws in production.
 */
export async function startDevIdp(wish: DevIdpWish): Promise<DevIdp> {
  if (process.env['NODE_ENV'] === 'production') {
    throw new Error(
      'The sign-in stand-in lets anybody in as anybody and refuses to run in production.',
    );
  }
  const server = createServer();
  await new Promise<void>((resolve, reject) => {
    server.once('error', reject);
    server.listen(wish.port, host, resolve);
  });
  const issuer = `http://${host}:${(server.address() as AddressInfo).port}`;
  const provider = makeProvider(issuer, wish);
  const protocol = provider.callback();
  server.on('request', (request, response) => {
    answer(provider, protocol, request, response).catch((error: unknown) => {
      process.stderr.write(
        `${error instanceof Error ? (error.stack ?? error.message) : String(error)}\n`,
      );
      sendPage(response, 400, (nonce) => errorPage(asProviderError(error), nonce));
    });
  });
  return {
    issuer,
    close: () =>
      new Promise((resolve, reject) => {
        server.close((error) => (error === undefined ? resolve() : reject(error)));
        server.closeAllConnections();
      }),
  };
}

function makeProvider(issuer: string, wish: DevIdpWish): Provider {
  const policy = interactionPolicy.base();
  policy
    .get('login')
    ?.checks.add(
      new interactionPolicy.Check('asks-each-time', 'the stand-in asks at every sign-in', (ctx) =>
        ctx.oidc.result?.login === undefined
          ? interactionPolicy.Check.REQUEST_PROMPT
          : interactionPolicy.Check.NO_NEED_TO_PROMPT,
      ),
    );
  return new Provider(issuer, {
    clients: [
      {
        client_id: wish.clientId,
        client_secret: wish.clientSecret,
        redirect_uris: [...wish.redirectUris],
        post_logout_redirect_uris: [...wish.postLogoutUris],
        grant_types: ['authorization_code'],
        response_types: ['code'],
        token_endpoint_auth_method: 'client_secret_basic',
      },
    ],
    jwks: { keys: [wish.signingKey ?? makeSigningKey()] },
    cookies: {
      keys: [wish.cookieKey ?? randomBytes(32).toString('hex')],
      // Cookies do not know ports: another program on this host may use the usual names.
      names: {
        session: 'ebbfolk_stand_in',
        interaction: 'ebbfolk_stand_in_step',
        resume: 'ebbfolk_stand_in_resume',
      },
    },
    pkce: { required: () => true },
    scopes: scopes.split(' '),
    claims: { openid: ['sub'], email: ['email', 'email_verified'], profile: ['name'] },
    conformIdTokenClaims: false,
    findAccount: (_ctx, subject) => {
      const person = findPerson(subject);
      return person && { accountId: subject, claims: () => claimsOf(person) };
    },
    loadExistingGrant: grantWithoutAsking,
    interactions: { policy, url: (_ctx, interaction) => `/choose/${interaction.uid}` },
    features: {
      devInteractions: { enabled: false },
      rpInitiatedLogout: {
        enabled: true,
        logoutSource: (ctx, form) => showPage(ctx, (nonce) => signOutPage(form, nonce)),
        postLogoutSuccessSource: (ctx) => showPage(ctx, signedOutPage),
      },
    },
    renderError: (ctx, out) => showPage(ctx, (nonce) => errorPage(out, nonce)),
    ttl: {
      AccessToken: hourSeconds,
      AuthorizationCode: 60,
      Grant: hourSeconds,
      IdToken: hourSeconds,
      Interaction: hourSeconds,
      Session: hourSeconds,
    },
  });
}

async function grantWithoutAsking(ctx: KoaContextWithOIDC) {
  const { client, session, provider } = ctx.oidc;
  if (client === undefined || session?.accountId === undefined) return undefined;
  const grant = new provider.Grant({ clientId: client.clientId, accountId: session.accountId });
  grant.addOIDCScope(scopes);
  await grant.save();
  return grant;
}

async function answer(
  provider: Provider,
  protocol: (request: IncomingMessage, response: ServerResponse) => unknown,
  request: IncomingMessage,
  response: ServerResponse,
): Promise<void> {
  const path = request.url?.split('?')[0] ?? '/';
  if (answerFont(path, response)) return;
  if (!path.startsWith('/choose/')) {
    await protocol(request, response);
    return;
  }
  if (request.method !== 'POST') {
    await provider.interactionDetails(request, response);
    sendPage(response, 200, (nonce) => choosePage(path, nonce));
    return;
  }
  const chosen = new URLSearchParams(await readForm(request));
  const person = findPerson(chosen.get('subject') ?? '');
  const result =
    person === undefined
      ? { error: 'access_denied', error_description: 'Nobody was chosen' }
      : { login: { accountId: person.subject } };
  await provider.interactionFinished(request, response, result, { mergeWithLastSubmission: false });
}

async function readForm(request: IncomingMessage): Promise<string> {
  let text = '';
  for await (const chunk of request) {
    text += String(chunk);
    if (text.length > longestFormBytes) throw new Error('The form is too long');
  }
  return text;
}

function showPage(ctx: KoaContextWithOIDC, write: (nonce: string) => string): void {
  const nonce = randomBytes(16).toString('base64url');
  ctx.type = 'html';
  ctx.set('Content-Security-Policy', contentPolicy(nonce));
  ctx.body = write(nonce);
}

function sendPage(
  response: ServerResponse,
  status: number,
  write: (nonce: string) => string,
): void {
  if (response.headersSent) {
    response.end();
    return;
  }
  const nonce = randomBytes(16).toString('base64url');
  response.writeHead(status, {
    'Content-Type': 'text/html; charset=utf-8',
    'Content-Security-Policy': contentPolicy(nonce),
    'Cache-Control': 'no-store',
  });
  response.end(write(nonce));
}

function asProviderError(error: unknown): {
  error: string;
  error_description?: string | undefined;
} {
  return error instanceof errors.OIDCProviderError ? error : { error: 'server_error' };
}

function makeSigningKey(): JWK {
  const { privateKey } = generateKeyPairSync('rsa', { modulusLength: 2048 });
  return { ...privateKey.export({ format: 'jwk' }), use: 'sig', alg: 'RS256' };
}
