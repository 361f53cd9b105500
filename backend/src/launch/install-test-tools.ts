import { existsSync } from 'node:fs';
import { installDebianPackages } from './debian.ts';
import { findOrInstallPostgres } from './find-postgres.ts';
import { runCommand } from './say.ts';

const chromium = '/usr/bin/chromium';

// What the tests need beside the packages: PostgreSQL, and a browser for the journeys.
await runCommand(() => {
  findOrInstallPostgres();
  if (!existsSync(chromium)) installDebianPackages(['chromium'], 'Chromium');
});
