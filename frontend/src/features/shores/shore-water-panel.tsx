import { ProblemError } from '#frontend/api/problem-error.ts';
import { sayProblem } from '#frontend/api/say-problem.ts';
import { Button } from '#frontend/components/button.tsx';
import { LoadingWash } from '#frontend/components/loading-wash.tsx';
import { TideCredit } from '#frontend/components/tide-credit.tsx';
import { useWideScreen } from '#frontend/components/use-wide-screen.ts';
import { counted, sentenceCase } from '#frontend/words/number-words.ts';
import type { Reply } from '#frontend/api/call.ts';
import type { DayOfWater } from '#shared/contracts/shores.ts';
import { clockAt, formatDay, fromIso, startOfDay, zoneName } from '#shared/kernel/time.ts';
import { LevelsInWords, ShoreCurve } from './shore-curve.tsx';
import type { ShoreWater } from './shores.queries.ts';
import type { ShorePreview } from './use-shore-preview.ts';

/** The live water of a shore that is being set up: a day of it, and how many are usable. */
export function ShoreWaterPanel(props: {
  readonly preview: ShorePreview;
  readonly shoreName: string;
}) {
  const { preview, shoreName } = props;
  const { data, error, isFetching, isPlaceholderData } = preview.preview;
  return (
    <section aria-labelledby="shore-water" aria-busy={isFetching}>
      <div className="flex flex-wrap items-baseline justify-between gap-x-5">
        <h2 id="shore-water">
          {data === undefined ? 'The water' : formatDay(data.day.on, 'longYear')}
        </h2>
        {data !== undefined && <DaySteps preview={preview} />}
      </div>
      {data === undefined || preview.water === null ? (
        <Waiting preview={preview} />
      ) : (
        <div className={isPlaceholderData ? 'opacity-60' : undefined}>
          <Water reply={data} settings={preview.water} shoreName={shoreName} />
        </div>
      )}
      {data !== undefined && error !== null && (
        <p className="mt-2 text-ui font-medium text-anemone">{whyNot(error)}</p>
      )}
      {data !== undefined && !preview.isComplete && (
        <p className="mt-2 text-ui text-wrack">
          Some of what decides the water is missing. The curve is from before.
        </p>
      )}
      <p role="status" className="mt-3 text-ui">
        {data !== undefined && !isPlaceholderData && <b>{usableInWords(data.usableDays)}</b>}
      </p>
      {data !== undefined && (
        <div className="mt-3 border-t border-hair pt-2">
          <TideCredit shown="The water drawn here" source={data.source} />
        </div>
      )}
    </section>
  );
}

/** The state of the water in one line, where the curve is folded away. */
export function waterInOneLine(preview: ShorePreview): string {
  const { data } = preview.preview;
  if (data === undefined || preview.water === null) return 'The water, while you set it';
  const on = formatDay(data.day.on, 'short');
  return `The water on ${on}: ${windowInWords(data.day, preview.water.zone)}, ${usableInWords(data.usableDays)}`;
}

function windowInWords({ window }: DayOfWater, zone: string): string {
  if (window === null) return 'no working window';
  const clock = (iso: string): string => clockAt(fromIso(iso), zone);
  return `${clock(window.startsAt)} to ${clock(window.offTheShoreBy)}`;
}

function usableInWords(days: number): string {
  return sentenceCase(`${counted(days, 'usable day')} in the year ahead`);
}

function Water(props: {
  readonly reply: Reply<'previewShore'>;
  readonly settings: ShoreWater;
  readonly shoreName: string;
}) {
  const { reply, settings, shoreName } = props;
  const isWide = useWideScreen();
  return (
    <>
      <ShoreCurve day={reply.day} settings={settings} shoreName={shoreName} />
      {!isWide && <LevelsInWords settings={settings} />}
      <p className="mt-1 text-sm text-barnacle">
        {`Times in ${zoneName(startOfDay(reply.day.on, settings.zone), settings.zone)}.`}
      </p>
    </>
  );
}

function DaySteps({ preview }: { preview: ShorePreview }) {
  return (
    <div role="group" aria-label="Day shown" className="flex flex-wrap gap-x-4">
      <Button look="plain" onPress={() => preview.step(-1)}>
        Day before
      </Button>
      <Button look="plain" onPress={() => preview.step(1)}>
        Day after
      </Button>
      {!preview.isOnNextUsable && (
        <Button look="plain" onPress={preview.showNextUsable}>
          Next usable day
        </Button>
      )}
    </div>
  );
}

function Waiting({ preview }: { preview: ShorePreview }) {
  const { error, isFetching, refetch } = preview.preview;
  if (isFetching) return <LoadingWash what="the water" />;
  if (error !== null) {
    return (
      <div className="mt-2 text-ui">
        <p className="font-medium text-anemone">{whyNot(error)}</p>
        {!(error instanceof ProblemError && error.problem.code === 'not-understood') && (
          <Button look="plain" onPress={() => void refetch()}>
            Try again
          </Button>
        )}
      </div>
    );
  }
  return (
    <p className="mt-2 border-b border-dashed border-edge py-4 text-ui">
      The water of a day is drawn here once position, time zone, tide station and both levels are
      written.
    </p>
  );
}

function whyNot(error: Error): string {
  const isAboutFields = error instanceof ProblemError && (error.problem.fields ?? []).length > 0;
  return isAboutFields
    ? 'The water cannot be drawn with these settings. What is wrong stands beside its field.'
    : sayProblem(error);
}
