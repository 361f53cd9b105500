import { readSettings } from '#backend/settings.ts';
import { demoPeople } from '#shared/demo/demo-people.ts';
import {
  startApp,
  startEditedPages,
  startMailCatcher,
  startSignIn,
  startWatchedApp,
} from './app-parts.ts';
import { buildFrontend } from './build-frontend.ts';
import { dataFolder } from './data-folder.ts';
import { Launch } from './launch.ts';
import { localSettings } from './local-settings.ts';
import type { LocalSettings } from './local-settings.ts';
import { appUser } from './make-database.ts';
import { keptPorts } from './ports.ts';
import type { Ports } from './ports.ts';
import { takePlace, whoIsRunning } from './running.ts';
import type { Place } from './running.ts';
import { CannotStart, runCommand, say } from './say.ts';
import { keptSecrets } from './secrets.ts';
import type { Secrets } from './secrets.ts';

/** What all steps of one start share. */
interface Start {
  readonly launch: Launch;
  readonly folder: string;
  readonly ports: Ports;
  readonly secrets: Secrets;
  readonly local: LocalSettings;
  readonly isWatching: boolean;
}

// The one start command: brings up everything that Ebbfolk needs, and stays until it is told to
// stop or until a part of it ends.
await runCommand(async () => {
  const folder = dataFolder();
  const place = takePlace(folder);
  if (place === null) {
    const address = whoIsRunning(folder)?.address ?? null;
    say(
      address === null
        ? 'Ebbfolk is being started already.'
        : `Ebbfolk is already running at ${address}`,
    );
    return;
  }
  const launch = new Launch();
  const told = signalled();
  const launching = bringUp(launch, folder, place);
  try {
    const why = await Promise.race([
      told,
      launch.trouble,
      // Once everything is up, only the two above can end the wait.
      launching.then(() => Promise.race([told, launch.trouble])),
    ]);
    if (why !== null) throw new CannotStart(why);
    say('Stopping.');
  } finally {
    await launch.stop();
    await Promise.allSettled([launching]);
    await launch.stop();
    place.leave();
  }
});

async function bringUp(launch: Launch, folder: string, place: Place): Promise<void> {
  const isWatching = process.argv.includes('--watch');
  const ports = keptPorts(folder);
  const secrets = keptSecrets(folder);
  const local = await localSettings(process.env, ports, secrets);
  const start = { launch, folder, ports, secrets, local, isWatching };
  // Wrong settings are told before anything is started; where a database of its own will
  // listen is not known yet.
  const { baseUrl, isDemo } = readSettings({
    ...(local.own.postgres ? { DATABASE_URL: `postgres://${appUser}@127.0.0.1/ebbfolk` } : {}),
    ...local.env,
  });
  const [, , , databaseUrl] = await Promise.all([
    local.own.mail ? startMailCatcher(launch, folder, local) : null,
    local.own.signIn ? startSignIn(launch, folder, local, secrets) : null,
    isWatching ? null : buildFrontend(launch.stopping.signal),
    readyDatabase(start),
  ]);
  say('Starting the application.');
  await startPages(start, { ...local.env, DATABASE_URL: databaseUrl });
  place.tellAddress(baseUrl);
  process.stdout.write(welcome(baseUrl, local, isDemo));
}

/** Brings the database up to date, and answers where the application finds it. */
async function readyDatabase({ launch, folder, ports, secrets, local }: Start): Promise<string> {
  // What migrates takes a second to load, which the other parts need not wait for.
  const ready = await import('./ready-database.ts');
  if (!local.own.postgres) return ready.readyGivenDatabase(local.env);
  return ready.readyOwnDatabase(
    await ready.startOwnCluster(launch, folder, ports, secrets),
    secrets,
  );
}

/** Starts the application; while its files are edited, behind a server for the pages. */
async function startPages(start: Start, env: LocalSettings['env']): Promise<void> {
  const { launch, folder, ports, isWatching } = start;
  if (!isWatching) {
    await startApp(launch, folder, env);
    return;
  }
  const appPort = String(await ports.choose('appBehindPage'));
  await startWatchedApp(launch, folder, { ...env, PORT: appPort });
  await startEditedPages(launch, folder, {
    PAGES_PORT: env['PORT'] ?? '',
    EBBFOLK_APP: `http://127.0.0.1:${appPort}`,
  });
}

function welcome(baseUrl: string, { own, mailWebPort }: LocalSettings, isDemo: boolean): string {
  const addresses = [
    [baseUrl, 'Ebbfolk'],
    ...(own.mail ? [[`http://localhost:${mailWebPort}`, 'every letter that it sends']] : []),
  ];
  const people = demoPeople.map(({ name, roles }) => [
    name,
    roles.filter((role) => role !== 'volunteer').join(', ') || 'volunteer',
  ]);
  return [
    '',
    'Ebbfolk is ready.',
    '',
    ...columns(addresses),
    ...(own.signIn && isDemo
      ? ['', 'Sign in, without a password, as', '', ...columns(people)]
      : []),
    '',
    'Stop with Ctrl-C.',
    '',
  ].join('\n');
}

function columns(rows: readonly (readonly string[])[]): string[] {
  const width = Math.max(...rows.map(([first = '']) => first.length));
  return rows.map(([first = '', second = '']) => `  ${first.padEnd(width)}  ${second}`);
}

/**
 * Resolves when somebody tells this process to stop, or when the program that began it with a
 * channel is gone; telling it twice changes nothing.
 */
function signalled(): Promise<null> {
  return new Promise((resolve) => {
    for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP'] as const) {
      process.on(signal, () => resolve(null));
    }
    process.once('disconnect', () => resolve(null));
    // The channel alone must not keep this process.
    process.channel?.unref();
  });
}
