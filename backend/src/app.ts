import { randomUUID } from 'node:crypto';
import type { Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { pino } from 'pino';
import type { Logger } from 'pino';
import type { AppContext } from './app-context.ts';
import { applicationDataSource } from './database/data-source.ts';
import { transactionsOf } from './database/transaction.ts';
import { couldChangeTrail } from './database/trail-rights.ts';
import { readActor } from './features/account/account.reader.ts';
import { postLetter } from './features/mail/post-letter.ts';
import { trailRecorder } from './features/trail/record-trail.ts';
import { signInSessions } from './http/sign-in.ts';
import { web } from './http/web.ts';
import { jobs } from './jobs.ts';
import type { Clock } from './platform/clock/clock.ts';
import { startJobQueue } from './platform/jobs/job-queue.ts';
import { smtpMailer } from './platform/mail/mailer.ts';
import type { Mailer } from './platform/mail/mailer.ts';
import { openIdProvider } from './platform/sign-in/identity-provider.ts';
import { tideStations } from './platform/tides/tide-stations.ts';
import { tidesOf } from './platform/tides/tides.ts';
import { routes } from './routes.ts';
import type { Settings } from './settings.ts';

/** The application, running. */
export interface App {
  readonly ctx: AppContext;
  readonly port: number;
  /** Takes no new requests, lets the work in hand finish, and closes every connection. */
  stop(): Promise<void>;
}

/** What tests put in the place of the outside world. */
export interface Outside {
  readonly clock: Clock;
  readonly mailer?: Mailer;
  readonly log?: Logger;
  /** The built front end; null: none is served. */
  readonly frontendFolder: string | null;
}

/** Builds the context and starts the web and the worker. */
export async function startApp(settings: Settings, outside: Outside): Promise<App> {
  const log = outside.log ?? pino({ level: settings.logLevel });
  const { clock } = outside;
  const dataSource = await applicationDataSource(settings.databaseUrl).initialize();
  if (await couldChangeTrail(dataSource)) {
    await dataSource.destroy();
    throw new Error(
      'The database user of the application may change the trail. Give it only SELECT and INSERT there.',
    );
  }
  const queue = await startJobQueue(settings.databaseUrl, log);
  const mailer = outside.mailer ?? smtpMailer(settings.mail);
  const ctx: AppContext = {
    ...transactionsOf(dataSource),
    clock,
    tides: tidesOf(tideStations(), clock),
    mailer,
    group: { ...settings.group, baseUrl: settings.baseUrl },
    newId: <Id extends string>() => randomUUID() as string as Id,
    enqueue: (tx, job, payload) => queue.enqueue(tx, job, payload),
    postLetter: (tx, letter) => postLetter(ctx, tx, letter),
    recordTrail: trailRecorder(settings.trailKey, clock),
  };
  const provider = openIdProvider({
    ...settings.oidc,
    callbackUrl: `${settings.baseUrl}/auth/callback`,
  });
  const sessions = signInSessions({
    databaseUrl: settings.databaseUrl,
    secret: settings.sessionSecret,
    isSecure: settings.baseUrl.startsWith('https:'),
  });
  const server = web({
    routes: routes(ctx, provider, log),
    baseUrl: settings.baseUrl,
    trustProxy: settings.trustProxy,
    frontendFolder: outside.frontendFolder,
    sessions: sessions.middleware,
    now: () => clock.now(),
    findActor: (personId) => ctx.reading((read) => readActor(read, personId)),
    log,
  }).listen(settings.port, settings.host);
  const port = await listening(server);
  await queue.work(jobs(ctx), settings.group.zone);
  return {
    ctx,
    port,
    async stop() {
      await closed(server);
      await queue.stop();
      mailer.close();
      await sessions.close();
      await dataSource.destroy();
    },
  };
}

function listening(server: Server): Promise<number> {
  return new Promise((resolve, reject) => {
    server.once('error', reject);
    server.once('listening', () => resolve((server.address() as AddressInfo).port));
  });
}

function closed(server: Server): Promise<void> {
  return new Promise((resolve, reject) => {
    server.close((error) => (error === undefined ? resolve() : reject(error)));
    server.closeIdleConnections();
    setTimeout(() => server.closeAllConnections(), 1_000).unref();
  });
}
