import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { problem } from '#shared/contracts/problem.ts';
import { slotView } from '#shared/contracts/slots.ts';
import { seeCalendar, seeSession } from '#shared/contracts/sessions.ts';
import type { CompetencyId, PersonId, ShoreId, SlotKindId } from '#shared/kernel/ids.ts';
import { fromIso } from '#shared/kernel/time.ts';
import { given } from '../support/given.ts';
import { startTestApp, testNow } from '../support/test-app.ts';
import type { TestApp } from '../support/test-app.ts';
import { eventually } from '../support/eventually.ts';

let app: TestApp;
let make: ReturnType<typeof given>;
let tideSafety: CompetencyId;
let firstAid: CompetencyId;
let leader: SlotKindId;
let guide: SlotKindId;
let gullLedges: ShoreId;
let kettleReef: ShoreId;

beforeAll(async () => {
  app = await startTestApp();
  make = given(app.ctx);
  tideSafety = await make.competency('Tide safety');
  firstAid = await make.competency('First aid outdoors');
  leader = await make.slotKind([tideSafety, firstAid], {
    name: 'Shore leader',
    isFor18AndOver: true,
  });
  guide = await make.slotKind([], { name: 'Pool guide' });
  gullLedges = await make.shore('Gull Ledges');
  kettleReef = await make.shore('Kettle Reef');
});
afterAll(async () => {
  await app.close();
});

/** Somebody who is current in both through a day. */
async function leaderUntil(expiresOn: `${number}-${number}-${number}`): Promise<PersonId> {
  const personId = await make.person();
  await make.award(personId, tideSafety, '2026-01-01', expiresOn);
  await make.award(personId, firstAid, '2026-01-01', '2028-12-31');
  return personId;
}

describe('claiming a slot', () => {
  it('gives a leader slot to somebody who is current through the whole last day', async () => {
    const personId = await leaderUntil('2027-05-09');
    const session = await make.session(gullLedges, '2027-05-09', [leader]);
    const reply = await (await app.as(personId)).post(`/api/slots/${session.slots[0]}/claim`);
    expect(reply.status).toBe(200);
    const slot = slotView.parse(reply.body);
    expect(slot).toMatchObject({ state: 'claimed', isYours: true, release: { isGranted: true } });
  });

  it('refuses on the day after the last valid day, naming the competency and the days short', async () => {
    const personId = await leaderUntil('2027-05-03');
    const session = await make.session(gullLedges, '2027-05-09', [leader]);
    const reply = await (await app.as(personId)).post(`/api/slots/${session.slots[0]}/claim`);
    expect(reply.status).toBe(409);
    expect(reply.type).toBe('application/problem+json');
    expect(problem.parse(reply.body).reasons).toEqual([
      {
        why: 'competency-lapses',
        competencyId: tideSafety,
        competencyName: 'Tide safety',
        howToGet: 'How to get Tide safety',
        lastValidOn: '2027-05-03',
        neededOn: '2027-05-09',
        daysShort: 6,
        hasLapsed: false,
      },
    ]);
  });

  it('gives every reason at once', async () => {
    const personId = await make.person({ bornOn: '2012-02-29' });
    const held = await make.session(kettleReef, '2027-05-10', [guide]);
    const wanted = await make.session(gullLedges, '2027-05-10', [leader], { laterMinutes: 60 });
    const requests = await app.as(personId);
    expect((await requests.post(`/api/slots/${held.slots[0]}/claim`)).status).toBe(200);
    const reply = await requests.post(`/api/slots/${wanted.slots[0]}/claim`);
    expect(problem.parse(reply.body).reasons?.map(({ why }) => why)).toEqual([
      'competency-not-held',
      'competency-not-held',
      'under-18',
      'overlap',
    ]);
  });

  it('refuses a slot that somebody holds, and says who', async () => {
    const [first, second] = [await make.person({ name: 'Amara Nwosu' }), await make.person()];
    const { slots } = await make.session(gullLedges, '2027-05-11', [guide]);
    await (await app.as(first)).post(`/api/slots/${slots[0]}/claim`);
    const reply = await (await app.as(second)).post(`/api/slots/${slots[0]}/claim`);
    expect(problem.parse(reply.body).reasons).toEqual([
      { why: 'slot-taken', holderName: 'Amara Nwosu', claimedAt: '2027-04-29T12:05:00.000Z' },
    ]);
  });

  it('refuses from the moment the crew meets', async () => {
    const personId = await make.person();
    const { slots } = await make.session(gullLedges, '2027-05-12', [guide]);
    app.clock.setTo(fromIso('2027-05-12T06:37:00.000Z'));
    try {
      const reply = await (await app.as(personId)).post(`/api/slots/${slots[0]}/claim`);
      expect(problem.parse(reply.body).reasons?.map(({ why }) => why)).toEqual(['session-started']);
    } finally {
      app.clock.setTo(testNow);
    }
  });

  it('shows the same verdict before the click as the claim then gets', async () => {
    const personId = await leaderUntil('2027-05-03');
    const { id, slots } = await make.session(gullLedges, '2027-05-13', [leader, guide]);
    const requests = await app.as(personId);
    const page = seeSession.reply.parse((await requests.get(`/api/sessions/${id}`)).body);
    const refused = page.slots[0]?.claim;
    const claim = await requests.post(`/api/slots/${slots[0]}/claim`);
    expect(refused).toEqual({ isGranted: false, reasons: problem.parse(claim.body).reasons });
    expect(page.slots[1]?.claim).toEqual({ isGranted: true });
    expect((await requests.post(`/api/slots/${slots[1]}/claim`)).status).toBe(200);
  });

  it('hides a draft from everybody but coordinators', async () => {
    const volunteer = await make.person();
    const coordinator = await make.person({ roles: ['coordinator'] });
    const { id, slots } = await make.session(gullLedges, '2027-05-14', [guide], { state: 'draft' });
    expect((await (await app.as(volunteer)).get(`/api/sessions/${id}`)).status).toBe(404);
    expect((await (await app.as(volunteer)).post(`/api/slots/${slots[0]}/claim`)).status).toBe(404);
    expect((await (await app.as(coordinator)).get(`/api/sessions/${id}`)).status).toBe(200);
  });

  it('answers 404 for a slot that is not there and 400 for an id that is none', async () => {
    const requests = await app.as(await make.person());
    const none = '00000000-0000-4000-8000-000000000000';
    expect((await requests.post(`/api/slots/${none}/claim`)).status).toBe(404);
    const reply = await requests.post('/api/slots/seven/claim');
    expect(reply.status).toBe(400);
    expect(problem.parse(reply.body).fields).toMatchObject([{ where: 'params', field: 'slotId' }]);
  });
});

