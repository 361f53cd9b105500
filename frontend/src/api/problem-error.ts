import type { ProblemReply } from '#shared/contracts/problem.ts';

/** An answer of the server that is not a reply: a problem as RFC 9457 writes it. */
export class ProblemError extends Error {
  readonly problem: ProblemReply;

  constructor(problem: ProblemReply) {
    super(problem.title);
    this.name = 'ProblemError';
    this.problem = problem;
  }
}

/** No answer came: no network, no server, or something between them that speaks for itself. */
export class NoAnswerError extends Error {
  constructor(cause: unknown) {
    super('The server did not answer', { cause });
    this.name = 'NoAnswerError';
  }
}
