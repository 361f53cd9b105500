import { ProblemError } from '#frontend/api/problem-error.ts';
import { sayProblem } from '#frontend/api/say-problem.ts';
import { LevelGauge } from '#frontend/components/level-gauge.tsx';
import { ProblemSummary } from '#frontend/components/problem-summary.tsx';
import { RefusalBox, RefusalReason } from '#frontend/components/refusal-box.tsx';
import { counted } from '#frontend/words/number-words.ts';
import type { ReasonAgainst } from '#shared/contracts/reasons.ts';
import type { Standing } from '#shared/contracts/slots.ts';
import { sayWhyNot } from './say-why-not.ts';

/** Why the reader may not claim a slot: every reason, with its gauge and what would mend it. */
export function Refusal(props: {
  readonly reasons: readonly ReasonAgainst[];
  readonly standings: readonly Standing[];
}) {
  const { reasons, standings } = props;
  return (
    <RefusalBox title={`You may not claim this slot, for ${counted(reasons.length, 'reason')}.`}>
      {reasons.map((reason, index) => {
        const { subject, rest, mend } = sayWhyNot(reason);
        return (
          <RefusalReason
            key={index}
            drawing={<ReasonGauge reason={reason} standings={standings} />}
            sentence={
              <>
                {subject !== null && <b>{subject}</b>} {rest}
              </>
            }
            mend={mend}
          />
        );
      })}
    </RefusalBox>
  );
}

function ReasonGauge(props: {
  readonly reason: ReasonAgainst;
  readonly standings: readonly Standing[];
}) {
  const { reason, standings } = props;
  if (!('competencyId' in reason)) return null;
  const standing = standings.find(({ competencyId }) => competencyId === reason.competencyId);
  if (standing === undefined) return null;
  return (
    <LevelGauge
      state={standing.state}
      shareLeft={standing.shareLeft}
      noticeShare={standing.noticeShare}
    />
  );
}

/** What the server answered to a claim or a release that did not go through. */
export function RefusedByServer({ title, error }: { title: string; error: Error }) {
  const reasons = error instanceof ProblemError ? (error.problem.reasons ?? []) : [];
  return (
    <ProblemSummary title={title}>
      {reasons.length === 0 ? (
        <p>{sayProblem(error)}</p>
      ) : (
        <ul>
          {reasons.map((reason, index) => {
            const { subject, rest, mend } = sayWhyNot(reason);
            return (
              <li key={index}>
                {subject !== null && <b>{subject}</b>} {rest}{' '}
                <span className="text-barnacle">{mend}</span>
              </li>
            );
          })}
        </ul>
      )}
    </ProblemSummary>
  );
}
