import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { MailDev } from 'maildev';
import { pino } from 'pino';
import { startApp } from '#backend/app.ts';
import { anyFreePort } from '#backend/launch/ports.ts';
import { systemClock } from '#backend/platform/clock/clock.ts';
import { seedDemo } from '#backend/seeds/seed-demo.ts';
import { startDevIdp } from '#dev-idp/provider.ts';
import { cloneDatabase } from './test-database.ts';

const clientId = 'ebbfolk-tests';
const clientSecret = 'the secret between the tests and their provider';

/** The whole of Ebbfolk with its demo, its stand-in provider and its mail catcher. */
export interface WholeSystem {
  readonly baseUrl: string;
  /** The stand-in provider, to tell its pages from ours. */
  readonly issuer: string;
  /** Subjects of the letters that the mail catcher holds for an address. */
  lettersTo(address: string): Promise<readonly string[]>;
  close(): Promise<void>;
}

export async function startWholeSystem(): Promise<WholeSystem> {
  const database = await cloneDatabase();
  const mailFolder = mkdtempSync(join(tmpdir(), 'ebbfolk-mail-'));
  const [port, smtpPort, mailPort] = [
    await anyFreePort(),
    await anyFreePort(),
    await anyFreePort(),
  ];
  const baseUrl = `http://localhost:${port}`;
  const catcher = new MailDev({
    smtp: smtpPort,
    web: mailPort,
    ip: '127.0.0.1',
    webIp: '127.0.0.1',
    mailDirectory: mailFolder,
    silent: true,
  });
  await catcher.start();
  const idp = await startDevIdp({
    port: 0,
    clientId,
    clientSecret,
    redirectUris: [`${baseUrl}/auth/callback`],
    postLogoutUris: [`${baseUrl}/sign-in`],
  });
  const app = await startApp(
    {
      isProduction: false,
      host: '127.0.0.1',
      port,
      baseUrl,
      databaseUrl: database.appUrl,
      oidc: { issuer: idp.issuer, clientId, clientSecret },
      mail: {
        smtpUrl: `smtp://127.0.0.1:${smtpPort}`,
        from: { name: 'Skerrow Bay Shore Group', address: 'notices@example.org' },
        replyTo: 'coordinators@example.org',
      },
      sessionSecret: 'a secret that only these journeys know, at length',
      trailKey: 'a key of the trail that only these journeys know',
      group: { name: 'Skerrow Bay Shore Group', zone: 'Europe/London' },
      trustProxy: 'loopback',
      isDemo: true,
      logLevel: 'silent',
    },
    {
      clock: systemClock,
      log: pino({ level: 'silent' }),
      frontendFolder: join(import.meta.dirname, '..', '..', 'frontend', 'dist'),
    },
  );
  await seedDemo(app.ctx);
  return {
    baseUrl,
    issuer: idp.issuer,
    async lettersTo(address) {
      const reply = await fetch(`http://127.0.0.1:${mailPort}/api/email`);
      const held = (await reply.json()) as { subject: string; to: { address: string }[] }[];
      return held
        .filter(({ to }) => to.some((one) => one.address === address))
        .map(({ subject }) => subject);
    },
    async close() {
      await app.stop();
      await idp.close();
      await catcher.stop();
      await database.drop();
      rmSync(mailFolder, { recursive: true });
    },
  };
}
