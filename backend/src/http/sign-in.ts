import { promisify } from 'node:util';
import connectPgSimple from 'connect-pg-simple';
import type { Request, RequestHandler } from 'express';
import session from 'express-session';
import pg from 'pg';
import type { PersonId } from '#shared/kernel/ids.ts';
import type { Instant } from '#shared/kernel/time.ts';
import type { Role } from '#shared/policy/policy.ts';

/** What has to match when the browser comes back from the provider. */
export interface PendingSignIn {
  readonly state: string;
  readonly nonce: string;
  readonly codeVerifier: string;
  readonly returnTo: string;
}

declare module 'express-session' {
  interface SessionData {
    pending?: PendingSignIn;
    signedIn?: { personId: PersonId; idToken: string; signedInAt: Instant; seenAt: Instant };
  }
}

const hourMs = 3_600_000;
const dayMs = 24 * hourMs;

/** How long a sign-in lasts in all, and how long without a request. */
const volunteerLimits = { wholeMs: 30 * dayMs, idleMs: 14 * dayMs };
const dutyLimits = { wholeMs: 12 * hourMs, idleMs: hourMs };

/** Rows are touched at most this often while somebody works. */
const touchMs = 60_000;

const cookieName = 'ebbfolk.sign-in';

/** The sign-in of one browser, as handlers may use it. */
export interface SignIn {
  readonly idToken: string | null;
  /** Keeps what must match at the return from the provider. */
  expect(pending: PendingSignIn): Promise<void>;
  /** Takes what was kept; the next call finds nothing. */
  takeExpected(): PendingSignIn | null;
  /** Begins a new sign-in under a new session id. */
  begin(personId: PersonId, idToken: string): Promise<void>;
  /** Ends the sign-in in this browser. */
  end(): Promise<void>;
}

/** Keeps sign-ins in PostgreSQL, in their own small pool. */
export function signInSessions(settings: {
  readonly databaseUrl: string;
  readonly secret: string;
  readonly isSecure: boolean;
}): { readonly middleware: RequestHandler; close(): Promise<void> } {
  const Store = connectPgSimple(session);
  const pool = new pg.Pool({ connectionString: settings.databaseUrl, max: 3 });
  const store = new Store({ pool, tableName: 'sign_in_session', createTableIfMissing: false });
  const middleware = session({
    store,
    name: cookieName,
    secret: settings.secret,
    resave: false,
    saveUninitialized: false,
    cookie: {
      httpOnly: true,
      sameSite: 'lax',
      secure: settings.isSecure,
      path: '/',
      maxAge: volunteerLimits.wholeMs,
    },
  });
  return {
    middleware,
    async close() {
      store.close();
      await pool.end();
    },
  };
}

/** The handle on the sign-in of the browser that sent this request. */
export function signInOf(request: Request, now: () => Instant): SignIn {
  return {
    get idToken() {
      return request.session.signedIn?.idToken ?? null;
    },
    async expect(pending) {
      request.session.pending = pending;
      await save(request);
    },
    takeExpected() {
      const pending = request.session.pending ?? null;
      delete request.session.pending;
      return pending;
    },
    async begin(personId, idToken) {
      await promisify(request.session.regenerate.bind(request.session))();
      request.session.signedIn = { personId, idToken, signedInAt: now(), seenAt: now() };
      await save(request);
    },
    end: () => promisify(request.session.destroy.bind(request.session))(),
  };
}

/**
 * The person signed in in this browser, or null when nobody is or the sign-in has run out.
 * A volunteer's lasts 30 days and 14 without a request; that of anybody with a further role
 * 12 hours and one hour, counted by the roles of this moment.
 */
export async function whoIsSignedIn<Person extends { readonly roles: readonly Role[] }>(
  request: Request,
  now: Instant,
  find: (personId: PersonId) => Promise<Person | null>,
): Promise<Person | null> {
  const signedIn = request.session.signedIn;
  if (signedIn === undefined) return null;
  const person = await find(signedIn.personId);
  if (person === null) return null;
  const limits = person.roles.every((role) => role === 'volunteer') ? volunteerLimits : dutyLimits;
  if (now - signedIn.signedInAt >= limits.wholeMs || now - signedIn.seenAt >= limits.idleMs) {
    return null;
  }
  if (now - signedIn.seenAt >= touchMs) signedIn.seenAt = now;
  return person;
}

function save(request: Request): Promise<void> {
  return promisify(request.session.save.bind(request.session))();
}
