import type { ReactNode } from 'react';
import { LimpetRow } from '#frontend/components/limpet.tsx';
import type { SessionView } from '#shared/contracts/sessions.ts';
import type { Cover } from './session-words.ts';

/** The slots of a session as limpets and, after them, in words with figures. */
export function CoverLine(props: {
  readonly state: SessionView['state'];
  readonly hasEnded: boolean;
  readonly cover: Cover;
  readonly limpetPx?: number;
  /** In a narrow cell: what is in doubt stands under the gaps. */
  readonly isStacked?: boolean;
}) {
  const { state, hasEnded, cover, limpetPx = 14, isStacked = false } = props;
  if (state === 'stood-down') return <span>Stood down</span>;
  const isPast = hasEnded || state === 'closed';
  return (
    <span className="block">
      <span className={`inline-block align-[-2px] ${limpetPx > 20 ? 'mr-3.5' : 'mr-1.5'}`}>
        <LimpetRow looks={cover.looks} sizePx={limpetPx} isPast={isPast} />
      </span>
      {state === 'draft' && 'Draft, '}
      {isPast ? 'Done' : openWords(cover, isStacked)}
    </span>
  );
}

function openWords({ gaps, inDoubt }: Cover, isStacked: boolean): ReactNode {
  if (gaps === 0 && inDoubt === 0) return 'Covered';
  return (
    <>
      {gaps > 0 && (
        <b className="whitespace-nowrap text-anemone">{gaps === 1 ? '1 gap' : `${gaps} gaps`}</b>
      )}
      {gaps > 0 && inDoubt > 0 && (isStacked ? <br /> : ', ')}
      {inDoubt > 0 && <b className="whitespace-nowrap text-wrack">{inDoubt} in doubt</b>}
    </>
  );
}
