import { useMutation } from '@tanstack/react-query';
import { useEffect, useId, useRef, useState } from 'react';
import { call } from '#frontend/api/call.ts';
import { sayProblem } from '#frontend/api/say-problem.ts';
import { Button } from '#frontend/components/button.tsx';
import { ProblemSummary } from '#frontend/components/problem-summary.tsx';
import { Tick } from '#frontend/components/tick.tsx';
import { numberWord } from '#frontend/words/number-words.ts';
import type { TablePreview, TableText } from '#shared/contracts/tide-tables.ts';
import { formatDay } from '#shared/kernel/time.ts';
import { ClockChanges } from './clock-changes.tsx';
import { MovedSessions } from './moved-sessions.tsx';
import { TableComparison } from './table-comparison.tsx';
import type { Accepted } from './table-draft.ts';
import { zoneInWords } from './zone-words.ts';

const MOST_SHOWN = 50;

/** What was read of a table, for a person to look at before it is put in force. */
export function TableRead(props: {
  readonly table: TableText;
  readonly preview: TablePreview;
  /** What was typed has changed since. */
  readonly isStale: boolean;
  readonly onAccepted: (accepted: Accepted) => void;
}) {
  const { table, preview, isStale, onAccepted } = props;
  const [leavesOutProblems, setLeavesOutProblems] = useState(false);
  const [moves, setMoves] = useState<readonly string[]>([]);
  const heading = useRef<HTMLHeadingElement>(null);
  const whyNotId = useId();
  useEffect(() => heading.current?.focus(), []);
  const accepting = useMutation({
    mutationFn: () =>
      call('acceptTable', { body: { ...table, leavesOutProblems, movesSessionIds: [...moves] } }),
    onSuccess: ({ moved }) => onAccepted({ name: table.name, moved }),
  });
  const problems = preview.problems.length;
  const whyNot = whyNotYet(preview, isStale, leavesOutProblems);
  return (
    <div className="mt-7">
      <h3
        ref={heading}
        tabIndex={-1}
        className="border-t-[1.5px] border-ink pt-2 text-lg outline-none"
      >
        What was read
      </h3>
      {preview.refusal === null ? (
        <WhatWasRead table={table} preview={preview} />
      ) : (
        <p className="mt-1 text-ui">
          <b className="text-anemone">It cannot be read as a table.</b> {preview.refusal}
        </p>
      )}
      {problems > 0 && <Problems problems={preview.problems} />}
      {preview.comparison !== null && <TableComparison comparison={preview.comparison} />}
      <ClockChanges days={preview.clockChanges} zone={table.zone} />
      {preview.refusal === null && (
        <MovedSessions sessions={preview.movedSessions} ticked={moves} onTick={setMoves} />
      )}
      <div className="mt-6 border-t border-hair pt-3">
        {problems > 0 && (
          <p className="mb-3">
            <Tick
              words="Leave out what could not be read"
              isTicked={leavesOutProblems}
              onChange={setLeavesOutProblems}
            />
          </p>
        )}
        <Button
          isWideOnPhone
          isBusy={accepting.isPending}
          whyNotId={whyNot === null ? undefined : whyNotId}
          onPress={() => accepting.mutate()}
        >
          {accepting.isPending ? 'Putting it in force' : 'Put this table in force'}
        </Button>
        <p id={whyNotId} className="mt-2 text-ui">
          {whyNot ?? movesInWords(moves.length)}
        </p>
        {accepting.error !== null && (
          <ProblemSummary key={accepting.submittedAt} title="The table was not put in force.">
            <p>{sayProblem(accepting.error)}</p>
          </ProblemSummary>
        )}
      </div>
    </div>
  );
}

function whyNotYet(
  preview: TablePreview,
  isStale: boolean,
  leavesOutProblems: boolean,
): string | null {
  const { refusal, comparison, problems, mayAccept } = preview;
  if (isStale) return 'Something above was changed since. Read it again first.';
  if (refusal !== null) return 'It cannot be put in force: it cannot be read as a table.';
  if (!mayAccept) {
    return comparison === null
      ? 'It cannot be put in force: there are too few high and low waters in it.'
      : 'It cannot be put in force while it looks like a mistake.';
  }
  if (problems.length > 0 && !leavesOutProblems) {
    return 'Mend the rows that could not be read, or say that they are left out.';
  }
  return null;
}

function movesInWords(count: number): string {
  if (count === 0) return 'No session is ticked to move: all keep their times.';
  return count === 1
    ? 'One session takes the new times; its crew find them on the calendar.'
    : `The ${numberWord(count)} sessions ticked take the new times; their crews find them on the calendar.`;
}

function WhatWasRead({ table, preview }: { table: TableText; preview: TablePreview }) {
  const { eventCount, firstOn, lastOn, layout } = preview;
  const days =
    firstOn === null || lastOn === null
      ? ''
      : `, ${formatDay(firstOn, 'longYear')} to ${formatDay(lastOn, 'longYear')}`;
  return (
    <>
      <p className="mt-1 text-ui tabular-nums">
        <b>{`${eventCount} high and low waters`}</b>
        {`${days}, in ${zoneInWords(table.zone)}.`}
      </p>
      <p className="text-sm text-barnacle">{`Recognised: ${layout}.`}</p>
    </>
  );
}

function Problems({ problems }: { problems: TablePreview['problems'] }) {
  const shown = problems.slice(0, MOST_SHOWN);
  const more = problems.length - shown.length;
  return (
    <section aria-labelledby="table-problems" className="mt-5">
      <h4 id="table-problems" className="font-semibold text-wrack">
        {problems.length === 1 ? 'One row is not right' : `${problems.length} rows are not right`}
      </h4>
      <ul className="mt-1 gap-x-10 text-ui wide:columns-2">
        {shown.map(({ row, message }) => (
          <li key={`${row} ${message}`} className="grid grid-cols-[5rem_minmax(0,1fr)] py-0.5">
            <span className="text-barnacle tabular-nums">Row {row}</span>
            {message}
          </li>
        ))}
      </ul>
      {more > 0 && <p className="mt-1 text-ui">{`And ${more} more.`}</p>}
    </section>
  );
}
