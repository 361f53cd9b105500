import type { z } from 'zod';
import type { Contract } from '#shared/contracts/contract.ts';
import { problem } from '#shared/contracts/problem.ts';
import { NoAnswerError, ProblemError } from './problem-error.ts';

/** What to send: the parts that the contract names, as they are written before parsing. */
export interface Sent<C extends Contract> {
  readonly params: z.input<C['params']>;
  readonly query: z.input<C['query']>;
  readonly body: z.input<C['body']>;
}

/**
 * Calls one endpoint and answers its reply. Throws a ProblemError for every other answer of the
 * server and a NoAnswerError where none came or none could be read. The reply is taken at the
 * contract's word: the server sends nothing that its contract does not name.
 */
export async function call<C extends Contract>(
  contract: C,
  sent: Partial<Sent<C>>,
  signal?: AbortSignal,
): Promise<z.output<C['reply']>> {
  const hasBody = contract.method !== 'get';
  const response = await reach(addressOf(contract.path, sent.params, sent.query), {
    method: contract.method.toUpperCase(),
    credentials: 'same-origin',
    headers: {
      accept: 'application/json, application/problem+json',
      ...(hasBody ? { 'content-type': 'application/json' } : {}),
    },
    ...(hasBody ? { body: JSON.stringify(sent.body ?? {}) } : {}),
    ...(signal === undefined ? {} : { signal }),
  });
  const answer = await readJson(response);
  if (response.ok) return answer as z.output<C['reply']>;
  const told = problem.safeParse(answer);
  if (!told.success) throw new NoAnswerError(told.error);
  throw new ProblemError(told.data);
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
