import { TideCredit } from '#frontend/components/tide-credit.tsx';
import { sentenceCase } from '#frontend/words/number-words.ts';
import { shortDate } from '#frontend/words/day-words.ts';
import type { SessionView } from '#shared/contracts/sessions.ts';
import { clockAt, dayAt, fromIso, zoneName } from '#shared/kernel/time.ts';

/** Where and when people meet, the times to keep, and what the predictions are worth. */
export function SessionAbout({ session }: { session: SessionView }) {
  const { shore } = session;
  const clock = (iso: string): string => clockAt(fromIso(iso), shore.zone);
  return (
    <div className="text-ui">
      <section aria-labelledby="meeting-place">
        <h2 id="meeting-place" className="mb-1.5">
          Meeting place
        </h2>
        <p>
          {shore.meetingPlace.replace(/\.?$/, '.')} Crew{' '}
          <b className="whitespace-nowrap tabular-nums">{clock(session.crewMeetsAt)}</b>, party{' '}
          <b className="whitespace-nowrap tabular-nums">{clock(session.partyMeetsAt)}</b>.
        </p>
      </section>
      <section aria-labelledby="times" className="mt-5.5">
        <h2 id="times" className="mb-1.5">
          Times to keep
        </h2>
        <dl>
          <TimeToKeep name="On the shore" clock={clock(session.startsAt)} />
          {session.lowerShoreClearBy !== null && (
            <TimeToKeep name="Lower shore clear by" clock={clock(session.lowerShoreClearBy)} />
          )}
          {session.offTheShoreBy !== null && (
            <TimeToKeep name="Off the shore by" clock={clock(session.offTheShoreBy)} isMain />
          )}
          <TimeToKeep name="Session ends" clock={clock(session.endsAt)} />
        </dl>
        <p className="mt-1.5 text-sm">
          Times in {zoneName(fromIso(session.startsAt), shore.zone)}.
        </p>
      </section>
      {session.water !== null && <Caution session={session} />}
    </div>
  );
}

function TimeToKeep(props: {
  readonly name: string;
  readonly clock: string;
  readonly isMain?: boolean;
}) {
  return (
    <div
      className={`flex justify-between gap-3 border-b border-hair py-1 ${props.isMain === true ? 'font-semibold' : ''}`}
    >
      <dt>{props.name}</dt>
      <dd className="tabular-nums">{props.clock}</dd>
    </div>
  );
}

function Caution({ session }: { session: SessionView }) {
  if (session.water === null) return null;
  return (
    <section aria-labelledby="predictions" className="mt-5.5">
      <h2 id="predictions" className="mb-1.5">
        About the tides
      </h2>
      <TideCredit shown="The water of this day" source={session.water.source} />
    </section>
  );
}

/** What happened to a session, newest first, in words. */
export function SessionTrail({ session }: { session: SessionView }) {
  return (
    <section aria-labelledby="trail">
      <h2 id="trail" className="mb-1.5">
        Trail
      </h2>
      {session.trail.length === 0 ? (
        <p className="text-sm">Nothing yet.</p>
      ) : (
        <ol className="text-sm">
          {session.trail.map((entry, index) => (
            <li key={index} className="grid grid-cols-[3.75rem_1fr] py-1.5">
              <time className="text-barnacle" dateTime={entry.at}>
                {shortDate(dayAt(fromIso(entry.at), session.shore.zone))}
              </time>
              <p>{trailInWords(entry)}</p>
            </li>
          ))}
        </ol>
      )}
    </section>
  );
}

type TrailEntry = SessionView['trail'][number];

const verbs: Record<TrailEntry['action'], string> = {
  'session.made': 'made this session',
  'slot.claimed': 'claimed',
  'slot.released': 'released',
};

function trailInWords({ actorName, action, slotKindName }: TrailEntry): string {
  const slot = slotKindName === null ? '' : ` ${slotKindName.toLowerCase()}`;
  return sentenceCase(`${actorName ?? 'the system'} ${verbs[action]}${slot}.`);
}
