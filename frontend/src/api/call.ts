import type { z } from 'zod';
import type * as account from '#shared/contracts/account.ts';
import type { EndpointName } from '#shared/contracts/endpoints.ts';
import { endpoints } from '#shared/contracts/endpoints.ts';
import type { ProblemReply } from '#shared/contracts/problem.ts';
import type * as seasonPlans from '#shared/contracts/season-plans.ts';
import type * as sessions from '#shared/contracts/sessions.ts';
import type * as shores from '#shared/contracts/shores.ts';
import type * as slots from '#shared/contracts/slots.ts';
import type * as tideTables from '#shared/contracts/tide-tables.ts';
import { NoAnswerError, ProblemError } from './problem-error.ts';

type Contracts = typeof account &
  typeof seasonPlans &
  typeof sessions &
  typeof shores &
  typeof slots &
  typeof tideTables;

/** What to send: the parts that the contract names, as they are written before parsing. */
export interface Sent<Name extends EndpointName> {
  readonly params: z.input<Contracts[Name]['params']>;
  readonly query: z.input<Contracts[Name]['query']>;
  readonly body: z.input<Contracts[Name]['body']>;
}

/** The reply of one endpoint. */
export type Reply<Name extends EndpointName> = z.output<Contracts[Name]['reply']>;

/**
 * Calls the endpoint of one contract and answers its reply. Throws a ProblemError for every other
 * answer of the server and a NoAnswerError where none came or none could be read. The reply is
 * taken at the contract's word: the server sends nothing that its contract does not name.
 */
export async function call<Name extends EndpointName>(
  name: Name,
  sent: Partial<Sent<Name>>,
  signal?: AbortSignal,
): Promise<Reply<Name>> {
  const { method, path } = endpoints[name];
  const hasBody = method !== 'get';
  const response = await reach(addressOf(path, sent.params, sent.query), {
    method: method.toUpperCase(),
    credentials: 'same-origin',
    headers: {
      accept: 'application/json, application/problem+json',
      ...(hasBody ? { 'content-type': 'application/json' } : {}),
    },
    ...(hasBody ? { body: JSON.stringify(sent.body ?? {}) } : {}),
    ...(signal === undefined ? {} : { signal }),
  });
  const answer = await readJson(response);
  if (response.ok) return answer as Reply<Name>;
  if (isProblem(response, answer)) throw new ProblemError(answer);
  throw new NoAnswerError(new Error(`Status ${response.status} without a problem`));
}

function addressOf(path: string, params: unknown, query: unknown): string {
  const filled = path.replace(/:(\w+)/g, (_, name: string) =>
    encodeURIComponent(String((params as Record<string, unknown>)[name])),
  );
  const search = new URLSearchParams((query ?? {}) as Record<string, string>).toString();
  return search === '' ? filled : `${filled}?${search}`;
}

async function reach(address: string, init: RequestInit): Promise<Response> {
  try {
    return await fetch(address, init);
  } catch (error) {
    if (init.signal?.aborted === true) throw error;
    throw new NoAnswerError(error);
  }
}

async function readJson(response: Response): Promise<unknown> {
  try {
    return await response.json();
  } catch (error) {
    throw new NoAnswerError(error);
  }
}

/** Whether the server itself says what is wrong, and not something between it and the browser. */
function isProblem(response: Response, answer: unknown): answer is ProblemReply {
  return (
    (response.headers.get('content-type') ?? '').startsWith('application/problem+json') &&
    typeof answer === 'object' &&
    answer !== null &&
    'code' in answer
  );
}
