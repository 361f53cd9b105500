import { createHmac, randomUUID } from 'node:crypto';
import { pino } from 'pino';
import supertest from 'supertest';
import type { Test } from 'supertest';
import { startApp } from '#backend/app.ts';
import type { App } from '#backend/app.ts';
import { stoppedClock } from '#backend/platform/clock/clock.ts';
import type { Mailer, OutgoingMail } from '#backend/platform/mail/mailer.ts';
import type { Settings } from '#backend/settings.ts';
import type { PersonId } from '#shared/kernel/ids.ts';
import { fromIso } from '#shared/kernel/time.ts';
import { cloneDatabase } from './test-database.ts';
import type { TestDatabase } from './test-database.ts';

/** When the clock of every test application stands unless the test sets it. */
export const testNow = fromIso('2027-04-29T12:05:00.000Z');

const baseUrl = 'http://localhost:4999';
const sessionSecret = 'a secret that only the tests know, at length';
export const testTrailKey = 'a key of the trail that only the tests know';

/** The application on a database of its own, with a stopped clock and a mailer that keeps letters. */
export interface TestApp extends Pick<App, 'ctx'> {
  readonly database: TestDatabase;
  readonly clock: ReturnType<typeof stoppedClock>;
  readonly mails: OutgoingMail[];
  /** What the mail server does with the next letters; by default it takes them. */
  answerMail: (mail: OutgoingMail) => Promise<string>;
  /** Requests as a person, or as nobody; the Origin of the site's own pages is set. */
  as(personId: PersonId | null): Promise<Requests>;
  close(): Promise<void>;
}

export interface Requests {
  get(path: string): Test;
  post(path: string, body?: object): Test;
  put(path: string, body: object): Test;
}

export async function startTestApp(): Promise<TestApp> {
  const database = await cloneDatabase();
  const clock = stoppedClock(testNow);
  const mails: OutgoingMail[] = [];
  const mailer: Mailer = {
    send: (mail) => testApp.answerMail(mail),
    close: () => undefined,
  };
  const settings: Settings = {
    isProduction: false,
    host: '127.0.0.1',
    port: 0,
    baseUrl,
    databaseUrl: database.appUrl,
    oidc: { issuer: 'http://127.0.0.1:9', clientId: 'tests', clientSecret: 'tests' },
    mail: {
      smtpUrl: 'smtp://127.0.0.1:9',
      from: { name: 'Tests', address: 'tests@example.org' },
      replyTo: 'tests@example.org',
    },
    sessionSecret,
    trailKey: testTrailKey,
    group: { name: 'Skerrow Bay Shore Group', zone: 'Europe/London' },
    trustProxy: 'loopback',
    isDemo: false,
    logLevel: 'silent',
  };
  const app = await startApp(settings, {
    clock,
    mailer,
    log: pino({ level: 'silent' }),
    frontendFolder: null,
  });
  const address = `http://127.0.0.1:${app.port}`;
  const testApp: TestApp = {
    ctx: app.ctx,
    database,
    clock,
    mails,
    answerMail: (mail) => {
      mails.push(mail);
      return Promise.resolve('250 kept');
    },
    async as(personId) {
      const cookie = personId === null ? null : await signIn(app, clock.now(), personId);
      const prepared = (test: Test): Test =>
        (cookie === null ? test : test.set('Cookie', cookie)).set('Origin', baseUrl);
      return {
        get: (path) => prepared(supertest(address).get(path)),
        post: (path, body = {}) => prepared(supertest(address).post(path)).send(body),
        put: (path, body) => prepared(supertest(address).put(path)).send(body),
      };
    },
    async close() {
      await app.stop();
      await database.drop();
    },
  };
  return testApp;
}

/** A sign-in as the front door keeps it, and the cookie that names it. */
async function signIn(app: App, now: number, personId: PersonId): Promise<string> {
  const sid = randomUUID();
  const sess = {
    cookie: { originalMaxAge: 86_400_000, httpOnly: true, path: '/', sameSite: 'lax' },
    signedIn: { personId, idToken: 'none', signedInAt: now, seenAt: now },
  };
  await app.ctx.inTransaction((tx) =>
    tx.query(
      `INSERT INTO sign_in_session (sid, sess, expire) VALUES ($1, $2, now() + interval '1 day')`,
      [sid, JSON.stringify(sess)],
    ),
  );
  const signature = createHmac('sha256', sessionSecret).update(sid).digest('base64');
  return `ebbfolk.sign-in=${encodeURIComponent(`s:${sid}.${signature.replace(/=+$/, '')}`)}`;
}
