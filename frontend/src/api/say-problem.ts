import { NoAnswerError, ProblemError } from './problem-error.ts';

/** An error of a call in a sentence or two for its reader, with the next step. */
export function sayProblem(error: Error): string {
  if (error instanceof NoAnswerError) {
    return 'No answer came from the server. Check the connection, then try again.';
  }
  if (!(error instanceof ProblemError)) return 'Something in this page went wrong. Load it again.';
  const { code, title, instance } = error.problem;
  if (code === 'unexpected') {
    return `Something went wrong at the server.${instance === undefined ? '' : ` Whoever looks after it finds it by ${instance}.`} Try again in a minute.`;
  }
  if (code === 'too-many-requests') return 'That was too often. Wait a minute, then try again.';
  return /[.!?]$/.test(title) ? title : `${title}.`;
}
