import { z } from 'zod';
import { reasonAgainst } from './reasons.ts';

/** Every kind of problem and the HTTP status that it answers with. The list is closed. */
export const problemStatus = {
  'not-signed-in': 401,
  'not-allowed': 403,
  'wrong-origin': 403,
  'not-json': 415,
  'not-found': 404,
  'not-understood': 400,
  'too-large': 413,
  'claim-refused': 409,
  'release-refused': 409,
  'plan-refused': 409,
  'table-refused': 409,
  'too-many-requests': 429,
  'sign-in-failed': 400,
  unavailable: 503,
  unexpected: 500,
} as const;

export type ProblemCode = keyof typeof problemStatus;

/** One thing wrong with what was sent, beside the field that it is about. */
export const fieldError = z.strictObject({
  where: z.enum(['params', 'query', 'body']),
  field: z.string().describe('Path of the field, dots between its parts'),
  message: z.string(),
});

/** A problem as RFC 9457 writes it (application/problem+json). */
export const problem = z.object({
  type: z.string(),
  title: z.string(),
  status: z.number().int(),
  code: z.enum(Object.keys(problemStatus) as [ProblemCode, ...ProblemCode[]]),
  instance: z
    .string()
    .optional()
    .describe('The id of this occurrence, to quote to whoever looks after the system'),
  fields: z.array(fieldError).optional(),
  reasons: z.array(reasonAgainst).optional(),
});

export type ProblemReply = z.output<typeof problem>;
export type FieldError = z.output<typeof fieldError>;
