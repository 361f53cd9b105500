import type { LetterContent } from '#backend/platform/mail/letter-layout.ts';
import type { Instant } from '#shared/kernel/time.ts';
import { clockAt, zoneName } from '#shared/kernel/time.ts';
import type { LetterFacts } from './slots.reader.ts';

/** Where the crew meets and the times to keep, each with its zone. */
export function letterWhenAndWhere(facts: LetterFacts): LetterContent['facts'] {
  const time = (at: Instant): string => `${clockAt(at, facts.zone)} ${zoneName(at, facts.zone)}`;
  const lines: LetterContent['facts'][number][] = [
    { label: 'Meeting place', value: facts.meetingPlace },
    { label: 'Crew meet', value: time(facts.meetsAt) },
    { label: facts.lowWaterAt === null ? 'Starts' : 'On the shore', value: time(facts.startsAt) },
  ];
  if (facts.lowWaterAt !== null && facts.lowWaterHeightM !== null) {
    const height = facts.lowWaterHeightM.toFixed(1).replace('-', '\u2212');
    lines.push({ label: 'Low water', value: `${time(facts.lowWaterAt)}, ${height} m` });
  }
  if (facts.lowerShoreClearBy !== null) {
    lines.push({ label: 'Lower shore clear by', value: time(facts.lowerShoreClearBy) });
  }
  if (facts.offTheShoreBy === null) lines.push({ label: 'Ends', value: time(facts.endsAt) });
  else {
    lines.push({ label: 'Off the shore by', value: time(facts.offTheShoreBy), isStrong: true });
  }
  return lines;
}
