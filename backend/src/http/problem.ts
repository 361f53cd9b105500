import type { FieldError, ProblemCode } from '#shared/contracts/problem.ts';
import type { ReasonAgainst } from '#shared/contracts/reasons.ts';

/** Something wrong beside one field of a request. */
export type FieldProblem = FieldError;

/** The one error that reaches a user. Anything else that is thrown is a bug: 500 and an id. */
export class Problem extends Error {
  readonly code: ProblemCode;
  readonly reasons: readonly ReasonAgainst[];
  readonly fields: readonly FieldError[];

  constructor(
    code: ProblemCode,
    title: string,
    more: {
      readonly reasons?: readonly ReasonAgainst[];
      readonly fields?: readonly FieldError[];
    } = {},
  ) {
    super(title);
    this.name = 'Problem';
    this.code = code;
    this.reasons = more.reasons ?? [];
    this.fields = more.fields ?? [];
  }
}
