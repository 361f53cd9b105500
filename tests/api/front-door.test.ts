import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import supertest from 'supertest';
import { pino } from 'pino';
import { routes } from '#backend/routes.ts';
import type { Route } from '#backend/http/route.ts';
import { web } from '#backend/http/web.ts';
import { seeAccount, seeFrontDoor } from '#shared/contracts/account.ts';
import { problem } from '#shared/contracts/problem.ts';
import type { PersonId } from '#shared/kernel/ids.ts';
import type { Role } from '#shared/policy/policy.ts';
import { may, policy } from '#shared/policy/policy.ts';
import { given } from '../support/given.ts';
import { startTestApp, testNow } from '../support/test-app.ts';
import type { TestApp } from '../support/test-app.ts';

const hourMs = 3_600_000;
const dayMs = 24 * hourMs;

let app: TestApp;
let make: ReturnType<typeof given>;
let every: Route[];
const people = new Map<Role, PersonId>();

const noProvider = {
  begin: () => Promise.reject(new Error('not asked in these tests')),
  finish: () => Promise.reject(new Error('not asked in these tests')),
  endSession: () => Promise.resolve(null),
};

beforeAll(async () => {
  app = await startTestApp();
  make = given(app.ctx);
  every = routes(app.ctx, noProvider, pino({ level: 'silent' }));
  people.set('volunteer', await make.person());
  for (const role of ['coordinator', 'trainer', 'administrator'] as const) {
    people.set(role, await make.person({ roles: [role] }));
  }
});
afterAll(async () => {
  await app.close();
});

/** A path of the route with ids that name nothing. */
function pathOf(route: Route): string {
  return route.contract.path.replaceAll(/:\w+/g, '00000000-0000-4000-8000-000000000000');
}

async function ask(route: Route, role: Role | null): Promise<supertest.Response> {
  const requests = await app.as(role === null ? null : (people.get(role) ?? null));
  switch (route.contract.method) {
    case 'get':
      return requests.get(pathOf(route));
    case 'post':
      return requests.post(pathOf(route));
    case 'put':
      return requests.put(pathOf(route), {});
    default:
      throw new Error(`No test asks by ${route.contract.method} yet`);
  }
}

describe('every route', () => {
  it('asks for sign-in, refuses or lets through, as the policy says, for every role and nobody', async () => {
    const found: string[] = [];
    const wanted: string[] = [];
    for (const route of every) {
      for (const role of [null, ...people.keys()]) {
        const { status } = await ask(route, role);
        const name = `${route.contract.method} ${route.contract.path} as ${role ?? 'nobody'}`;
        const barred = status === 401 || status === 403 ? String(status) : 'let through';
        found.push(`${name}: ${barred}`);
        const roles = role === null ? null : (['volunteer', role] as Role[]);
        const bar = may(roles, route.action) ? 'let through' : role === null ? '401' : '403';
        wanted.push(`${name}: ${bar}`);
        expect(status, name).not.toBe(500);
      }
    }
    expect(found).toEqual(wanted);
    expect(every.length).toBeGreaterThan(8);
  });

  it('has an action of its own in the policy, and no action of the policy is left over', () => {
    const used = new Set(every.map(({ action }) => action));
    const asked = new Set(['session.see-drafts']);
    expect(Object.keys(policy).filter((one) => !used.has(one as never) && !asked.has(one))).toEqual(
      [],
    );
  });

  it('stands in /api/openapi.json with its method, path and answers', async () => {
    const reply = await (await app.as(null)).get('/api/openapi.json');
    expect(reply.status).toBe(200);
    const described = reply.body as {
      openapi: string;
      paths: Record<string, Record<string, object>>;
    };
    expect(described.openapi).toBe('3.1.0');
    const listed = Object.entries(described.paths).flatMap(([path, methods]) =>
      Object.keys(methods).map((method) => `${method} ${path}`),
    );
    const mounted = every.map(
      ({ contract }) => `${contract.method} ${contract.path.replaceAll(/:(\w+)/g, '{$1}')}`,
    );
    expect(listed.sort()).toEqual(mounted.sort());
  });

  it('refuses a change that comes from another site, and one that is not JSON', async () => {
    const address = (await app.as(people.get('volunteer') ?? null)).post(
      '/api/account/sign-out',
    ).url;
    const elsewhere = await supertest(address)
      .post('')
      .set('Origin', 'https://elsewhere.example.org')
      .send({});
    expect(problem.parse(elsewhere.body)).toMatchObject({ status: 403, code: 'wrong-origin' });
    const without = await supertest(address).post('').send({});
    expect(problem.parse(without.body).code).toBe('wrong-origin');
    const form = await supertest(address)
      .post('')
      .set('Origin', 'http://localhost:4999')
      .type('form')
      .send('a=b');
    expect(problem.parse(form.body)).toMatchObject({ status: 415, code: 'not-json' });
  });

  it('answers with a problem where there is nothing, where JSON is broken and where a query is wrong', async () => {
    const requests = await app.as(people.get('volunteer') ?? null);
    expect(problem.parse((await requests.get('/api/tides')).body)).toMatchObject({ status: 404 });
    const broken = await requests
      .post('/api/account/sign-out')
      .type('json')
      .send('{"half":' as never);
    expect(problem.parse(broken.body)).toMatchObject({ status: 400, code: 'not-understood' });
    const span = await requests.get('/api/calendar?from=2027-02-29&to=2027-03-01');
    expect(problem.parse(span.body).fields).toMatchObject([{ where: 'query', field: 'from' }]);
    const long = await requests.get('/api/calendar?from=2027-01-01&to=2027-12-31');
    expect(problem.parse(long.body).fields).toMatchObject([{ field: 'to' }]);
  });

  it('keeps a bug to itself: 500 and an id, nothing of its words', async () => {
    const broken: Route = {
      ...(every[0] as Route),
      handle: () => Promise.reject(new Error('secret words of a bug')),
    };
    const front = web({
      routes: [broken],
      baseUrl: 'http://localhost:4999',
      trustProxy: 'loopback',
      frontendFolder: null,
      sessions: (request, _response, next) => {
        request.session = {} as never;
        next();
      },
      now: () => testNow,
      findActor: () => Promise.resolve(null),
      log: pino({ level: 'silent' }),
    });
    const reply = await supertest(front).get(broken.contract.path);
    expect(reply.status).toBe(500);
    expect(reply.text).not.toContain('secret words');
    expect(problem.parse(reply.body)).toMatchObject({
      code: 'unexpected',
      title: 'Something went wrong on our side',
    });
    expect(reply.body).toHaveProperty('instance');
  });

  it('sends the headers that keep a page to itself', async () => {
    const { headers } = await (await app.as(null)).get('/api/health');
    expect(headers['content-security-policy']).toContain("default-src 'self'");
    expect(headers['content-security-policy']).toContain("frame-ancestors 'none'");
    expect(headers['x-content-type-options']).toBe('nosniff');
    expect(headers['cache-control']).toBe('no-store');
    expect(headers).not.toHaveProperty('x-powered-by');
  });
});

