import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { trailMac } from '#backend/features/trail/record-trail.ts';
import { trailLineText, trailStart } from '#shared/domain/trail/trail-line.ts';
import type { TrailLine } from '#shared/domain/trail/trail-line.ts';
import { startTestApp, testTrailKey } from '../support/test-app.ts';
import type { TestApp } from '../support/test-app.ts';

let app: TestApp;

beforeAll(async () => {
  app = await startTestApp();
});
afterAll(async () => {
  await app.close();
});

function record(note: string): Promise<void> {
  return app.ctx.inTransaction((tx) =>
    app.ctx.recordTrail(
      tx,
      ...['first', 'second'].map((which) => ({
        actorId: null,
        action: 'test.noted',
        recordKind: 'test',
        recordId: '00000000-0000-4000-8000-000000000001',
        details: { note, which, count: 2, isTrue: true, nothing: null },
      })),
    ),
  );
}

async function lines(): Promise<(TrailLine & { readonly mac: string })[]> {
  return app.ctx.reading((read) =>
    read.query(
      `SELECT seq::int, epoch_ms(at)::float8 AS at, actor_id AS "actorId", action,
              record_kind AS "recordKind", record_id AS "recordId", details, mac
         FROM trail ORDER BY seq`,
    ),
  );
}

describe('the trail', () => {
  it('numbers without gaps and chains every line, written by twenty at once, some rolled back', async () => {
    await Promise.all(
      Array.from({ length: 20 }, (_unused, index) =>
        index % 5 === 0
          ? app.ctx
              .inTransaction(async (tx) => {
                await app.ctx.recordTrail(tx, {
                  actorId: null,
                  action: 'test.lost',
                  recordKind: 'test',
                  recordId: '00000000-0000-4000-8000-000000000002',
                  details: {},
                });
                throw new Error('rolled back on purpose');
              })
              .catch((error: unknown) => {
                expect(String(error)).toContain('rolled back on purpose');
              })
          : record(`note ${index}`),
      ),
    );
    const written = await lines();
    expect(written.map(({ seq }) => seq)).toEqual(
      Array.from({ length: 32 }, (_unused, index) => index + 1),
    );
    let previous = trailStart;
    for (const { mac, ...line } of written) {
      expect(trailMac(testTrailKey, trailLineText(previous, line))).toBe(mac);
      previous = mac;
    }
  });

  it('is refused to an application user that could change it', async () => {
    const { startApp } = await import('#backend/app.ts');
    const { systemClock } = await import('#backend/platform/clock/clock.ts');
    const start = startApp(
      {
        isProduction: false,
        host: '127.0.0.1',
        port: 0,
        baseUrl: 'http://localhost:4998',
        databaseUrl: app.database.ownerUrl,
        oidc: { issuer: 'http://127.0.0.1:9', clientId: 'tests', clientSecret: 'tests' },
        mail: {
          smtpUrl: 'smtp://127.0.0.1:9',
          from: { name: 'Tests', address: 'tests@example.org' },
          replyTo: 'tests@example.org',
        },
        sessionSecret: 'a secret that only the tests know, at length',
        trailKey: testTrailKey,
        group: { name: 'Skerrow Bay Shore Group', zone: 'Europe/London' },
        trustProxy: 'loopback',
        isDemo: false,
        logLevel: 'silent',
      },
      { clock: systemClock, frontendFolder: null },
    );
    await expect(start).rejects.toThrow('may change the trail');
  });
});
