import type { TablePreview } from '#shared/contracts/tide-tables.ts';
import { addDays, formatDay, fromIso } from '#shared/kernel/time.ts';
import { printedAt, zoneInWords } from './zone-words.ts';

type Day = TablePreview['clockChanges'][number];

/**
 * The days round each clock change as the table was read, in the zone that it is printed in, to be
 * held against the printed page: a table read in the wrong zone is an hour off on one side.
 */
export function ClockChanges({ days, zone }: { days: readonly Day[]; zone: string }) {
  const runs = runsOf(days).filter((run) => run.some(({ events }) => events.length > 0));
  if (runs.length === 0) return null;
  return (
    <section aria-labelledby="clock-changes" className="mt-5">
      <h4 id="clock-changes" className="font-semibold">
        Hold these days against the printed page
      </h4>
      <p className="text-ui">
        {`The clocks change round them. Times as the page should show them, in ${zoneInWords(zone)}.`}
      </p>
      {runs.map((run) => (
        <div
          key={run[0]?.on}
          className="mt-2 grid gap-x-10 gap-y-3 border-t border-hair pt-2 wide:grid-cols-3"
        >
          {run.map((day) => (
            <PrintedDay key={day.on} day={day} zone={zone} />
          ))}
        </div>
      ))}
    </section>
  );
}

function PrintedDay({ day, zone }: { day: Day; zone: string }) {
  return (
    <table className="w-full max-w-72 text-ui tabular-nums">
      <caption className="text-left">
        <b>{formatDay(day.on, 'short')}</b>{' '}
        <span className="text-sm text-barnacle">
          {[
            ...(day.zoneName === '' ? [] : [day.zoneName]),
            ...(day.isChangeDay ? ['the clocks change'] : []),
          ].join(', ')}
        </span>
      </caption>
      <thead className="sr-only">
        <tr>
          <th scope="col">Time</th>
          <th scope="col">Water</th>
          <th scope="col">Height</th>
        </tr>
      </thead>
      <tbody>
        {day.events.map(({ at, kind, heightM }) => (
          <tr key={at}>
            <td className="font-semibold">{printedAt(fromIso(at), zone).clock}</td>
            <td className={kind === 'low' ? '' : 'text-barnacle'}>{kind}</td>
            <td className="text-right">{heightM.toFixed(2).replace('-', '−')} m</td>
          </tr>
        ))}
      </tbody>
    </table>
  );
}

/** Days that follow one another, together. */
function runsOf(days: readonly Day[]): Day[][] {
  const runs: Day[][] = [];
  for (const day of days) {
    const run = runs.at(-1);
    const last = run?.at(-1);
    if (run !== undefined && last !== undefined && addDays(last.on, 1) === day.on) run.push(day);
    else runs.push([day]);
  }
  return runs;
}
