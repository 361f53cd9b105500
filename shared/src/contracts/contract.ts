import type { z } from 'zod';

/**
 * What crosses the wire at one endpoint. `path` is written the way Express and React Router
 * write it, with `:name` for each member of `params`. `answer` is a JSON body of the shape
 * `reply`, or a redirect of the whole browser; anything that fails is a problem (problem.ts).
 */
export interface Contract<
  Params extends z.ZodType = z.ZodType,
  Query extends z.ZodType = z.ZodType,
  Body extends z.ZodType = z.ZodType,
  Reply extends z.ZodType = z.ZodType,
> {
  readonly method: 'get' | 'post' | 'put' | 'patch' | 'delete';
  readonly path: `/${string}`;
  readonly summary: string;
  readonly answer: 'json' | 'redirect';
  readonly params: Params;
  readonly query: Query;
  readonly body: Body;
  readonly reply: Reply;
  /** The longest body in bytes, where it is more than the 200 kB that every route takes. */
  readonly longestBodyBytes?: number;
}

/** A contract that answers with JSON; keeps the exact types of its parts. */
export function contract<
  Params extends z.ZodType,
  Query extends z.ZodType,
  Body extends z.ZodType,
  Reply extends z.ZodType,
>(
  parts: Omit<Contract<Params, Query, Body, Reply>, 'answer'>,
): Contract<Params, Query, Body, Reply> {
  return { ...parts, answer: 'json' };
}
