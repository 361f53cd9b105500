import { useMutation } from '@tanstack/react-query';
import { useState } from 'react';
import { call } from '#frontend/api/call.ts';
import { ProblemError } from '#frontend/api/problem-error.ts';
import { sayProblem } from '#frontend/api/say-problem.ts';
import { Button } from '#frontend/components/button.tsx';
import { ProblemSummary } from '#frontend/components/problem-summary.tsx';
import type { TableText } from '#shared/contracts/tide-tables.ts';
import type { Accepted, TableDraft, TableErrors } from './table-draft.ts';
import { emptyTable, isSameTable, readTable } from './table-draft.ts';
import type { Stations } from './table-fields.tsx';
import { TableFields } from './table-fields.tsx';
import { TableRead } from './table-read.tsx';

/**
 * Uploads or takes a pasted table: told about, read by the server, looked at, then put in force.
 * What was typed stays until it is in force.
 */
export function TableForm(props: {
  readonly stations: Stations;
  readonly onAccepted: (accepted: Accepted) => void;
}) {
  const { stations, onAccepted } = props;
  const [draft, setDraft] = useState<TableDraft>(emptyTable);
  const [errors, setErrors] = useState<TableErrors>({});
  const reading = useMutation({
    mutationFn: (table: TableText) => call('previewTable', { body: table }),
    onError: (error) => setErrors(fieldsOf(error)),
  });
  const read = (): void => {
    const { table, errors: found } = readTable(draft, stations);
    setErrors(found);
    if (table === null) reading.reset();
    else reading.mutate(table);
  };
  const now = readTable(draft, stations).table;
  const isStale =
    reading.variables !== undefined && (now === null || !isSameTable(now, reading.variables));
  return (
    <section aria-labelledby="another-table" className="mt-8">
      <h2 id="another-table" className="border-t-[1.5px] border-ink pt-2">
        Add an official table
      </h2>
      <p className="mt-1 text-ui">
        A year of high and low waters, as the harbour or the national office prints them. It wins
        over the prediction. Nothing changes until you put it in force.
      </p>
      <TableFields
        draft={draft}
        errors={errors}
        stations={stations}
        onWrite={(changes) => {
          setDraft((before) => ({ ...before, ...changes }));
          setErrors((before) => without(before, Object.keys(changes)));
        }}
      />
      <div className="mt-4">
        <Button isWideOnPhone isBusy={reading.isPending} onPress={read}>
          {reading.isPending ? 'Reading' : 'Read it'}
        </Button>
        {Object.keys(errors).length > 0 && (
          <p role="alert" className="mt-2 text-ui font-medium text-anemone">
            Some fields need another look. What is wrong stands beside each.
          </p>
        )}
      </div>
      {reading.error !== null && Object.keys(fieldsOf(reading.error)).length === 0 && (
        <ProblemSummary key={reading.submittedAt} title="The table was not read.">
          <p>{sayProblem(reading.error)}</p>
        </ProblemSummary>
      )}
      {reading.isSuccess && (
        <TableRead
          key={reading.submittedAt}
          table={reading.variables}
          preview={reading.data}
          isStale={isStale}
          onAccepted={onAccepted}
        />
      )}
    </section>
  );
}

/** The errors that still hold once these fields of the draft are written anew. */
function without(errors: TableErrors, written: readonly string[]): TableErrors {
  const settles = written.flatMap((name) =>
    name === 'zoneKind' || name === 'offset'
      ? ['zone']
      : name === 'stationId'
        ? [name, 'zone']
        : [name],
  );
  return Object.fromEntries(Object.entries(errors).filter(([name]) => !settles.includes(name)));
}

function fieldsOf(error: Error): TableErrors {
  const fields = error instanceof ProblemError ? (error.problem.fields ?? []) : [];
  return Object.fromEntries(
    fields.flatMap(({ where, field, message }) =>
      where === 'body' && fieldNames.has(field) ? [[field, message]] : [],
    ),
  );
}

const fieldNames: ReadonlySet<string> = new Set<keyof TableText>([
  'stationId',
  'name',
  'zone',
  'units',
  'dateOrder',
  'year',
  'text',
]);
