import type { Request, Response } from 'express';
import type { z } from 'zod';
import type { Contract } from '#shared/contracts/contract.ts';
import type { FieldError } from '#shared/contracts/problem.ts';
import type { PersonId } from '#shared/kernel/ids.ts';
import type { Action, policy, Role } from '#shared/policy/policy.ts';
import { may } from '#shared/policy/policy.ts';
import { Problem } from './problem.ts';
import { sayIssue } from './say-issue.ts';
import type { SignIn } from './sign-in.ts';

/** Who is asking. Roles are read from the database at every request. */
export interface Actor {
  readonly personId: PersonId;
  readonly name: string;
  readonly roles: readonly Role[];
}

/** Somebody is signed in wherever the policy asks for a person. */
type ActorFor<Tried extends Action> = (typeof policy)[Tried]['of'] extends 'people'
  ? Actor
  : Actor | null;

/** What a handler is given: parsed, permitted, and with who asks. */
export interface Asked<C extends Contract, Tried extends Action = Action> {
  readonly actor: ActorFor<Tried>;
  readonly params: z.output<C['params']>;
  readonly query: z.output<C['query']>;
  readonly body: z.output<C['body']>;
  readonly signIn: SignIn;
  /** The whole address that was asked for, under the configured base address. */
  readonly url: URL;
}

export interface Redirect {
  readonly goTo: string;
}

type Answer<C extends Contract> = C['answer'] extends 'redirect' ? Redirect : z.input<C['reply']>;

/** An endpoint: what crosses the wire, who may try it, and what it does. */
export interface Route {
  readonly contract: Contract;
  readonly action: Action;
  readonly handle: (request: Request, response: Response, visitor: Visitor) => Promise<void>;
}

/** What the front door knows of a request before any route is asked. */
export interface Visitor {
  readonly actor: Actor | null;
  readonly signIn: SignIn;
  readonly url: URL;
}

/**
 * Ties a contract to an action of the policy and a handler. Permission comes first (401, 403),
 * then the shape of the request (400), then the handler.
 */
export function route<const C extends Contract, Tried extends Action>(
  contract: C,
  action: Tried,
  handler: (asked: Asked<C, Tried>) => Promise<Answer<C>>,
): Route {
  return {
    contract,
    action,
    async handle(request, response, { actor, signIn, url }) {
      if (!may(actor?.roles ?? null, action)) {
        throw actor === null
          ? new Problem('not-signed-in', 'Sign in first')
          : new Problem('not-allowed', 'This is not among the things that your roles allow');
      }
      const answer = await handler({
        actor: actor as ActorFor<Tried>,
        ...parse(contract, request),
        signIn,
        url,
      } as Asked<C, Tried>);
      if (contract.answer === 'redirect') response.redirect(303, (answer as Redirect).goTo);
      else response.json(answer);
    },
  };
}

function parse(contract: Contract, request: Request) {
  const fields: FieldError[] = [];
  const read = (where: FieldError['where'], schema: z.ZodType, value: unknown): unknown => {
    const result = schema.safeParse(value, { error: sayIssue });
    if (result.success) return result.data;
    for (const issue of result.error.issues) {
      fields.push({
        where,
        field: issue.path.join('.'),
        message: issue.message,
      });
    }
    return undefined;
  };
  const parts = {
    params: read('params', contract.params, request.params),
    query: read('query', contract.query, request.query),
    body: read('body', contract.body, request.body ?? {}),
  };
  if (fields.length > 0) {
    throw new Problem('not-understood', 'Some of what was sent could not be read', { fields });
  }
  return parts;
}
