import type { NextDatesRefusal } from '#shared/domain/seasons/recurrence.ts';

/** One sentence on why a pattern cannot be followed, naming the part that stands in the way. */
export function sayPatternRefusal(reason: NextDatesRefusal): string {
  switch (reason.why) {
    case 'empty-rule':
      return 'Write a rule, for example FREQ=WEEKLY;BYDAY=SA.';
    case 'unreadable-part':
      return `"${reason.part}" is not a part of a rule that can be read.`;
    case 'part-named-twice':
      return `${reason.name} stands in the rule twice.`;
    case 'frequency-missing':
      return 'The rule does not say how often: begin with FREQ=WEEKLY or FREQ=MONTHLY.';
    case 'more-often-than-daily':
      return `"${reason.part}" repeats more often than daily. A plan gives dates.`;
    case 'clock-time-in-rule':
      return `"${reason.part}" gives a time on the clock. The tide gives the times.`;
    case 'interval-too-large':
      return `"${reason.part}" is too long: at most ${reason.mostInterval}.`;
    case 'count-and-until':
      return 'A rule ends by COUNT or by UNTIL, not by both.';
    case 'part-out-of-place':
      return `"${reason.part}" does not go with FREQ=${reason.frequency}.`;
    case 'never-comes':
      return `"${reason.part}" names days that never come.`;
    case 'nothing-chosen':
      return `Choose at least one of the ${reason.choice}.`;
    case 'ends-before-it-begins':
      return 'The last day comes before the first.';
    case 'span-too-long':
      return `At most ${reason.mostDays} days can be looked through.`;
    case 'no-date-comes':
      return 'No date follows from this rule.';
  }
}
