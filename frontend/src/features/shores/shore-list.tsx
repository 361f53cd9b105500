import { Link } from 'react-router-dom';
import { positionInWords } from '#frontend/words/position-words.ts';
import type { Reply } from '#frontend/api/call.ts';
import { formatDay } from '#shared/kernel/time.ts';

type Listed = Reply<'seeShores'>['shores'][number];

/** Every shore with the tide station that its water comes from and its next usable day. */
export function ShoreList({ shores }: { shores: readonly Listed[] }) {
  return (
    <ul className="mt-4 border-t-[1.5px] border-ink">
      {shores.map((shore) => (
        <li
          key={shore.id}
          className="grid gap-x-8 gap-y-0.5 border-hair py-3 wide:grid-cols-[minmax(0,16rem)_minmax(0,1fr)_minmax(0,15rem)] wide:items-baseline [li+&]:border-t"
        >
          <h2 className="min-w-0">
            <Link
              className="inline-flex items-center max-wide:min-h-target"
              to={`/shores/${shore.id}`}
            >
              {shore.name}
            </Link>
          </h2>
          <p className="text-ui">{stationInWords(shore)}</p>
          <p className="text-ui tabular-nums">
            {shore.nextUsableOn === null ? (
              <span className="text-barnacle">No usable day in the coming 60 days</span>
            ) : (
              <>Next usable day {formatDay(shore.nextUsableOn, 'short')}</>
            )}
          </p>
        </li>
      ))}
    </ul>
  );
}

function stationInWords({ source }: Listed) {
  if (source === null) {
    return <b className="text-anemone">Its tide station can no longer be used</b>;
  }
  return (
    <>
      {source.stationName}, heights above {source.datum}
      <span className="block text-sm text-barnacle tabular-nums">
        {source.table === null
          ? positionInWords(source)
          : `${positionInWords(source)}, official table ${source.table}`}
      </span>
    </>
  );
}
