import type { z } from 'zod';

type Issue = z.core.$ZodIssue;

/**
 * What is wrong with one value, as a sentence to stand beside its field. A contract's own words
 * win; these are for the plain cases that every contract has.
 */
export function sayIssue(issue: Issue): string {
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
      return issue.message;
  }
}

/** Whether the words of an issue are a contract's own, and not those that zod makes up. */
export function isOwnWording(issue: Issue): boolean {
  return !/^(Invalid|Too|Unrecognized|Expected)\b/.test(issue.message);
}
