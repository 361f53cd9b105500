import type { z } from 'zod';
import {
  presentAxis,
  presentCurve,
  presentExtreme,
  presentHeightM,
  presentSource,
} from '#backend/features/tides/tides.presenter.ts';
import { presentSlot } from '#backend/features/slots/slots.presenter.ts';
import type { CalendarSession, CalendarView, SessionView } from '#shared/contracts/sessions.ts';
import { trailEntry } from '#shared/contracts/sessions.ts';
import type { NoWindowReason } from '#shared/domain/tides/working-window.ts';
import type { Instant } from '#shared/kernel/time.ts';
import { toIso } from '#shared/kernel/time.ts';
import type { CalendarSeen } from './see-calendar.ts';
import type { SessionSeen } from './see-session.ts';

/** A session as the person who asked sees it. */
export function presentSession(seen: SessionSeen): SessionView {
  const { session, shore, water, slots, crew, now } = seen;
  return {
    id: session.id,
    kind: session.kind,
    title: session.title,
    state: session.state,
    dayOn: session.firstDayOn,
    shore: {
      id: shore.id,
      name: shore.name,
      zone: session.zone,
      meetingPlace: shore.meetingPlace,
      latitude: shore.latitude,
      longitude: shore.longitude,
    },
    crewMeetsAt: toIso(session.crewMeetsAt),
    partyMeetsAt: toIso(session.partyMeetsAt),
    startsAt: toIso(session.startsAt),
    lowWaterAt: orNull(session.lowWaterAt),
    lowWaterHeightM: heightOrNull(session.lowWaterHeightM),
    lowerShoreClearBy: orNull(session.lowerShoreClearBy),
    offTheShoreBy: orNull(session.offTheShoreBy),
    endsAt: toIso(session.endsAt),
    water:
      water === null
        ? null
        : {
            axis: presentAxis(shore),
            curve: presentCurve(water.curve),
            extremes: water.extremes.map(presentExtreme),
            sunriseAt: orNull(water.sun.sunriseAt),
            sunsetAt: orNull(water.sun.sunsetAt),
            source: presentSource(water.tide, session.crewMeetsAt, session.endsAt),
          },
    slots: slots.map((slot) => presentSlot(slot, crew, now)),
    trail: presentTrail(seen.trail),
  };
}

const shownActions: ReadonlySet<string> = new Set(trailEntry.shape.action.options);

function presentTrail(lines: SessionSeen['trail']): SessionView['trail'] {
  return lines
    .filter(({ action }) => shownActions.has(action))
    .map((line) => ({
      at: toIso(line.at),
      actorName: line.actorName,
      action: line.action as z.input<typeof trailEntry>['action'],
      slotKindName: line.slotKindName,
    }));
}

/** The month as the person who asked sees it. */
export function presentCalendar(seen: CalendarSeen): CalendarView {
  const { zone, now, todayOn, shores, sessions } = seen;
  return {
    zone,
    today: todayOn,
    now: toIso(now),
    homeShore: presentHomeShore(seen),
    shores: shores.map(({ id, name }) => ({ id, name })),
    sessions: sessions.map((session): CalendarSession => ({
      id: session.id,
      title: session.title,
      shoreId: session.shoreId,
      shoreName: shores.find(({ id }) => id === session.shoreId)?.name ?? session.title,
      zone: session.zone,
      state: session.state,
      dayOn: session.firstDayOn,
      startsAt: toIso(session.startsAt),
      lowWaterAt: orNull(session.lowWaterAt),
      lowWaterHeightM: heightOrNull(session.lowWaterHeightM),
      offTheShoreBy: orNull(session.offTheShoreBy),
      endsAt: toIso(session.endsAt),
      hasStarted: now >= session.crewMeetsAt,
      hasEnded: now >= session.endsAt,
      slots: presentCalendarSlots(seen, session.id),
    })),
  };
}

function presentCalendarSlots(seen: CalendarSeen, sessionId: string): CalendarSession['slots'] {
  return seen.slots
    .filter(({ session }) => session.id === sessionId)
    .map((facts) => {
      const slot = presentSlot(facts, seen.crew, seen.now);
      return {
        id: slot.id,
        slotKindName: slot.slotKindName,
        state: slot.state,
        isYours: slot.isYours,
        mayClaim: slot.claim?.isGranted === true,
      };
    });
}

const whyNotWords = {
  'no-low-water': 'no-low-water',
  dark: 'dark',
  'too-high': 'too-high',
  'cut-off-at-low-water': 'too-high',
  'out-of-hours': 'out-of-hours',
  'too-short': 'too-short',
  'off-the-shore-before-low-water': 'too-short',
} as const satisfies Record<NoWindowReason['why'], string>;

function presentHomeShore(seen: CalendarSeen): CalendarView['homeShore'] {
  const home = seen.shores[0];
  const water = seen.homeWater;
  if (home === undefined || water === null) return null;
  return {
    id: home.id,
    name: home.name,
    axis: presentAxis(home),
    source: presentSource(
      water.tide,
      water.curve[0]?.at ?? seen.now,
      water.curve.at(-1)?.at ?? seen.now,
    ),
    curve: presentCurve(water.curve),
    days: water.days.map((day) => ({
      on: day.on,
      daylightLow: day.daylightLow === null ? null : presentExtreme(day.daylightLow),
      isUsable: day.whyNot === null,
      whyNot: day.whyNot === null ? null : whyNotWords[day.whyNot[0].why],
    })),
    tideMarks: water.marks.map(({ on, kind, rangeM }) => ({
      on,
      kind,
      rangeM: presentHeightM(rangeM),
    })),
  };
}

function orNull(at: Instant | null): string | null {
  return at === null ? null : toIso(at);
}

function heightOrNull(heightM: number | null): number | null {
  return heightM === null ? null : presentHeightM(heightM);
}