describe('a sign-in', () => {
  it.each([
    ['volunteer', 14 * dayMs - 1, 200],
    ['volunteer', 14 * dayMs, 401],
    ['coordinator', hourMs - 1, 200],
    ['coordinator', hourMs, 401],
    ['administrator', hourMs, 401],
    ['trainer', hourMs, 401],
  ] as const)('of a %s that rests for %d ms answers %d', async (role, restMs, status) => {
    const requests = await app.as(people.get(role) ?? null);
    app.clock.setTo(testNow + restMs);
    try {
      const reply = await requests.get('/api/calendar?from=2027-05-01&to=2027-05-02');
      expect(reply.status).toBe(status);
    } finally {
      app.clock.setTo(testNow);
    }
  });

  it.each([
    ['volunteer', 30 * dayMs, 5 * dayMs],
    ['coordinator', 12 * hourMs, 0.4 * hourMs],
  ] as const)('of a %s ends after %d ms in all, however busy', async (role, wholeMs, stepMs) => {
    const requests = await app.as(people.get(role) ?? null);
    const path = '/api/calendar?from=2027-05-01&to=2027-05-02';
    try {
      for (let passedMs = 0; passedMs < wholeMs; passedMs += stepMs) {
        app.clock.setTo(testNow + passedMs);
        expect((await requests.get(path)).status).toBe(200);
      }
      app.clock.setTo(testNow + wholeMs);
      expect((await requests.get(path)).status).toBe(401);
    } finally {
      app.clock.setTo(testNow);
    }
  });

  it('ends at the next request when its person is paused', async () => {
    const personId = await make.person();
    const requests = await app.as(personId);
    expect(seeAccount.reply.parse((await requests.get('/api/account')).body).person?.id).toBe(
      personId,
    );
    await app.ctx.inTransaction(async (tx) => {
      await tx.query(`UPDATE person SET state = 'paused' WHERE id = $1`, [personId]);
      await app.ctx.recordTrail(tx, {
        actorId: null,
        action: 'person.paused',
        recordKind: 'person',
        recordId: personId,
        details: {},
      });
    });
    expect(seeAccount.reply.parse((await requests.get('/api/account')).body).person).toBeNull();
    expect((await requests.get('/api/calendar?from=2027-05-01&to=2027-05-02')).status).toBe(401);
  });

  it('with a cookie that nobody signed is no sign-in', async () => {
    const address = (await app.as(null)).get('/api/account').url;
    const reply = await supertest(address).get('').set('Cookie', 'ebbfolk.sign-in=s%3Aguess.guess');
    expect(seeAccount.reply.parse(reply.body).person).toBeNull();
  });
});

describe('before signing in', () => {
  it('shows the group, its shores and the next open session with its water', async () => {
    const shore = await make.shore('Gull Ledges');
    await make.session(shore, '2027-05-04', []);
    await make.session(shore, '2027-05-02', [], { state: 'draft' });
    const reply = await (await app.as(null)).get('/api/front-door');
    const seen = seeFrontDoor.reply.parse(reply.body);
    expect(seen.shoreNames).toEqual(['Gull Ledges']);
    expect(seen.nextSession).toMatchObject({
      shoreName: 'Gull Ledges',
      state: 'on',
      partyMeetsAt: '2027-05-04T07:02:00.000Z',
      offTheShoreBy: '2027-05-04T09:52:00.000Z',
    });
    expect(seen.fortnight?.curve).toHaveLength(14 * 48 + 1);
    expect(seen.fortnight?.source.attribution).toContain('CC BY 4.0');
  });
});
