import { positionInWords } from '#frontend/words/position-words.ts';
import { sourceInWords, tideCaution } from '#frontend/words/tide-words.ts';
import type { PlanPreview } from '#shared/contracts/season-plans.ts';

/** What the predictions are worth and where they come from, folded away. */
export function PlanTides({ source }: { source: PlanPreview['source'] }) {
  return (
    <details className="mt-4 text-sm">
      <summary className="inline-flex min-h-7 cursor-pointer items-center text-deep underline underline-offset-[3px] max-wide:min-h-target">
        Where the tides come from
      </summary>
      <p className="mt-1">{tideCaution}</p>
      <p className="mt-1 text-barnacle">
        {`Tide station ${source.stationName}, ${positionInWords(source)}${source.table === null ? '' : `, ${sourceInWords(source)}`}. Heights in metres above ${source.datum}. ${source.attribution}`}
      </p>
    </details>
  );
}
