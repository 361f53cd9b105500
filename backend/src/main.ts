import { join } from 'node:path';
import { startApp } from './app.ts';
import type { App } from './app.ts';
import { systemClock } from './platform/clock/clock.ts';
import { seedDemo } from './seeds/seed-demo.ts';
import { readSettings, WrongSettings } from './settings.ts';

const frontendFolder = join(import.meta.dirname, '..', '..', 'frontend', 'dist');

try {
  const settings = readSettings(process.env);
  const app = await startApp(settings, { clock: systemClock, frontendFolder });
  if (settings.isDemo) await seedDemo(app.ctx);
  stopWhenTold(app);
  process.send?.({ ready: true, port: app.port });
} catch (error) {
  process.stderr.write(
    `${error instanceof WrongSettings ? error.message : String((error as Error).stack)}\n`,
  );
  process.exit(1);
}

/** Ends in order on a signal, or when the start command that began this process is gone. */
function stopWhenTold(app: App): void {
  let isStopping = false;
  const stop = (): void => {
    if (isStopping) return;
    isStopping = true;
    app.stop().then(
      () => process.exit(0),
      (error: unknown) => {
        process.stderr.write(`${String(error)}\n`);
        process.exit(1);
      },
    );
  };
  process.once('SIGTERM', stop);
  process.once('SIGINT', stop);
  if (process.connected) process.once('disconnect', stop);
}
