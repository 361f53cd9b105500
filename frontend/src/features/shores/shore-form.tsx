import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { call } from '#frontend/api/call.ts';
import { ProblemError } from '#frontend/api/problem-error.ts';
import { sayProblem } from '#frontend/api/say-problem.ts';
import { Button } from '#frontend/components/button.tsx';
import { ProblemSummary } from '#frontend/components/problem-summary.tsx';
import { useWideScreen } from '#frontend/components/use-wide-screen.ts';
import { counted, sentenceCase } from '#frontend/words/number-words.ts';
import type { ShoreSettings, ShoreView } from '#shared/contracts/shores.ts';
import type { DraftErrors, DraftPath, ShoreDraft } from './shore-draft.ts';
import { isDraftPath, readDraft } from './shore-draft.ts';
import {
  DifferencesSection,
  GroundSection,
  MeetingSection,
  PlaceSection,
  RatioSection,
  WaterSection,
} from './shore-sections.tsx';
import { ShoreWaterPanel, waterInOneLine } from './shore-water-panel.tsx';
import { shoresQueries } from './shores.queries.ts';
import { useShorePreview } from './use-shore-preview.ts';

/**
 * Everything that is set up of a shore, the live water beside it. What was typed stays until it
 * is saved, whatever the server answers. `shoreId` is null for a shore that is being added.
 */
export function ShoreForm(props: {
  readonly shoreId: string | null;
  readonly from: ShoreDraft;
  readonly onSaved: (shore: ShoreView) => void;
}) {
  const { shoreId, from, onSaved } = props;
  const isWide = useWideScreen();
  const [draft, setDraft] = useState(from);
  const preview = useShorePreview(draft);
  const save = useSaving(shoreId, draft, onSaved);
  const writing = {
    draft,
    errors: { ...preview.errors, ...save.errors },
    onWrite: (changes: Partial<ShoreDraft>) => {
      setDraft((before) => ({ ...before, ...changes }));
      save.forget(Object.keys(changes).filter(isDraftPath));
    },
  };
  const shoreName = draft.name.trim() === '' ? 'this shore' : draft.name;
  const panel = <ShoreWaterPanel preview={preview} shoreName={shoreName} />;
  return (
    <div className="grid gap-x-12 wide:grid-cols-[minmax(0,27rem)_minmax(0,1fr)]">
      <div>
        <PlaceSection writing={writing} stations={preview.stations} />
        <DifferencesSection writing={writing} />
        {!isWide && (
          <details className="mt-4 border-t-[1.5px] border-ink pt-1.5">
            <summary className="min-h-target cursor-pointer py-2 text-ui font-semibold tabular-nums">
              {waterInOneLine(preview)}
            </summary>
            <div className="py-2">{panel}</div>
          </details>
        )}
        <WaterSection writing={writing} datum={preview.preview.data?.source.datum ?? null} />
        <MeetingSection writing={writing} />
        <GroundSection writing={writing} />
        <RatioSection writing={writing} />
        <div className="mt-6 border-t border-hair pt-4">
          {shoreId !== null && (
            <p className="mb-3 text-ui">Sessions that are made keep their times.</p>
          )}
          <Button isWideOnPhone isBusy={save.isBusy} onPress={save.start}>
            {saveWords(shoreId === null, save.isBusy)}
          </Button>
          <p role="status" className="mt-2 text-ui font-medium">
            {save.isSaved ? `${draft.name} is saved.` : ''}
          </p>
          {save.failure !== null && (
            <ProblemSummary
              key={save.failure.attempt}
              title={shoreId === null ? 'The shore was not added.' : 'The shore was not saved.'}
            >
              {save.failure.sentences.map((sentence) => (
                <p key={sentence}>{sentence}</p>
              ))}
            </ProblemSummary>
          )}
        </div>
      </div>
      {isWide && <div className="sticky top-4 self-start pt-3.5">{panel}</div>}
    </div>
  );
}

function saveWords(isNew: boolean, isBusy: boolean): string {
  if (isBusy) return isNew ? 'Adding' : 'Saving';
  return isNew ? 'Add this shore' : 'Save this shore';
}

interface Failure {
  readonly attempt: number;
  readonly sentences: readonly string[];
}

/** Saves a draft; what is wrong comes back beside its fields, the rest in sentences. */
function useSaving(shoreId: string | null, draft: ShoreDraft, onSaved: (shore: ShoreView) => void) {
  const queryClient = useQueryClient();
  const [errors, setErrors] = useState<DraftErrors>({});
  const [attempt, setAttempt] = useState(0);
  const [sentences, setSentences] = useState<readonly string[] | null>(null);
  const fail = (found: DraftErrors, others: readonly string[]): void => {
    const count = Object.keys(found).length;
    setErrors(found);
    setSentences([...(count === 0 ? [] : [lookAgain(count)]), ...others]);
  };
  const saving = useMutation({
    mutationFn: (settings: ShoreSettings) =>
      shoreId === null
        ? call('makeShore', { body: settings })
        : call('changeShore', { params: { shoreId }, body: settings }),
    onSuccess: (shore) => {
      queryClient.setQueryData(shoresQueries.shore(shore.id).queryKey, shore);
      void queryClient.invalidateQueries({ queryKey: shoresQueries.root });
      onSaved(shore);
    },
    onError: (error) => {
      const { found, others } = fieldsOf(error);
      fail(found, Object.keys(found).length === 0 ? [sayProblem(error), ...others] : others);
    },
  });
  return {
    errors,
    isBusy: saving.isPending,
    isSaved: saving.isSuccess,
    failure: sentences === null ? null : ({ attempt, sentences } satisfies Failure),
    start: () => {
      setAttempt((before) => before + 1);
      setErrors({});
      setSentences(null);
      const read = readDraft(draft);
      if (read.settings === null) fail(read.errors, []);
      else saving.mutate(read.settings);
    },
    /** What was said of these fields no longer holds: they are being written anew. */
    forget: (paths: readonly DraftPath[]) => {
      if (saving.isSuccess) saving.reset();
      setErrors((before) =>
        Object.fromEntries(
          Object.entries(before).filter(([path]) => !paths.some((other) => other === path)),
        ),
      );
    },
  };
}

function lookAgain(count: number): string {
  return count === 1
    ? 'One field needs another look. What is wrong stands beside it.'
    : `${sentenceCase(counted(count, 'field'))} need another look. What is wrong stands beside each.`;
}

function fieldsOf(error: Error): { found: DraftErrors; others: readonly string[] } {
  const found: Partial<Record<DraftPath, string>> = {};
  const others: string[] = [];
  const fields = error instanceof ProblemError ? (error.problem.fields ?? []) : [];
  for (const { where, field, message } of fields) {
    if (where === 'body' && isDraftPath(field)) found[field] ??= message;
    else others.push(`${field}: ${message}`);
  }
  return { found, others };
}
