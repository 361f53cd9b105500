import type { OfficialTable } from '#shared/domain/tides/official-table-reading.ts';
import { granted, refused } from '#shared/kernel/result.ts';
import type { Verdict } from '#shared/kernel/result.ts';
import type { TableRead } from './read-table.ts';
import { sayComparison, sayTableRefusal } from './say-table.ts';

/**
 * Whether a table may be put in force: it could be read, its rows are whole or a person said to
 * leave the others out, and it does not look like a mistake. Else one sentence on why not.
 */
export function mayAccept(
  { table, comparison }: Pick<TableRead, 'table' | 'comparison'>,
  leavesOutProblems: boolean,
): Verdict<OfficialTable, string> {
  if (!table.isGranted) return refused(sayTableRefusal(table.reasons[0]));
  if (comparison === null) return refused('There are too few high and low waters in it.');
  if (comparison.verdict !== 'agrees') return refused(sayComparison(comparison));
  if (table.value.problems.length > 0 && !leavesOutProblems) {
    return refused('Some rows could not be read. Mend them, or say that they are left out.');
  }
  return granted(table.value);
}
