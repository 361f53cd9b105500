import { describe, expect, it } from 'vitest';
import { readSettings, WrongSettings } from '#backend/settings.ts';

const here = {
  NODE_ENV: 'development',
  BASE_URL: 'http://localhost:3700',
  DATABASE_URL: 'postgres://app:pw@127.0.0.1:5432/ebbfolk',
  DATABASE_OWNER_URL: 'postgres://owner:pw@127.0.0.1:5432/ebbfolk',
  OIDC_ISSUER: 'http://127.0.0.1:3701',
  OIDC_CLIENT_ID: 'rota',
  OIDC_CLIENT_SECRET: 'dev',
  SMTP_URL: 'smtp://127.0.0.1:3703',
  MAIL_FROM: 'Skerrow Bay Shore Group <rota@skerrow-bay.example.org>',
  SESSION_SECRET: 's'.repeat(32),
  TRAIL_KEY: 'a'.repeat(32),
  GROUP_NAME: 'Skerrow Bay Shore Group',
  GROUP_ZONE: 'Europe/London',
};

const inProduction = {
  ...here,
  NODE_ENV: 'production',
  BASE_URL: 'https://rota.example.org',
  OIDC_ISSUER: 'https://sign-in.example.org',
  OIDC_CLIENT_SECRET: 'pR7vQm2xKz9LwTf4',
  SESSION_SECRET: '9f2c61d07ab84e35c1f0768d2b9e5a43',
  TRAIL_KEY: '7be0d94f1a6253c88e3f5b07d1c2496a',
};

function sentences(env: Readonly<Record<string, string | undefined>>): readonly string[] {
  try {
    readSettings(env);
    return [];
  } catch (error) {
    if (error instanceof WrongSettings) return error.sentences;
    throw error;
  }
}

describe('reading the settings', () => {
  it('takes what is given and fills in what may be left out', () => {
    expect(readSettings(here)).toEqual({
      isProduction: false,
      host: '127.0.0.1',
      port: 3700,
      baseUrl: 'http://localhost:3700',
      databaseUrl: here.DATABASE_URL,
      oidc: { issuer: here.OIDC_ISSUER, clientId: 'rota', clientSecret: 'dev' },
      mail: {
        smtpUrl: here.SMTP_URL,
        from: { name: 'Skerrow Bay Shore Group', address: 'rota@skerrow-bay.example.org' },
        replyTo: 'rota@skerrow-bay.example.org',
      },
      sessionSecret: here.SESSION_SECRET,
      trailKey: here.TRAIL_KEY,
      group: { name: 'Skerrow Bay Shore Group', zone: 'Europe/London' },
      trustProxy: 'loopback',
      isDemo: false,
      logLevel: 'info',
    });
  });

  it('takes a whole set for production', () => {
    expect(readSettings(inProduction).isProduction).toBe(true);
  });

  it('names every missing variable at once, and an empty one is missing', () => {
    const missing = sentences({ NODE_ENV: 'production', BASE_URL: '' });
    for (const name of [
      'BASE_URL',
      'DATABASE_URL',
      'OIDC_ISSUER',
      'OIDC_CLIENT_ID',
      'OIDC_CLIENT_SECRET',
      'SMTP_URL',
      'MAIL_FROM',
      'SESSION_SECRET',
      'TRAIL_KEY',
      'GROUP_NAME',
      'GROUP_ZONE',
    ]) {
      expect(missing.filter((sentence) => sentence.startsWith(`${name} is missing`))).toHaveLength(
        1,
      );
    }
    expect(missing).toHaveLength(11);
  });

  it.each([
    ['NODE_ENV', 'live'],
    ['PORT', '70000'],
    ['PORT', 'http'],
    ['BASE_URL', 'localhost:3700'],
    ['BASE_URL', 'http://localhost:3700/app'],
    ['DATABASE_URL', 'mysql://app@127.0.0.1/ebbfolk'],
    ['DATABASE_URL', 'postgres://127.0.0.1/ebbfolk'],
    ['DATABASE_OWNER_URL', 'owner'],
    ['OIDC_ISSUER', 'http://sign-in.example.org'],
    ['SMTP_URL', 'mail.example.org'],
    ['MAIL_FROM', 'Skerrow Bay <nobody>'],
    ['MAIL_REPLY_TO', 'nobody'],
    ['SESSION_SECRET', 's'.repeat(31)],
    ['TRAIL_KEY', 'a'.repeat(31)],
    ['TRAIL_KEY', 'not base64, though it is long enough'],
    ['GROUP_ZONE', 'Britain'],
    ['TRUST_PROXY', 'true'],
    ['TRUST_PROXY', '10.0.0.0/33'],
    ['DEMO', 'yes'],
    ['LOG_LEVEL', 'loud'],
  ])('refuses %s=%s in one sentence that names it', (name, value) => {
    const said = sentences({ ...here, [name]: value });
    expect(said).toHaveLength(1);
    expect(said[0]).toMatch(new RegExp(`^${name} .*\\.$`));
  });

  it.each([
    ['BASE_URL', 'http://rota.example.org'],
    ['OIDC_ISSUER', 'http://sign-in.example.org'],
    ['OIDC_ISSUER', 'https://localhost:3701'],
    ['OIDC_ISSUER', 'https://127.0.0.1:3701'],
    ['OIDC_ISSUER', 'https://[::1]:3701'],
    ['OIDC_CLIENT_SECRET', 'secret'],
    ['SESSION_SECRET', 'a'.repeat(64)],
    ['SESSION_SECRET', 'please-change-me-please-change-me-0'],
    ['TRAIL_KEY', '0'.repeat(64)],
    ['DEMO', '1'],
  ])('refuses %s=%s in production', (name, value) => {
    const said = sentences({ ...inProduction, [name]: value });
    expect(said).toHaveLength(1);
    expect(said[0]).toMatch(new RegExp(`^${name} `));
  });

  it('refuses to run the application as the owner of the database', () => {
    expect(sentences({ ...here, DATABASE_OWNER_URL: here.DATABASE_URL })).toHaveLength(1);
  });

  it('refuses one secret for two purposes', () => {
    expect(sentences({ ...here, SESSION_SECRET: here.TRAIL_KEY })).toHaveLength(1);
  });

  it('keeps secrets out of what it says', () => {
    const said = sentences({
      ...inProduction,
      SESSION_SECRET: 'short-and-dear',
      DATABASE_URL: 'pg',
    });
    expect(said.join(' ')).not.toContain('short-and-dear');
  });
});
