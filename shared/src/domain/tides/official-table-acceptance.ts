import { granted, refused } from '#shared/kernel/result.ts';
import type { Verdict } from '#shared/kernel/result.ts';
import type { TableComparison } from './official-table-comparison.ts';
import type { OfficialTable, TableRefusal } from './official-table-reading.ts';

/** Why a table may not be put in force. */
export type AcceptanceReason =
  | { readonly why: 'not-read'; readonly refusal: TableRefusal }
  | { readonly why: 'too-few-events' }
  | { readonly why: 'looks-like-a-mistake'; readonly comparison: TableComparison }
  | { readonly why: 'rows-in-doubt'; readonly rows: number };

/**
 * Whether a table may be put in force: it could be read, it agrees with the prediction, and its
 * rows are whole or a person said to leave the others out (product rule R9). Without a comparison
 * there were too few high and low waters to compare.
 */
export function mayAcceptTable(facts: {
  readonly table: Verdict<OfficialTable, TableRefusal>;
  readonly comparison: TableComparison | null;
  readonly leavesOutProblems: boolean;
}): Verdict<OfficialTable, AcceptanceReason> {
  const { table, comparison, leavesOutProblems } = facts;
  if (!table.isGranted) return refused({ why: 'not-read', refusal: table.reasons[0] });
  if (comparison === null) return refused({ why: 'too-few-events' });
  if (comparison.verdict !== 'agrees') return refused({ why: 'looks-like-a-mistake', comparison });
  const rows = table.value.problems.length;
  if (rows > 0 && !leavesOutProblems) return refused({ why: 'rows-in-doubt', rows });
  return granted(table.value);
}
