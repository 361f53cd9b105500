import { positionInWords } from '#frontend/words/position-words.ts';
import { sourceInWords, tideCaution } from '#frontend/words/tide-words.ts';

/** The tide station, or the official table, behind figures that are shown. */
export interface TideSource {
  readonly stationName: string;
  readonly latitude: number;
  readonly longitude: number;
  /** What heights are above. */
  readonly datum: string;
  readonly attribution: string;
  readonly table: string | null;
}

/** Where the water of a page comes from and who decides; the credit in full is folded away. */
export function TideCredit(props: {
  /** What is shown, as a sentence begins: 'The water at Gull Ledges'. */
  readonly shown: string;
  readonly source: TideSource;
}) {
  const { shown, source } = props;
  return (
    <div className="text-sm">
      <p>{tideCaution}</p>
      <p className="mt-1 text-barnacle">{`${shown} is ${sourceInWords(source)}.`}</p>
      <details className="mt-1 text-barnacle">
        <summary className="inline-flex min-h-7 cursor-pointer items-center text-deep underline underline-offset-[3px] max-wide:min-h-target">
          Tide station and licence
        </summary>
        <p className="mt-1 break-words">
          {`${source.stationName}, ${positionInWords(source)}. Heights in metres above ${source.datum}. ${source.attribution}`}
        </p>
      </details>
    </div>
  );
}
