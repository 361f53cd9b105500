import type { z } from 'zod';

type Issue = z.core.$ZodRawIssue;

/**
 * What is wrong with one value, as a sentence to stand beside its field, for the plain cases that
 * every contract has. Given to zod as the words of a parse: a contract's own words win over them.
 */
export function sayIssue(issue: Issue): string | undefined {
  switch (issue.code) {
    case 'too_big':
      return issue.origin === 'string'
        ? `Write at most ${issue.maximum} characters.`
        : issue.origin === 'array'
          ? `Choose at most ${issue.maximum}.`
          : `At most ${issue.maximum}.`;
    case 'too_small':
      return issue.origin === 'string'
        ? 'Write something here.'
        : issue.origin === 'array'
          ? `Choose at least ${issue.minimum}.`
          : `At least ${issue.minimum}.`;
    case 'invalid_type':
      return issue.expected === 'number' || issue.expected === 'int'
        ? 'Write a number.'
        : 'This is missing, or not of the kind that is asked for.';
    case 'invalid_value':
      return 'Choose one of those offered.';
    case 'unrecognized_keys':
      return `Not asked for: ${issue.keys.join(', ')}.`;
    case 'invalid_format':
      return 'This is not written in the form that is asked for.';
    default:
      return undefined;
  }
}
