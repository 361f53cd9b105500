import { useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { sayProblem } from '#frontend/api/say-problem.ts';
import { Button } from '#frontend/components/button.tsx';
import { LoadingWash } from '#frontend/components/loading-wash.tsx';
import { PageHeading, PageTitle } from '#frontend/components/page-heading.tsx';
import { ProblemSummary } from '#frontend/components/problem-summary.tsx';
import { counted } from '#frontend/words/number-words.ts';
import type { PlanSettings, PlanView } from '#shared/contracts/season-plans.ts';
import { isClockTime } from '#shared/kernel/time.ts';
import { DecidedDates } from './decided-dates.tsx';
import type { FieldErrors, PlanDraft } from './plan-draft.ts';
import { readDraft } from './plan-draft.ts';
import { PlanForm } from './plan-form.tsx';
import { PlanFrame } from './plan-frame.tsx';
import { PlanSummary } from './plan-summary.tsx';
import { countDates } from './plan-words.ts';
import type { PlansView } from './seasons.queries.ts';
import { putPlan } from './seasons.queries.ts';
import { stripHours } from './strip-hours.ts';
import { fieldErrorsOf, usePlanPreview } from './use-plan-preview.ts';
import { useKeepPlan, useMakeSessions } from './use-save-plan.ts';

/** Writes a plan: its rules beside the dates that they give, until sessions are made of it. */
export function PlanEditor(props: {
  readonly view: PlansView;
  readonly start: PlanDraft;
  /** The plan as it is kept; null for one that is not yet. */
  readonly saved: PlanView | null;
  readonly onSaved: (plan: PlanView) => void;
  readonly onMade: (plan: PlanView) => void;
}) {
  const { view, start } = props;
  const queryClient = useQueryClient();
  const [draft, setDraft] = useState(start);
  const [kept, setKept] = useState({ draft: start, plan: props.saved });
  const [isOpen, setIsOpen] = useState(props.saved === null);
  const [hasTried, setHasTried] = useState(false);
  const [isStopped, setIsStopped] = useState(false);
  const isChanged = kept.plan === null || draft !== kept.draft;
  const seen = usePlanPreview(draft, kept.plan, isChanged);
  const reading = readDraft(draft);
  const onKept = (plan: PlanView): void => {
    setKept({ draft, plan });
    putPlan(queryClient, plan);
  };
  const keep = useKeepPlan({ onKept, onDone: props.onSaved });
  const make = useMakeSessions({
    onKept,
    onDone: (plan) => {
      putPlan(queryClient, plan);
      props.onMade(plan);
    },
  });
  const isBusy = keep.isPending || make.isPending;
  const refusal = keep.error ?? make.error;
  const errors: FieldErrors = {
    ...(refusal === null ? {} : fieldErrorsOf(refusal)),
    ...seen.fieldErrors,
    ...reading.errors,
  };
  // A name that is still missing is no mistake before anybody wants to save.
  if (!hasTried) delete errors.name;

  const attempt = (go: (settings: PlanSettings) => void): void => {
    setHasTried(true);
    keep.reset();
    make.reset();
    if (reading.settings !== null) go(reading.settings);
    else {
      setIsOpen(true);
      setIsStopped(true);
    }
  };
  const planId = kept.plan?.id ?? null;
  const onKeep = (): void => attempt((settings) => keep.mutate({ planId, settings }));
  const onMake = (): void =>
    attempt((settings) => make.mutate({ planId, settings: isChanged ? settings : null }));
  const change = (changed: PlanDraft): void => {
    setDraft(changed);
    setIsStopped(false);
    keep.reset();
    make.reset();
  };

  const count = seen.preview === null ? 0 : countDates(seen.preview.dates).sessions;
  const makeButton = <MakeButton count={count} isBusy={isBusy} onPress={onMake} />;
  const isOutdated = Object.keys(errors).some((field) => field !== 'name');
  const name = draft.name.trim() === '' ? 'A new season plan' : draft.name;
  return (
    <PlanFrame
      rules={(isRoomy) => (
        <form
          noValidate
          aria-label="Rules of the plan"
          onSubmit={(event) => event.preventDefault()}
        >
          <PageTitle>{name}</PageTitle>
          <PageHeading>{name}</PageHeading>
          <p className="text-sm text-barnacle" aria-live="polite">
            {`Season plan, ${kept.plan === null ? 'not saved yet' : isChanged ? 'changed, not saved yet' : 'draft'}. Nothing is on the calendar yet.`}
          </p>
          {isStopped && (
            <ProblemSummary title="The plan cannot be used as it is.">
              <p>What is wrong is marked below.</p>
            </ProblemSummary>
          )}
          {refusal !== null && (
            <ProblemSummary
              title={make.error === null ? 'The draft was not saved.' : 'No sessions were made.'}
            >
              <p>{sayRefusal(refusal)}</p>
            </ProblemSummary>
          )}
          {!isRoomy && !isOpen && reading.settings !== null && seen.preview !== null ? (
            <>
              <PlanSummary settings={reading.settings} preview={seen.preview} view={view} />
              <Button look="plain" onPress={() => setIsOpen(true)}>
                Change the rules
              </Button>
            </>
          ) : (
            <PlanForm draft={draft} errors={errors} view={view} onChange={change} />
          )}
          <div className="mt-5 grid gap-2.5 empty:hidden">
            {isRoomy && makeButton}
            {(isRoomy || isOpen || isChanged) && (
              <Button look="line" isBusy={isBusy} onPress={onKeep}>
                {keep.isPending ? 'Saving the draft' : 'Save the draft'}
              </Button>
            )}
            {!isRoomy && isOpen && kept.plan !== null && (
              <Button look="plain" onPress={() => setIsOpen(false)}>
                Close the rules
              </Button>
            )}
          </div>
        </form>
      )}
      dates={
        <>
          {seen.error !== null && (
            <ProblemSummary title="The dates could not be worked out.">
              <p className="mb-2">{sayProblem(seen.error)}</p>
              <Button look="line" onPress={seen.onRetry}>
                Try again
              </Button>
            </ProblemSummary>
          )}
          {errors.exceptions !== undefined && (
            <p className="text-sm font-medium text-anemone">{errors.exceptions}</p>
          )}
          {seen.preview === null && seen.error === null && <LoadingWash what="the dates" />}
          {seen.preview !== null && (
            <DecidedDates
              preview={seen.preview}
              hours={hoursOf(draft, view)}
              isOutdated={isOutdated}
              exceptions={draft.exceptions}
              onDecide={(exceptions) => change({ ...draft, exceptions })}
            />
          )}
        </>
      }
      foot={makeButton}
    />
  );
}

function MakeButton(props: {
  readonly count: number;
  readonly isBusy: boolean;
  readonly onPress: () => void;
}) {
  if (props.count === 0) {
    return <p className="text-sm text-barnacle">No date of this plan can be made a session of.</p>;
  }
  return (
    <span className="grid">
      <Button isBusy={props.isBusy} onPress={props.onPress}>
        {`${props.isBusy ? 'Making' : 'Make'} ${counted(props.count, 'session')}`}
      </Button>
    </span>
  );
}

function sayRefusal(error: Error): string {
  const beside = Object.values(fieldErrorsOf(error));
  return beside.length === 0 ? sayProblem(error) : beside.join(' ');
}

/** The hours that the strips show: what the plan and its shore both allow. */
function hoursOf(draft: PlanDraft, view: PlansView) {
  const shore = view.shores.find(({ id }) => id === draft.shoreId);
  const { earliestClock: earliest, latestClock: latest } = draft;
  const ofShore = {
    earliest: shore?.earliestClock ?? '00:00',
    latest: shore?.latestClock ?? '23:59',
  };
  return stripHours(
    isClockTime(earliest) && earliest > ofShore.earliest ? earliest : ofShore.earliest,
    isClockTime(latest) && latest < ofShore.latest ? latest : ofShore.latest,
  );
}
