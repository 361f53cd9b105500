import { useMutation } from '@tanstack/react-query';
import { lazy, Suspense, useState } from 'react';
import type { Reply } from '#frontend/api/call.ts';
import { call } from '#frontend/api/call.ts';
import { sayProblem } from '#frontend/api/say-problem.ts';
import { Button } from '#frontend/components/button.tsx';
import { ProblemSummary } from '#frontend/components/problem-summary.tsx';
import { dayAt, formatDay, fromIso } from '#shared/kernel/time.ts';
import { zoneInWords } from './zone-words.ts';

// Only who takes a table back ever needs it, and it is larger than the rest of the page.
const ConfirmDialog = lazy(async () => ({
  default: (await import('#frontend/components/confirm-dialog.tsx')).ConfirmDialog,
}));

type Table = Reply<'seeTables'>['tables'][number];

/** The tables in force, and under them those that were taken back. */
export function TableList(props: {
  readonly tables: readonly Table[];
  /** Whose calendar the days are told by. */
  readonly zone: string;
  readonly onTakenBack: (name: string) => void;
}) {
  const { tables, zone, onTakenBack } = props;
  const inForce = tables.filter(({ takenBackAt }) => takenBackAt === null);
  const takenBack = tables.filter(({ takenBackAt }) => takenBackAt !== null);
  return (
    <>
      <section aria-labelledby="in-force" className="mt-5">
        <h2 id="in-force" className="border-t-[1.5px] border-ink pt-2">
          In force
        </h2>
        {inForce.length === 0 ? (
          <p className="mt-1 text-ui">
            No official table is in force: every time and height is predicted.
          </p>
        ) : (
          <ul>
            {inForce.map((table) => (
              <li key={table.id} className={row}>
                <TableFacts table={table} zone={zone} />
                <TakeBack table={table} onTakenBack={() => onTakenBack(table.name)} />
              </li>
            ))}
          </ul>
        )}
      </section>
      {takenBack.length > 0 && (
        <section aria-labelledby="taken-back" className="mt-6">
          <h2 id="taken-back" className="border-t-[1.5px] border-ink pt-2">
            Taken back
          </h2>
          <ul>
            {takenBack.map((table) => (
              <li key={table.id} className={row}>
                <TableFacts table={table} zone={zone} />
              </li>
            ))}
          </ul>
        </section>
      )}
    </>
  );
}

const row =
  'flex flex-wrap items-center justify-between gap-x-6 gap-y-2 border-hair py-2.5 [li+&]:border-t';

function TableFacts({ table, zone }: { table: Table; zone: string }) {
  const day = (iso: string): string => formatDay(dayAt(fromIso(iso), zone), 'dayMonthYear');
  const by = table.acceptedBy === null ? '' : ` by ${table.acceptedBy}`;
  const since = `In force since ${day(table.acceptedAt)}${by}`;
  return (
    <div className="min-w-0 text-ui">
      <h3>{table.name}</h3>
      <p className="tabular-nums">
        {`${table.stationName}, ${formatDay(table.firstOn, 'dayMonthYear')} to ${formatDay(table.lastOn, 'dayMonthYear')}, ${table.eventCount} high and low waters`}
      </p>
      <p className="text-sm text-barnacle tabular-nums">
        {`Printed in ${zoneInWords(table.zone)}. ${
          table.takenBackAt === null
            ? since
            : `${since.replace('In force since', 'Put in force on')}, taken back on ${day(table.takenBackAt)}`
        }.`}
      </p>
    </div>
  );
}

function TakeBack({ table, onTakenBack }: { table: Table; onTakenBack: () => void }) {
  const [isAsking, setIsAsking] = useState(false);
  const close = (): void => setIsAsking(false);
  const takingBack = useMutation({
    mutationFn: () => call('takeBackTable', { params: { tableId: table.id } }),
    onSuccess: onTakenBack,
    onSettled: close,
  });
  return (
    <div className="max-wide:w-full">
      <Button look="line" isWideOnPhone onPress={() => setIsAsking(true)}>
        <span>
          Take back <span className="sr-only">{table.name}</span>
        </span>
      </Button>
      {isAsking && (
        <Suspense fallback={null}>
          <ConfirmDialog
            title={`Take back ${table.name}?`}
            confirmWords={takingBack.isPending ? 'Taking back' : 'Take it back'}
            backWords="Leave it in force"
            isOpen
            isBusy={takingBack.isPending}
            onConfirm={() => takingBack.mutate()}
            onClose={close}
          >
            <p>
              {`For ${table.stationName} the prediction counts again. Sessions that are made keep their times.`}
            </p>
          </ConfirmDialog>
        </Suspense>
      )}
      {takingBack.error !== null && (
        <ProblemSummary title="The table was not taken back.">
          <p>{sayProblem(takingBack.error)}</p>
        </ProblemSummary>
      )}
    </div>
  );
}
