import type {
  DayCellContentArg,
  EventClickArg,
  EventContentArg,
  EventInput,
} from '@fullcalendar/core';
import dayGridPlugin from '@fullcalendar/daygrid';
import FullCalendar from '@fullcalendar/react';
import type { KeyboardEvent, MouseEvent } from 'react';
import { useEffect, useMemo, useRef } from 'react';
import { useNavigate } from 'react-router-dom';
import { numberWord } from '#frontend/words/number-words.ts';
import type { CalendarSession, CalendarView } from '#shared/contracts/sessions.ts';
import type { CalendarDay } from '#shared/kernel/time.ts';
import { addDays, dayAt, daysBetween, fromIso, startOfMonth } from '#shared/kernel/time.ts';
import { weeksOf } from './calendar-address.ts';
import { MonthCell, stakeOf, WeekGutter } from './month-cell.tsx';
import type { DayFacts, DayScale } from './month-days.ts';
import { daysOf, dayScale } from './month-days.ts';
import { SessionSign } from './session-sign.tsx';
import { WeekFloor } from './week-floor.tsx';
import './month-grid.css';

const MOST_SIGNS = 2;
const plugins = [dayGridPlugin];
const dayHeaderFormat = { weekday: 'long' } as const;
const arrowDays: Partial<Record<string, number>> = {
  ArrowLeft: -1,
  ArrowRight: 1,
  ArrowUp: -7,
  ArrowDown: 7,
};

interface MonthGridProps {
  readonly monthOn: CalendarDay;
  readonly view: CalendarView;
  /** The sessions to show: those that the filters leave. */
  readonly sessions: readonly CalendarSession[];
  /** A day whose signs all stand, though they are more than two. */
  readonly openedOn: CalendarDay | null;
  readonly addressOfSession: (sessionId: string) => string;
  readonly addressOfDay: (day: CalendarDay) => string;
}

/** What FullCalendar is given to show in a cell: a sign, or the words for those left out. */
type Shown =
  | { readonly kind: 'sign'; readonly session: CalendarSession; readonly isLast: boolean }
  | { readonly kind: 'more'; readonly count: number; readonly withGap: number };

/**
 * The month. FullCalendar keeps its dates, its table and its events; everything seen is ours. All
 * days are plain dates to it, so no time zone but the shore's ever moves a session.
 */
export function MonthGrid(props: MonthGridProps) {
  const { monthOn, view, sessions, openedOn, addressOfSession, addressOfDay } = props;
  const calendar = useRef<FullCalendar>(null);
  const frame = useRef<HTMLDivElement>(null);
  const navigate = useNavigate();
  useEffect(() => {
    // FullCalendar draws synchronously when told to move, which React refuses inside an effect.
    queueMicrotask(() => calendar.current?.getApi().gotoDate(monthOn));
  }, [monthOn]);

  const { days, scale, shown, events } = useMemo(() => {
    const { from, to } = weeksOf(monthOn);
    const facts = daysOf(view, sessions, from, to);
    const signs = shownOf(facts, openedOn);
    return {
      days: facts,
      scale: dayScale(view, from, to),
      shown: new Map(signs.map(({ id, what }) => [id, what])),
      events: signs.map(({ id, on, order, what }): EventInput => ({
        id,
        start: on,
        allDay: true,
        order,
        url: what.kind === 'sign' ? addressOfSession(what.session.id) : addressOfDay(on),
      })),
    };
  }, [monthOn, view, sessions, openedOn, addressOfSession, addressOfDay]);

  const follow = ({ jsEvent, event }: EventClickArg): void => {
    if (opensElsewhere(jsEvent)) return;
    jsEvent.preventDefault();
    void navigate(event.url);
  };
  return (
    // The cells take the focus by arrow only, from the links in them: the frame itself is no control.
    // eslint-disable-next-line jsx-a11y/no-static-element-interactions
    <div
      ref={frame}
      className="month pl-gutter"
      onKeyDown={(event) => moveByDay(event, frame.current)}
    >
      <FullCalendar
        ref={calendar}
        plugins={plugins}
        initialView="dayGridMonth"
        initialDate={monthOn}
        now={view.today}
        timeZone="UTC"
        firstDay={1}
        fixedWeekCount={false}
        headerToolbar={false}
        height="auto"
        dayHeaderFormat={dayHeaderFormat}
        eventOrder="order"
        events={events}
        eventClick={follow}
        dayCellClassNames={({ date }) => (dayOfCell(date).endsWith('-01') ? 'is-first' : '')}
        dayCellDidMount={({ el }) => {
          el.tabIndex = -1;
        }}
        dayCellContent={(cell) => cellContent(cell, days, scale, view, monthOn)}
        eventContent={(event) => eventContent(event, shown, scale)}
      />
    </div>
  );
}

