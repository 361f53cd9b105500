import type { PlanDate } from '#shared/contracts/season-plans.ts';
import type { PlanException } from './plan-draft.ts';

/** What can be decided by hand for a date of a plan, in the word on its button. */
export interface Decision {
  readonly word: 'Skip' | 'Take' | 'Remove';
  /** What is kept of it; null where an earlier decision is taken back. */
  readonly kind: 'skip' | 'take' | null;
}

/** What the reader may decide for a date; null where no hand may overrule what refuses it. */
export function decisionFor(date: PlanDate): Decision | null {
  if (date.source === 'added') return { word: 'Remove', kind: null };
  if (date.isTaken) return { word: 'Skip', kind: date.isByHand ? null : 'skip' };
  if (date.skippedBy === 'hand') return { word: 'Take', kind: null };
  return date.mayTake ? { word: 'Take', kind: 'take' } : null;
}

/** The decisions of a plan with that for one date made or taken back; one decision a date. */
export function decided(
  exceptions: readonly PlanException[],
  on: PlanException['on'],
  kind: PlanException['kind'] | null,
  reason: string,
): PlanException[] {
  const others = exceptions.filter((one) => one.on !== on);
  if (kind === null) return others;
  const said = reason.trim();
  return [...others, { on, kind, reason: said === '' ? null : said }].sort((a, b) =>
    a.on < b.on ? -1 : 1,
  );
}
