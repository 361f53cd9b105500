import { useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { Link, useSearchParams } from 'react-router-dom';
import { Button } from '#frontend/components/button.tsx';
import { LoadingWash } from '#frontend/components/loading-wash.tsx';
import { PageHeading, PageTitle } from '#frontend/components/page-heading.tsx';
import { TideCaution } from '#frontend/features/sessions/beside-month.tsx';
import {
  changedAddress,
  filtered,
  monthInAddress,
  strandSpan,
} from '#frontend/features/sessions/calendar-address.ts';
import { daysOf } from '#frontend/features/sessions/month-days.ts';
import { openSlots } from '#frontend/features/sessions/open-slots.ts';
import { timesOf } from '#frontend/features/sessions/session-times.ts';
import {
  putSlot,
  refreshSessions,
  sessionsQueries,
} from '#frontend/features/sessions/sessions.queries.ts';
import { StrandList } from '#frontend/features/sessions/strand-list.tsx';
import { ClaimButton } from '#frontend/features/slots/claim-button.tsx';
import { counted, sentenceCase } from '#frontend/words/number-words.ts';
import type { CalendarView } from '#shared/contracts/sessions.ts';
import { addMonths, formatDay, fromIso, zoneName } from '#shared/kernel/time.ts';
import type { CalendarProps } from './calendar-parts.tsx';
import { addressOfSession, Filters, NotLoaded } from './calendar-parts.tsx';

const MOST_OPEN = 3;

/** The strand list, and before it what the reader may take. */
export function CalendarStrand({ address, today }: CalendarProps) {
  const { from, to } = strandSpan(address.monthOn, today);
  const [search] = useSearchParams();
  const calendar = useQuery(sessionsQueries.calendar(from, to));
  const later = addMonths(address.monthOn, 1);
  return (
    <>
      <PageTitle>Strand list</PageTitle>
      <div className="px-4 pt-0.5 pb-2">
        <PageHeading>Strand list</PageHeading>
      </div>
      {calendar.isPending && <LoadingWash what="the days" />}
      {calendar.error !== null && calendar.data === undefined && (
        <div className="px-4">
          <NotLoaded error={calendar.error} onRetry={() => void calendar.refetch()} />
        </div>
      )}
      {calendar.data !== undefined && (
        <>
          <MayTake view={calendar.data} />
          <div className="px-4 pt-4 pb-3">
            <Filters view={calendar.data} address={address} />
          </div>
          <StrandList
            days={daysOf(calendar.data, filtered(calendar.data.sessions, address), from, to)}
            today={today}
            zone={calendar.data.zone}
          />
          <div className="px-4 py-4 text-sm text-barnacle">
            <p>
              <Link
                className="inline-flex min-h-target items-center text-md"
                to={changedAddress(search, 'month', monthInAddress(later))}
              >
                On to {formatDay(later, 'monthYear')}
              </Link>
            </p>
            <p>Times in {zoneName(fromIso(calendar.data.now), calendar.data.zone)}.</p>
            <TideCaution view={calendar.data} />
          </div>
        </>
      )}
    </>
  );
}

/** What the reader may take, each to be claimed on the spot; the first three, then all on demand. */
function MayTake({ view }: { view: CalendarView }) {
  const [isWhole, setIsWhole] = useState(false);
  const queryClient = useQueryClient();
  const open = openSlots(view.sessions);
  const rest = open.length - MOST_OPEN;
  return (
    <section aria-labelledby="may-take" className="mx-4">
      <h2 id="may-take" className="border-b-[1.5px] border-ink pb-1.5">
        Sessions you may take
      </h2>
      {open.length === 0 && <p className="py-2 text-ui">None in the coming six weeks.</p>}
      <ul>
        {(isWhole ? open : open.slice(0, MOST_OPEN)).map(({ session, slotId, slotKindName }) => (
          <li
            key={slotId}
            className="flex items-center justify-between gap-3 border-b border-hair py-2"
          >
            <div className="min-w-0">
              <h3>
                <Link className="block py-0.5 text-ink" to={addressOfSession(session.id)}>
                  {formatDay(session.dayOn, 'short')}, {session.shoreName}
                </Link>
              </h3>
              <p className="text-ui leading-snug text-barnacle">
                {slotKindName.toLowerCase()},{' '}
                <span className="tabular-nums">{timesOf(session)}</span>
              </p>
            </div>
            <ClaimButton
              slotId={slotId}
              whole={`${slotKindName.toLowerCase()}, ${session.shoreName}, ${formatDay(session.dayOn, 'dayMonth')}`}
              on={{
                onChanged: (slot) => {
                  putSlot(queryClient, session.id, slot);
                  void refreshSessions(queryClient);
                },
                onRefused: () => void refreshSessions(queryClient),
              }}
            />
          </li>
        ))}
      </ul>
      {rest > 0 && !isWhole && (
        <Button look="plain" onPress={() => setIsWhole(true)}>
          {sentenceCase(counted(rest, 'more', 'more'))}
        </Button>
      )}
    </section>
  );
}