function cellContent(
  { date }: DayCellContentArg,
  days: readonly DayFacts[],
  scale: DayScale,
  view: CalendarView,
  monthOn: CalendarDay,
) {
  const on = dayOfCell(date);
  const index = daysBetween(scale.from, on);
  const day = days[index];
  if (day === undefined) return null;
  const week = days.slice(index, index + 7);
  return (
    <>
      {index % 7 === 0 && (
        <span aria-hidden>
          <WeekFloor scale={scale} mondayAt={index} days={week} />
          <WeekGutter days={week} />
        </span>
      )}
      <MonthCell
        day={day}
        scale={scale}
        isOfMonth={startOfMonth(on) === monthOn}
        isFirstCell={index === 0}
        nowAt={on === view.today ? fromIso(view.now) : null}
      />
    </>
  );
}

function eventContent(
  { event }: EventContentArg,
  shown: ReadonlyMap<string, Shown>,
  scale: DayScale,
) {
  const what = shown.get(event.id);
  if (what === undefined) return null;
  if (what.kind === 'sign') {
    const { leftPercent } = stakeOf(scale, what.session);
    return <SessionSign session={what.session} leftPercent={leftPercent} isLast={what.isLast} />;
  }
  return (
    <span className="session-more">
      {`and ${numberWord(what.count)} more${what.withGap === 0 ? '' : `, ${numberWord(what.withGap)} with a gap`}`}
    </span>
  );
}

/** Two signs share a stake; where there are more, one stands and words stand for the rest. */
function shownOf(
  days: readonly DayFacts[],
  openedOn: CalendarDay | null,
): { id: string; on: CalendarDay; order: number; what: Shown }[] {
  return days.flatMap(({ on, sessions }) => {
    const isWhole = sessions.length <= MOST_SIGNS || on === openedOn;
    const standing = isWhole ? sessions : sessions.slice(0, 1);
    const rest = isWhole ? [] : sessions.slice(1);
    const signs = standing.map((session, order) => ({
      id: session.id,
      on,
      order,
      what: { kind: 'sign', session, isLast: order === sessions.length - 1 } satisfies Shown,
    }));
    if (rest.length === 0) return signs;
    const withGap = rest.filter(({ slots }) => slots.some(({ state }) => state === 'gap')).length;
    const more = { kind: 'more', count: rest.length, withGap } satisfies Shown;
    return [...signs, { id: `more-${on}`, on, order: signs.length, what: more }];
  });
}

/** Arrows go from day to day within the month shown; Enter opens a day's first session. */
function moveByDay(event: KeyboardEvent, frame: HTMLElement | null): void {
  const cell = (event.target as Element).closest<HTMLElement>('td[data-date]');
  if (cell === null || frame === null) return;
  const days = arrowDays[event.key];
  if (days !== undefined) {
    const on = addDays(cell.dataset['date'] as CalendarDay, days);
    const next = frame.querySelector<HTMLElement>(`td[data-date="${on}"]`);
    if (next === null) return;
    event.preventDefault();
    next.focus();
  } else if (event.key === 'Enter' && event.target === cell) {
    cell.querySelector<HTMLElement>('a[href]')?.click();
  }
}

function dayOfCell(date: Date): CalendarDay {
  return dayAt(date.getTime(), 'UTC');
}

function opensElsewhere(event: globalThis.MouseEvent | MouseEvent): boolean {
  return event.button !== 0 || event.metaKey || event.ctrlKey || event.shiftKey || event.altKey;
}
