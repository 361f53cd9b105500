import { TideCredit } from '#frontend/components/tide-credit.tsx';
import type { ReactNode } from 'react';
import { Link } from 'react-router-dom';
import { Limpet } from '#frontend/components/limpet.tsx';
import type { LimpetLook } from '#frontend/components/limpet.tsx';
import { useMeasuredWidth } from '#frontend/components/use-measured-width.ts';
import { readCurve } from '#frontend/components/water-curve.ts';
import { WaterLine } from '#frontend/components/water-line.tsx';
import { clockOfWater, metres } from '#frontend/words/tide-words.ts';
import { sentenceCase } from '#frontend/words/number-words.ts';
import type { CalendarSession, CalendarView } from '#shared/contracts/sessions.ts';
import { addDays, clockAt, formatDay, fromIso, startOfDay, zoneName } from '#shared/kernel/time.ts';
import { inDoubtOfYours, nextOfYours, openSlots } from './open-slots.ts';
import { timesOf } from './session-times.ts';

const MOST_OPEN = 3;

/** The reader's next session, with the day's water and the times to keep. */
export function NextSession({ view }: { view: CalendarView }) {
  const session = nextOfYours(view.sessions);
  return (
    <section>
      <h2>Your next session</h2>
      {session === null ? (
        <p className="mt-1">You are on no crew in the coming six weeks.</p>
      ) : (
        <NextSessionFacts view={view} session={session} />
      )}
    </section>
  );
}

function NextSessionFacts({ view, session }: { view: CalendarView; session: CalendarSession }) {
  const kinds = session.slots.filter(({ isYours }) => isYours).map((slot) => slot.slotKindName);
  const clock = (iso: string): string => clockAt(fromIso(iso), session.zone);
  return (
    <>
      <Link
        className="mt-1 mb-2 block text-md font-semibold"
        to={`/sessions/${session.id}`}
      >{`${session.shoreName}, ${formatDay(session.dayOn, 'long')}`}</Link>
      <NextWater view={view} session={session} />
      <dl className="mt-2">
        <Fact
          name="You are"
          value={<b className="text-kelp">{kinds.join(', ').toLowerCase()}</b>}
        />
        <Fact name="On the shore" value={clock(session.startsAt)} />
        <Fact
          name="Off the shore by"
          value={<b>{clock(session.offTheShoreBy ?? session.endsAt)}</b>}
        />
      </dl>
      <p className="mt-1 text-xs text-barnacle">
        Times in {zoneName(fromIso(session.startsAt), session.zone)}
      </p>
    </>
  );
}

function Fact({ name, value }: { name: string; value: ReactNode }) {
  return (
    <div className="flex justify-between gap-3 py-0.5">
      <dt className="text-barnacle">{name}</dt>
      <dd className="text-right tabular-nums">{value}</dd>
    </div>
  );
}

function NextWater({ view, session }: { view: CalendarView; session: CalendarSession }) {
  const [ref, widthPx] = useMeasuredWidth<HTMLDivElement>();
  const { homeShore } = view;
  const { lowWaterAt, lowWaterHeightM, offTheShoreBy, zone, dayOn } = session;
  if (homeShore === null || lowWaterAt === null || lowWaterHeightM === null) return null;
  const lowAt = fromIso(lowWaterAt);
  return (
    <div ref={ref}>
      {widthPx !== null && widthPx > 0 && (
        <WaterLine
          curve={readCurve(homeShore.curve)}
          axis={homeShore.axis}
          fromAt={startOfDay(dayOn, zone)}
          untilAt={startOfDay(addDays(dayOn, 1), zone)}
          widthPx={widthPx}
          heightPx={86}
          label={`Water line at ${homeShore.name}. Low water for the session ${clockOfWater(lowAt, zone)}, ${metres(lowWaterHeightM)} metres.`}
          sand={{
            fromAt: fromIso(session.startsAt),
            untilAt: fromIso(offTheShoreBy ?? session.endsAt),
          }}
          caption={{
            at: lowAt,
            clock: clockOfWater(lowAt, zone),
            height: `${metres(lowWaterHeightM)} m`,
          }}
        />
      )}
    </div>
  );
}

/** What needs the reader now: their slots in doubt, then the slots that they may take. */
export function WhatNeedsYou({ view }: { view: CalendarView }) {
  const doubts = inDoubtOfYours(view.sessions);
  const open = openSlots(view.sessions).slice(0, MOST_OPEN);
  return (
    <section className="mt-5">
      <h2>What needs you</h2>
      {doubts.length === 0 && open.length === 0 && (
        <p className="mt-1">Nothing in the coming six weeks.</p>
      )}
      {doubts.length > 0 && (
        <NeedList
          heading="On the crew"
          items={doubts.map((session) => ({
            id: session.id,
            session,
            words: `Your slot is in doubt, ${session.shoreName}`,
          }))}
        />
      )}
      {open.length > 0 && (
        <NeedList
          heading="You may take"
          items={open.map(({ session, slotId, slotKindName }) => ({
            id: slotId,
            session,
            words: `${sentenceCase(slotKindName)}, ${session.shoreName}`,
          }))}
        />
      )}
    </section>
  );
}

function NeedList(props: {
  readonly heading: string;
  readonly items: readonly { id: string; session: CalendarSession; words: string }[];
}) {
  return (
    <>
      <h3 className="mt-1.5 font-medium text-barnacle">{props.heading}</h3>
      <ul>
        {props.items.map(({ id, session, words }) => (
          <li key={id} className="border-b border-hair pt-1 pb-1.5 last:border-0">
            <Link className="block py-0.5 font-semibold" to={`/sessions/${session.id}`}>
              {words}
            </Link>
            <span className="block text-barnacle tabular-nums">
              {formatDay(session.dayOn, 'short')}, {timesOf(session)}
            </span>
          </li>
        ))}
      </ul>
    </>
  );
}

const limpetKey: readonly (readonly [LimpetLook, string])[] = [
  ['claimed', 'claimed'],
  ['gap', 'gap'],
  ['in-doubt', 'in doubt'],
  ['yours', 'yours'],
];

/** How to read the calendar, and what its water is worth. */
export function CalendarKey({ view }: { view: CalendarView }) {
  return (
    <section className="mt-4 border-t border-hair pt-2.5 text-xs text-barnacle">
      <h2 className="sr-only">How to read the calendar</h2>
      <div className="grid grid-cols-[auto_auto] justify-start gap-x-4.5 gap-y-1">
        {limpetKey.map(([look, words]) => (
          <p key={look} className="flex items-center gap-2">
            <Limpet look={look} />
            {words}
          </p>
        ))}
        <p className="col-span-2 flex items-center gap-2">
          <span className="mx-px h-3.25 w-3 border-x border-sand-edge bg-sand" aria-hidden />
          working window
        </p>
        <p className="col-span-2">
          <span className="tabular-nums" aria-hidden>
            <b className="text-ink">10:22</b> 0.6
          </span>{' '}
          daylight low water, metres, times in {zoneName(fromIso(view.now), view.zone)}
        </p>
      </div>
      <TideCaution view={view} />
    </section>
  );
}

/** Where the calendar's water comes from, and who decides. */
export function TideCaution({ view }: { view: CalendarView }) {
  if (view.homeShore === null) return <p className="mt-2">No tide data covers these days.</p>;
  const { name, source } = view.homeShore;
  return (
    <div className="mt-2">
      <TideCredit shown={`The water at ${name}`} source={source} />
    </div>
  );
}
