import { rmSync } from 'node:fs';
import { startApp, startMailCatcher } from './app-parts.ts';
import { dataFolder } from './data-folder.ts';
import { Launch } from './launch.ts';
import { localSettings, mailFolder } from './local-settings.ts';
import { dropOwnDatabase } from './own-database.ts';
import { keptPorts } from './ports.ts';
import { readyOwnDatabase, startOwnCluster } from './ready-database.ts';
import { takePlace, whoIsRunning } from './running.ts';
import { CannotStart, runCommand, say } from './say.ts';
import { keptSecrets } from './secrets.ts';

// Empties the database that the start command made, and fills it with the demo of today.
await runCommand(async () => {
  const folder = dataFolder();
  const place = takePlace(folder);
  if (place === null) {
    const where = whoIsRunning(folder)?.address ?? 'this folder';
    throw new CannotStart(`Ebbfolk is running at ${where}. Stop it first, then run this again.`);
  }
  const launch = new Launch();
  try {
    await resetDemo(launch, folder);
    say('The demo is as new. Start it with: npm start');
  } finally {
    await launch.stop();
    place.leave();
  }
});

async function resetDemo(launch: Launch, folder: string): Promise<void> {
  const ports = keptPorts(folder);
  const secrets = keptSecrets(folder);
  ports.forget('signIn');
  const local = await localSettings(process.env, ports, secrets);
  if (!local.own.postgres) {
    throw new CannotStart(
      'DATABASE_URL names a database that the start command did not make; it is left as it is.',
    );
  }
  const cluster = await startOwnCluster(launch, folder, ports, secrets);
  await dropOwnDatabase(cluster);
  rmSync(mailFolder(folder), { recursive: true, force: true });
  const appUrl = await readyOwnDatabase(cluster, secrets);
  if (local.own.mail) await startMailCatcher(launch, folder, local);
  await startApp(launch, folder, { ...local.env, DATABASE_URL: appUrl, DEMO: '1' });
}
