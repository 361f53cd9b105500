import { EntitySchema } from 'typeorm';
import type { LetterId, PersonId } from '#shared/kernel/ids.ts';

/** A letter in the outbox: written in the transaction that caused it, sent by the worker. */
export interface LetterRow {
  id: LetterId;
  kind: string;
  /** The id of what it is about; a kind is written once about one thing. */
  about: string;
  personId: PersonId | null;
  toName: string;
  toAddress: string;
  subject: string;
  textBody: string;
  htmlBody: string;
  plannedAt: Date;
  sentAt: Date | null;
  serverAnswer: string | null;
}

export const LetterEntity = new EntitySchema<LetterRow>({
  name: 'letter',
  columns: {
    id: { type: 'uuid', primary: true },
    kind: { type: 'text' },
    about: { type: 'text' },
    personId: { name: 'person_id', type: 'uuid', nullable: true },
    toName: { name: 'to_name', type: 'text' },
    toAddress: { name: 'to_address', type: 'text' },
    subject: { type: 'text' },
    textBody: { name: 'text_body', type: 'text' },
    htmlBody: { name: 'html_body', type: 'text' },
    plannedAt: { name: 'planned_at', type: 'timestamptz' },
    sentAt: { name: 'sent_at', type: 'timestamptz', nullable: true },
    serverAnswer: { name: 'server_answer', type: 'text', nullable: true },
  },
});