describe('what a claim brings with it', () => {
  it('writes to the holder once, and the calendar shows the slot as theirs', async () => {
    const personId = await make.person({ name: 'Hana Dvorská', email: 'hana@example.org' });
    const { id, slots } = await make.session(kettleReef, '2027-05-20', [guide]);
    const requests = await app.as(personId);
    await requests.post(`/api/slots/${slots[0]}/claim`);
    const letters = await eventually(() =>
      app.mails.filter(({ to }) => to.address === 'hana@example.org'),
    );
    expect(letters).toHaveLength(1);
    expect(letters[0]?.subject).toBe('Yours: pool guide, Kettle Reef, Thursday 20 May 2027');
    expect(letters[0]?.text).toContain('Off the shore by:     10:52 BST');
    expect(letters[0]?.html).toContain('10:52 BST');
    const month = seeCalendar.reply.parse(
      (await requests.get('/api/calendar?from=2027-05-01&to=2027-05-31')).body,
    );
    const session = month.sessions.find((one) => one.id === id);
    expect(session?.slots).toMatchObject([{ state: 'claimed', isYours: true, mayClaim: false }]);
  });

  it('puts claim and release on the trail of the session, and a released slot is a gap again', async () => {
    const personId = await make.person({ name: 'Joss Whitlock' });
    const { id, slots } = await make.session(kettleReef, '2027-05-21', [guide]);
    const requests = await app.as(personId);
    await requests.post(`/api/slots/${slots[0]}/claim`);
    const released = await requests.post(`/api/slots/${slots[0]}/release`);
    expect(slotView.parse(released.body)).toMatchObject({
      state: 'gap',
      claim: { isGranted: true },
    });
    const page = seeSession.reply.parse((await requests.get(`/api/sessions/${id}`)).body);
    expect(page.trail.map(({ action, actorName }) => [action, actorName])).toEqual([
      ['slot.released', 'Joss Whitlock'],
      ['slot.claimed', 'Joss Whitlock'],
    ]);
    expect((await requests.post(`/api/slots/${slots[0]}/claim`)).status).toBe(200);
  });

  it('lets nobody release a slot of somebody else, nor their own once the crew has met', async () => {
    const [holder, other] = [await make.person(), await make.person()];
    const { slots } = await make.session(kettleReef, '2027-05-22', [guide]);
    await (await app.as(holder)).post(`/api/slots/${slots[0]}/claim`);
    const byOther = await (await app.as(other)).post(`/api/slots/${slots[0]}/release`);
    expect(problem.parse(byOther.body)).toMatchObject({ status: 409, code: 'release-refused' });
    app.clock.setTo(fromIso('2027-05-22T06:37:00.000Z'));
    try {
      const late = await (await app.as(holder)).post(`/api/slots/${slots[0]}/release`);
      expect(late.status).toBe(409);
    } finally {
      app.clock.setTo(testNow);
    }
  });
});
