import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { sendLetter } from '#backend/features/mail/send-letter.ts';
import type { Letter } from '#backend/app-context.ts';
import type { LetterId } from '#shared/kernel/ids.ts';
import { startTestApp } from '../support/test-app.ts';
import type { TestApp } from '../support/test-app.ts';
import { eventually } from '../support/eventually.ts';

let app: TestApp;
const keep = (answer: string) => (mail: TestApp['mails'][number]) => {
  app.mails.push(mail);
  return Promise.resolve(answer);
};

beforeAll(async () => {
  app = await startTestApp();
});
afterAll(async () => {
  await app.close();
});
beforeEach(() => {
  app.mails.length = 0;
  app.answerMail = keep('250 kept');
});

function letter(about: string): Letter {
  return {
    kind: 'claim-confirmed',
    about,
    to: { personId: null, name: 'Hana', address: 'hana@example.org' },
    subject: `About ${about}`,
    text: 'Words',
    html: '<p>Words</p>',
  };
}

async function idOf(about: string): Promise<LetterId> {
  const rows = await app.ctx.reading<{ id: LetterId }[]>((read) =>
    read.query('SELECT id FROM letter WHERE about = $1', [about]),
  );
  return rows[0]?.id as LetterId;
}

const sent = (about: string) => app.mails.filter(({ subject }) => subject === `About ${about}`);

describe('a letter', () => {
  it('is sent by the worker when its transaction commits, with a Message-ID of its own', async () => {
    await app.ctx.inTransaction((tx) => app.ctx.postLetter(tx, letter('one')));
    expect(await eventually(() => sent('one'))).toHaveLength(1);
    const id = await idOf('one');
    expect(sent('one')[0]?.messageId).toBe(`<${id}@localhost>`);
  });

  it('is not there when its transaction rolls back', async () => {
    const broken = app.ctx.inTransaction(async (tx) => {
      await app.ctx.postLetter(tx, letter('never'));
      throw new Error('rolled back on purpose');
    });
    await expect(broken).rejects.toThrow('rolled back on purpose');
    await app.ctx.inTransaction((tx) => app.ctx.postLetter(tx, letter('after')));
    await eventually(() => sent('after'));
    expect(sent('never')).toEqual([]);
    const jobs = await app.ctx.reading<{ jobs: string }[]>((read) =>
      read.query(
        `SELECT count(*) AS jobs FROM pgboss.job WHERE name = 'send-letter'
            AND data ->> 'letterId' NOT IN (SELECT id::text FROM letter)`,
      ),
    );
    expect(jobs).toEqual([{ jobs: '0' }]);
  });

  it('is written once about one thing, however often and by however many it is planned', async () => {
    await Promise.all(
      Array.from({ length: 5 }, () =>
        app.ctx.inTransaction((tx) => app.ctx.postLetter(tx, letter('thing'))),
      ),
    );
    await eventually(() => sent('thing'));
    const rows = await app.ctx.reading<{ letters: string }[]>((read) =>
      read.query(`SELECT count(*) AS letters FROM letter WHERE about = 'thing'`),
    );
    expect(rows).toEqual([{ letters: '1' }]);
    expect(sent('thing')).toHaveLength(1);
  });

  it('goes out once though its job runs four times at once', async () => {
    let handed = 0;
    app.answerMail = async (mail) => {
      handed += 1;
      await new Promise((resolve) => setTimeout(resolve, 100));
      return keep('250 kept')(mail);
    };
    await app.ctx.inTransaction((tx) => app.ctx.postLetter(tx, letter('doubled')));
    const id = await idOf('doubled');
    await Promise.all(Array.from({ length: 4 }, () => sendLetter(app.ctx, id)));
    await eventually(() => sent('doubled'));
    await sendLetter(app.ctx, id);
    expect(handed).toBe(1);
  });

  it('stays unsent when the mail server refuses, and goes out with the same Message-ID later', async () => {
    const tried: string[] = [];
    app.answerMail = (mail) => {
      tried.push(mail.messageId);
      return Promise.reject(new Error('421 busy'));
    };
    await app.ctx.inTransaction((tx) => app.ctx.postLetter(tx, letter('refused')));
    const id = await idOf('refused');
    await expect(sendLetter(app.ctx, id)).rejects.toThrow('421 busy');
    app.answerMail = keep('250 at last');
    await sendLetter(app.ctx, id);
    expect(sent('refused').map(({ messageId }) => messageId)).toEqual([tried[0]]);
    const rows = await app.ctx.reading<{ answer: string }[]>((read) =>
      read.query(`SELECT server_answer AS answer FROM letter WHERE about = 'refused'`),
    );
    expect(rows).toEqual([{ answer: '250 at last' }]);
  });
});
