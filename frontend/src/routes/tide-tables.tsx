import { useQuery, useQueryClient, useSuspenseQuery } from '@tanstack/react-query';
import { useEffect, useRef, useState } from 'react';
import { Link } from 'react-router-dom';
import { sayProblem } from '#frontend/api/say-problem.ts';
import { BackLink } from '#frontend/components/back-link.tsx';
import { Button } from '#frontend/components/button.tsx';
import { LoadingWash } from '#frontend/components/loading-wash.tsx';
import { PageHeading, PageTitle } from '#frontend/components/page-heading.tsx';
import { ProblemSummary } from '#frontend/components/problem-summary.tsx';
import { accountQueries } from '#frontend/features/account/account.queries.ts';
import { TableForm } from '#frontend/features/tides/table-form.tsx';
import { TableList } from '#frontend/features/tides/table-list.tsx';
import { tidesQueries } from '#frontend/features/tides/tides.queries.ts';
import { counted, sentenceCase } from '#frontend/words/number-words.ts';
import { may } from '#shared/policy/policy.ts';

/** The official tide tables: in force, taken back, and one more. */
export function Component() {
  const { data: account } = useSuspenseQuery(accountQueries.account());
  return (
    <div className="px-4 pt-3.5 pb-10 wide:px-page wide:pb-14">
      <PageTitle>Tide tables</PageTitle>
      <BackLink to="/shores">Shores</BackLink>
      <PageHeading>Tide tables</PageHeading>
      {may(account.person?.roles ?? null, 'tide-table.see') ? (
        <Tables zone={account.group.zone} />
      ) : (
        <p className="mt-3 text-ui">
          Coordinators and administrators look after the official tide tables.{' '}
          <Link to="/shores">See the shores</Link>
        </p>
      )}
    </div>
  );
}

/** What was done last; the number tells a second time from the first. */
interface Done {
  readonly number: number;
  readonly words: string;
}

function Tables({ zone }: { zone: string }) {
  const tables = useQuery(tidesQueries.tables());
  const queryClient = useQueryClient();
  const [done, setDone] = useState<Done>({ number: 0, words: '' });
  const [accepted, setAccepted] = useState(0);
  const said = useRef<HTMLParagraphElement>(null);
  useEffect(() => {
    // What was pressed is gone by then, so the focus goes to what has come of it.
    if (done.number > 0) said.current?.focus();
  }, [done.number]);
  const tell = (words: string): void => {
    setDone(({ number }) => ({ number: number + 1, words }));
    // A table changes the water wherever it is shown.
    void queryClient.invalidateQueries({ predicate: ({ queryKey }) => queryKey[0] !== 'account' });
  };
  return (
    <>
      <p ref={said} tabIndex={-1} role="status" className="mt-1 text-ui font-medium outline-none">
        {done.words}
      </p>
      {tables.data !== undefined && (
        <>
          <TableList
            tables={tables.data.tables}
            zone={zone}
            onTakenBack={(name) => tell(`${name} is taken back. The prediction counts again.`)}
          />
          {tables.data.stations.length === 0 ? (
            <p className="mt-6 text-ui">
              A table belongs to the tide station of a shore, and there is no shore yet.{' '}
              <Link to="/shores">See the shores</Link>
            </p>
          ) : (
            <TableForm
              key={accepted}
              stations={tables.data.stations}
              onAccepted={({ name, moved }) => {
                setAccepted((before) => before + 1);
                tell(`${name} is in force.${movedInWords(moved)}`);
              }}
            />
          )}
        </>
      )}
      {tables.data === undefined && tables.error === null && <LoadingWash what="the tide tables" />}
      {tables.data === undefined && tables.error !== null && (
        <ProblemSummary title="The tide tables could not be loaded.">
          <p className="mb-2">{sayProblem(tables.error)}</p>
          <Button look="line" onPress={() => void tables.refetch()}>
            Try again
          </Button>
        </ProblemSummary>
      )}
    </>
  );
}

function movedInWords(moved: number): string {
  if (moved === 0) return ' Sessions keep their times.';
  return ` ${sentenceCase(counted(moved, 'session'))} moved.`;
}
