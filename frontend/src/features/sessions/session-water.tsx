import { NoTideData } from '#frontend/components/no-tide-data.tsx';
import { TideHero } from '#frontend/components/tide-hero.tsx';
import { readCurve } from '#frontend/components/water-curve.ts';
import type { SessionView } from '#shared/contracts/sessions.ts';
import { addDays, fromIso, startOfDay } from '#shared/kernel/time.ts';

/** The water of a session's day; words where no prediction covers it, nothing for training. */
export function SessionWater({ session }: { session: SessionView }) {
  const { water, shore, dayOn, lowWaterAt, lowWaterHeightM, lowerShoreClearBy, offTheShoreBy } =
    session;
  if (session.kind === 'training') return null;
  if (
    water === null ||
    lowWaterAt === null ||
    lowWaterHeightM === null ||
    lowerShoreClearBy === null ||
    offTheShoreBy === null
  ) {
    return <NoTideData />;
  }
  return (
    <TideHero
      shoreName={shore.name}
      facts={{
        curve: readCurve(water.curve),
        axis: water.axis,
        dayFromAt: startOfDay(dayOn, shore.zone),
        dayUntilAt: startOfDay(addDays(dayOn, 1), shore.zone),
        zone: shore.zone,
        crewMeetsAt: fromIso(session.crewMeetsAt),
        partyMeetsAt: fromIso(session.partyMeetsAt),
        startsAt: fromIso(session.startsAt),
        lowWaterAt: fromIso(lowWaterAt),
        lowWaterHeightM,
        clearByAt: fromIso(lowerShoreClearBy),
        offByAt: fromIso(offTheShoreBy),
        sunriseAt: water.sunriseAt === null ? null : fromIso(water.sunriseAt),
        sunsetAt: water.sunsetAt === null ? null : fromIso(water.sunsetAt),
        isStoodDown: session.state === 'stood-down',
      }}
    />
  );
}
