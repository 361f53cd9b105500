import { mkdirSync } from 'node:fs';
import { join } from 'node:path';
import type { Launch } from './launch.ts';
import { mailCatcherEnv, mailFolder, signInEnv } from './local-settings.ts';
import type { LocalSettings } from './local-settings.ts';
import { startPart } from './part.ts';
import type { Secrets } from './secrets.ts';

// Together with PostgreSQL's own, they add up to less than four seconds.
const appGraceMs = 2_000;
const othersGraceMs = 200;

/** Starts one part as part of the launch, and waits until it is ready. */
async function start(
  launch: Launch,
  folder: string,
  wish: {
    readonly name: string;
    readonly file: string;
    readonly log: string | null;
    readonly graceMs: number;
    readonly env: Readonly<Record<string, string | undefined>>;
  },
): Promise<void> {
  const part = startPart({
    ...wish,
    logFile: wish.log === null ? null : join(folder, 'log', wish.log),
  });
  await launch.add(part);
  await part.untilReady();
}

/** Catches every letter and shows it on a page; sends none on. */
export function startMailCatcher(launch: Launch, folder: string, local: LocalSettings) {
  mkdirSync(mailFolder(folder), { recursive: true, mode: 0o700 });
  return start(launch, folder, {
    name: 'The mail catcher',
    file: 'backend/src/launch/run-mail-catcher.ts',
    log: 'mail-catcher.log',
    graceMs: othersGraceMs,
    env: mailCatcherEnv(local, folder),
  });
}

/** The stand-in for the group's sign-in provider. */
export function startSignIn(
  launch: Launch,
  folder: string,
  local: LocalSettings,
  secrets: Secrets,
) {
  return start(launch, folder, {
    name: 'The sign-in stand-in',
    file: 'dev-idp/main.ts',
    log: 'sign-in.log',
    graceMs: othersGraceMs,
    env: signInEnv(local, secrets),
  });
}

/** The application with its built pages; its lines go to a log. */
export function startApp(launch: Launch, folder: string, env: LocalSettings['env']) {
  return start(launch, folder, {
    name: 'The application',
    file: 'backend/src/main.ts',
    log: 'application.log',
    graceMs: appGraceMs,
    env,
  });
}

/** The application, begun anew whenever one of its files changes; its lines go to the terminal. */
export function startWatchedApp(launch: Launch, folder: string, env: LocalSettings['env']) {
  return start(launch, folder, {
    name: 'The application',
    file: 'backend/src/launch/run-watched-app.ts',
    log: null,
    graceMs: appGraceMs,
    env,
  });
}

/** The pages as they are edited, in front of the application. */
export function startEditedPages(
  launch: Launch,
  folder: string,
  env: { readonly PAGES_PORT: string; readonly EBBFOLK_APP: string },
) {
  return start(launch, folder, {
    name: 'The page server',
    file: 'backend/src/launch/run-pages.ts',
    log: null,
    graceMs: othersGraceMs,
    env,
  });
}
