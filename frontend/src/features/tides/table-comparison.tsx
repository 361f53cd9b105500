import type { TablePreview } from '#shared/contracts/tide-tables.ts';

type Comparison = NonNullable<TablePreview['comparison']>;

const mistakes: Record<Exclude<Comparison['verdict'], 'agrees'>, string> = {
  'zone-mistake': 'This looks like the wrong time zone.',
  datum: 'This looks like heights above another datum.',
  units: 'This looks like heights in other units.',
  swapped: 'This looks like high and low water exchanged.',
  'other-place': 'This looks like the table of another place.',
};

/** How a table agrees with the prediction; what looks like a mistake is named first. */
export function TableComparison({ comparison }: { comparison: Comparison }) {
  const { verdict, sentence, pairs, medianMinutes, worstMinutes, medianM, worstM } = comparison;
  return (
    <section
      aria-labelledby="held-against"
      className={verdict === 'agrees' ? 'mt-5' : 'mt-5 border-t-2 border-anemone pt-2'}
    >
      <h4 id="held-against" className="font-semibold">
        Held against the prediction
      </h4>
      <p className="text-ui">
        {verdict !== 'agrees' && <b className="text-anemone">{mistakes[verdict]} </b>}
        {sentence}
      </p>
      <p className="text-sm text-barnacle tabular-nums">
        {pairs === 0
          ? 'None of its high and low waters has its like in the prediction.'
          : `Over ${pairs} high and low waters: median ${apart(medianMinutes, medianM)}; worst ${apart(worstMinutes, worstM)}.`}
      </p>
    </section>
  );
}

function apart(minutes: number, heightM: number): string {
  return `${Math.round(minutes)} min and ${heightM.toFixed(2)} m`;
}
