import type { z } from 'zod';
import {
  presentAxis,
  presentCurve,
  presentExtreme,
  presentHeightM,
  presentSource,
} from '#backend/features/tides/tides.presenter.ts';
import type { Actor } from '#backend/http/route.ts';
import type {
  seeAccount as seeAccountContract,
  seeFrontDoor as seeFrontDoorContract,
} from '#shared/contracts/account.ts';
import type { Instant } from '#shared/kernel/time.ts';
import { toIso } from '#shared/kernel/time.ts';
import type { ShoreToday } from './see-account.ts';
import type { FrontDoorSeen } from './see-front-door.ts';

type AccountView = z.input<typeof seeAccountContract.reply>;
type FrontDoorView = z.input<typeof seeFrontDoorContract.reply>;

interface Group {
  readonly name: string;
  readonly zone: string;
}

export function presentAccount(
  group: Group,
  actor: Actor | null,
  now: Instant,
  today: ShoreToday | null,
): AccountView {
  return {
    group: { name: group.name, zone: group.zone },
    now: toIso(now),
    person:
      actor === null ? null : { id: actor.personId, name: actor.name, roles: [...actor.roles] },
    homeShoreToday:
      today === null
        ? null
        : {
            shoreName: today.shore.name,
            zone: today.shore.zone,
            lowWater: today.lowWater === null ? null : presentExtreme(today.lowWater),
            axis: presentAxis(today.shore),
            curve: presentCurve(today.curve),
          },
  };
}

export function presentFrontDoor(group: Group, seen: FrontDoorSeen): FrontDoorView {
  return {
    group: { name: group.name, zone: group.zone },
    shoreNames: seen.shores.map(({ name }) => name),
    nextSession: presentNext(seen.next),
    fortnight: presentFortnight(seen.fortnight),
  };
}

function presentNext(next: FrontDoorSeen['next']): FrontDoorView['nextSession'] {
  if (next === null) return null;
  const { session, shore, curve } = next;
  const { lowWaterAt, lowWaterHeightM, offTheShoreBy } = session;
  if (lowWaterAt === null || lowWaterHeightM === null || offTheShoreBy === null) return null;
  return {
    shoreName: shore.name,
    zone: session.zone,
    state: session.state === 'stood-down' ? 'stood-down' : 'on',
    partyMeetsAt: toIso(session.partyMeetsAt),
    startsAt: toIso(session.startsAt),
    lowWaterAt: toIso(lowWaterAt),
    lowWaterHeightM: presentHeightM(lowWaterHeightM),
    offTheShoreBy: toIso(offTheShoreBy),
    axis: presentAxis(shore),
    curve: presentCurve(curve),
  };
}

function presentFortnight(fortnight: FrontDoorSeen['fortnight']): FrontDoorView['fortnight'] {
  if (fortnight === null) return null;
  const { shore, tide, curve, sessions, marks } = fortnight;
  const [fromAt, toAt] = [curve[0]?.at ?? 0, curve.at(-1)?.at ?? 0];
  const ofKind = (kind: 'springs' | 'neaps') =>
    marks
      .filter((mark) => mark.kind === kind)
      .map(({ at, rangeM }) => ({ at: toIso(at), rangeM: presentHeightM(rangeM) }));
  return {
    zone: shore.zone,
    axis: presentAxis(shore),
    source: presentSource(tide, fromAt, toAt),
    curve: presentCurve(curve),
    sessions: sessions.flatMap(({ startsAt, lowWaterAt, offTheShoreBy }) =>
      lowWaterAt === null || offTheShoreBy === null
        ? []
        : [
            {
              startsAt: toIso(startsAt),
              lowWaterAt: toIso(lowWaterAt),
              offTheShoreBy: toIso(offTheShoreBy),
            },
          ],
    ),
    springs: ofKind('springs'),
    neaps: ofKind('neaps'),
  };
}
