import { Tick } from '#frontend/components/tick.tsx';
import { counted } from '#frontend/words/number-words.ts';
import { clockOfWater, metres } from '#frontend/words/tide-words.ts';
import type { TablePreview } from '#shared/contracts/tide-tables.ts';
import { clockAt, dayAt, formatDay, fromIso, zoneName } from '#shared/kernel/time.ts';

type Moved = TablePreview['movedSessions'][number];

const FEW_MINUTES = 5;

/**
 * The sessions whose low water the table moves, those by more than five minutes first. None moves
 * unless its box is ticked.
 */
export function MovedSessions(props: {
  readonly sessions: readonly Moved[];
  readonly ticked: readonly string[];
  readonly onTick: (ticked: readonly string[]) => void;
}) {
  const { sessions, ticked, onTick } = props;
  const far = sessions.filter(isFar);
  const near = sessions.filter((session) => !isFar(session));
  const rows = (some: readonly Moved[]) => (
    <ul className="mt-1">
      {some.map((session) => (
        <MovedSession
          key={session.sessionId}
          session={session}
          isTicked={ticked.includes(session.sessionId)}
          onTick={(isTicked) =>
            onTick(
              isTicked
                ? [...ticked, session.sessionId]
                : ticked.filter((id) => id !== session.sessionId),
            )
          }
        />
      ))}
    </ul>
  );
  return (
    <section aria-labelledby="moved-sessions" className="mt-5">
      <h4 id="moved-sessions" className="font-semibold">
        Sessions whose low water moves
      </h4>
      {far.length === 0 && (
        <p className="text-ui">{`No session's low water moves by more than five minutes.`}</p>
      )}
      {far.length > 0 && rows(far)}
      {near.length > 0 && (
        <details className="mt-2 text-ui">
          <summary className="min-h-7 cursor-pointer font-medium text-deep max-wide:min-h-target">
            {`${counted(near.length, 'session')} by five minutes or less`}
          </summary>
          {rows(near)}
        </details>
      )}
    </section>
  );
}

function isFar({ movedMinutes }: Moved): boolean {
  return movedMinutes === null || Math.abs(movedMinutes) > FEW_MINUTES;
}

function MovedSession(props: {
  readonly session: Moved;
  readonly isTicked: boolean;
  readonly onTick: (isTicked: boolean) => void;
}) {
  const { session, isTicked, onTick } = props;
  const { title, shoreName, zone, newStartsAt, newOffTheShoreBy } = session;
  const day = formatDay(dayAt(fromIso(session.fromLowWaterAt), zone), 'short');
  const clock = (iso: string): string => clockAt(fromIso(iso), zone);
  return (
    <li className="flex items-start gap-x-6 gap-y-1 border-hair py-2 max-wide:flex-col-reverse [li+&]:border-t">
      <div className="wide:w-24 wide:flex-none">
        {newStartsAt !== null && (
          <Tick
            words="Move it"
            spoken={`to the new times: ${shoreName}, ${day}`}
            isTicked={isTicked}
            onChange={onTick}
          />
        )}
      </div>
      <div className="min-w-0 text-ui tabular-nums">
        <p>
          <b>{`${shoreName}, ${day}`}</b>
          {`, ${title}`}
        </p>
        <p>{moveInWords(session)}</p>
        {newStartsAt === null && (
          <p className="font-medium text-wrack">No working window is left: it keeps its times.</p>
        )}
        {newStartsAt !== null && newOffTheShoreBy !== null && (
          <p className="text-barnacle">
            {`New times: on the shore ${clock(newStartsAt)}, off the shore by ${clock(newOffTheShoreBy)}`}
          </p>
        )}
      </div>
    </li>
  );
}

function moveInWords(session: Moved): string {
  const { zone, fromLowWaterAt, toLowWaterAt, movedMinutes, heightChangeM } = session;
  const fromAt = fromIso(fromLowWaterAt);
  const from = `Low water ${clockOfWater(fromAt, zone)} ${zoneName(fromAt, zone)}`;
  if (toLowWaterAt === null || movedMinutes === null) {
    return `${from}; the table has no low water near that`;
  }
  const minutes = Math.round(Math.abs(movedMinutes));
  const time = `${minutes} min ${movedMinutes < 0 ? 'earlier' : 'later'}`;
  return `${from}, by the table ${clockOfWater(fromIso(toLowWaterAt), zone)}: ${time}${heightInWords(heightChangeM)}`;
}

function heightInWords(heightChangeM: number | null): string {
  const change = heightChangeM === null ? '0.0' : metres(Math.abs(heightChangeM));
  if (heightChangeM === null || change === '0.0') return '';
  return `, ${change} m ${heightChangeM < 0 ? 'lower' : 'higher'}`;
}
