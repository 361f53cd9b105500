import type { CalendarSession } from '#shared/contracts/sessions.ts';
import { CoverLine } from './cover-line.tsx';
import { coverOf, sessionInWords } from './session-words.ts';

const LIMPET_PX = 13;
/** The room at both sides of a sign, and how far it reaches over its stake. */
const LEFT_PX = 9;
const SIDES_PX = 15;
const OVER_STAKE_PX = 4;

/** A session as a sign in the month: its text on a plank over the stake, a pennant if it is yours. */
export function SessionSign(props: {
  readonly session: CalendarSession;
  /** Where its stake stands, in hundredths of the day's width. */
  readonly leftPercent: number;
  readonly isLast: boolean;
}) {
  const { session, leftPercent, isLast } = props;
  const cover = coverOf(session.slots);
  const isDown = session.state === 'stood-down';
  const isOver = session.hasEnded || session.state === 'closed';
  const plank = isDown
    ? 'border-transparent'
    : isOver
      ? 'border-edge'
      : cover.isYours
        ? 'border-kelp'
        : 'border-ink';
  return (
    <>
      <span className="sr-only">{sessionInWords(session)}</span>
      <span
        className={`session-sign ${plank} ${isDown || isOver ? 'text-barnacle' : 'text-ink'}`}
        style={isDown ? undefined : { minWidth: reach(leftPercent) }}
        aria-hidden
      >
        <span className={isDown ? 'block font-medium line-through' : 'block font-semibold'}>
          {session.shoreName}
          {cover.isYours && !isDown && <span className="text-kelp"> you</span>}
        </span>
        <CoverLine
          state={session.state}
          hasEnded={session.hasEnded}
          cover={cover}
          limpetPx={LIMPET_PX}
          isStacked
        />
      </span>
      {isLast && cover.isYours && !isDown && !isOver && (
        <svg
          className="absolute top-full mt-1 ml-px"
          style={{ left: `${leftPercent}%` }}
          viewBox="0 0 9 9"
          width="9"
          height="9"
          aria-hidden
        >
          <path className="fill-kelp" d="M0 0L9 4.5L0 9Z" />
        </svg>
      )}
    </>
  );
}

/** The least width of a sign, so that its plank always rests on the stake. */
function reach(leftPercent: number): string {
  const px = (SIDES_PX * leftPercent) / 100 - LEFT_PX + OVER_STAKE_PX;
  return `calc(${leftPercent}% + ${px.toFixed(1)}px)`;
}
