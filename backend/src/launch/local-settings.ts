import { join } from 'node:path';
import type { Ports } from './ports.ts';
import type { Secrets } from './secrets.ts';

/** Which parts of the outside world a start makes itself, since the environment names none. */
interface OwnParts {
  readonly postgres: boolean;
  readonly signIn: boolean;
  readonly mail: boolean;
}

/** Everything that a start on one computer decides before it starts anything. */
export interface LocalSettings {
  readonly own: OwnParts;
  /** The settings of the application, all but the addresses of a database of its own. */
  readonly env: Readonly<Record<string, string | undefined>>;
  readonly signInPort: number;
  readonly smtpPort: number;
  readonly mailWebPort: number;
}

const groupName = 'Skerrow Bay Shore Group';
const clientId = 'ebbfolk';

/**
 * The settings for this computer: those of the environment first, then what a start makes
 * itself. In production nothing is made up, so what is missing there stays missing.
 */
export async function localSettings(
  given: NodeJS.ProcessEnv,
  ports: Ports,
  secrets: Secrets,
): Promise<LocalSettings> {
  const isProduction = given['NODE_ENV'] === 'production';
  const isMissing = (name: string): boolean => !isProduction && !given[name];
  const own = {
    postgres: isMissing('DATABASE_URL'),
    signIn: isMissing('OIDC_ISSUER'),
    mail: isMissing('SMTP_URL'),
  };
  const signInPort = own.signIn ? await ports.keep('signIn') : 0;
  const smtpPort = own.mail ? await ports.choose('smtp') : 0;
  const mailWebPort = own.mail ? await ports.choose('mailWeb') : 0;
  const chosen = Object.fromEntries(Object.entries(given).filter(([, value]) => value !== ''));
  if (isProduction) return { own, env: chosen, signInPort, smtpPort, mailWebPort };
  const port = chosen['PORT'] ?? String(await ports.choose('page'));
  return {
    own,
    signInPort,
    smtpPort,
    mailWebPort,
    env: {
      NODE_ENV: 'development',
      PORT: port,
      BASE_URL: `http://localhost:${port}`,
      MAIL_FROM: `${groupName} <rota@skerrow-bay.example.org>`,
      SESSION_SECRET: secrets.sessionSecret,
      TRAIL_KEY: secrets.trailKey,
      GROUP_NAME: groupName,
      GROUP_ZONE: 'Europe/London',
      ...(own.postgres ? { DEMO: '1' } : {}),
      ...(own.signIn
        ? {
            OIDC_ISSUER: `http://127.0.0.1:${signInPort}`,
            OIDC_CLIENT_ID: clientId,
            OIDC_CLIENT_SECRET: secrets.oidcClientSecret,
          }
        : {}),
      ...(own.mail ? { SMTP_URL: `smtp://127.0.0.1:${smtpPort}` } : {}),
      ...chosen,
    },
  };
}

/** What the stand-in for sign-in needs, matching what the application is told. */
export function signInEnv(local: LocalSettings, secrets: Secrets): Record<string, string> {
  const baseUrl = local.env['BASE_URL'] ?? '';
  return {
    DEV_IDP_PORT: String(local.signInPort),
    DEV_IDP_CLIENT_ID: local.env['OIDC_CLIENT_ID'] ?? '',
    DEV_IDP_CLIENT_SECRET: local.env['OIDC_CLIENT_SECRET'] ?? '',
    DEV_IDP_REDIRECT_URIS: `${baseUrl}/auth/callback`,
    DEV_IDP_POST_LOGOUT_URIS: `${baseUrl}/sign-in`,
    DEV_IDP_SIGNING_KEY: JSON.stringify(secrets.signInSigningKey),
    DEV_IDP_COOKIE_KEY: secrets.signInCookieKey,
  };
}

/** Where caught letters are kept. */
export function mailFolder(folder: string): string {
  return join(folder, 'mail');
}

/** What the mail catcher needs; letters of earlier starts stay in the data folder. */
export function mailCatcherEnv(local: LocalSettings, folder: string): Record<string, string> {
  return {
    MAIL_CATCHER_SMTP_PORT: String(local.smtpPort),
    MAIL_CATCHER_WEB_PORT: String(local.mailWebPort),
    MAIL_CATCHER_FOLDER: mailFolder(folder),
  };
}
