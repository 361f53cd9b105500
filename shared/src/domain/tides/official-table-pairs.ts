import type { TideExtreme } from './tide-curve.ts';

/** An event of a table and the predicted extreme that it is. */
export interface EventPair<Event extends TideExtreme = TideExtreme> {
  readonly event: Event;
  readonly predicted: TideExtreme;
}

/** Half of the time between a high and a low water; further apart, two are not the same tide. */
const PAIRED_WITHIN_MS = 3 * 3_600_000;

/**
 * Pairs each event with the predicted extreme of its kind that is nearest to it and has no nearer
 * event itself, so that pairs follow one another in both. Both must be in order of time. With
 * laterMs the table is taken to be that much late throughout.
 */
export function pairsOf<Event extends TideExtreme>(
  events: readonly Event[],
  predicted: readonly TideExtreme[],
  laterMs = 0,
): EventPair<Event>[] {
  const pairs = (['high', 'low'] as const).flatMap((kind) => {
    const ours = events.filter((event) => event.kind === kind);
    const theirs = predicted.filter((extreme) => extreme.kind === kind);
    return mutual(ours, theirs, laterMs);
  });
  pairs.sort((a, b) => a.event.at - b.event.at);
  const kept: EventPair<Event>[] = [];
  for (const pair of pairs) {
    const last = kept.at(-1);
    if (last === undefined || pair.predicted.at > last.predicted.at) kept.push(pair);
  }
  return kept;
}

function mutual<Event extends TideExtreme>(
  events: readonly Event[],
  predicted: readonly TideExtreme[],
  laterMs: number,
): EventPair<Event>[] {
  const nearestToPredicted = nearestEach(
    predicted.map(({ at }) => at + laterMs),
    events.map(({ at }) => at),
  );
  const nearestToEvent = nearestEach(
    events.map(({ at }) => at),
    predicted.map(({ at }) => at + laterMs),
  );
  return events.flatMap((event, place) => {
    const other = nearestToEvent[place];
    const extreme = other === undefined ? undefined : predicted[other];
    if (other === undefined || extreme === undefined) return [];
    const isMutual = nearestToPredicted[other] === place;
    const isNear = Math.abs(event.at - extreme.at - laterMs) <= PAIRED_WITHIN_MS;
    return isMutual && isNear ? [{ event, predicted: extreme }] : [];
  });
}

/** For each of the first the place of the nearest of the second; both rise. */
function nearestEach(from: readonly number[], to: readonly number[]): (number | undefined)[] {
  let place = 0;
  return from.map((at) => {
    for (;;) {
      const here = to[place];
      const next = to[place + 1];
      if (here === undefined) return undefined;
      if (next === undefined || Math.abs(next - at) >= Math.abs(here - at)) return place;
      place += 1;
    }
  });
}
