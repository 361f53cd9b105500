import { useState } from 'react';
import { Link } from 'react-router-dom';
import { sayProblem } from '#frontend/api/say-problem.ts';
import { Button } from '#frontend/components/button.tsx';
import { PageHeading, PageTitle } from '#frontend/components/page-heading.tsx';
import { ProblemSummary } from '#frontend/components/problem-summary.tsx';
import { TideCredit } from '#frontend/components/tide-credit.tsx';
import { Tick } from '#frontend/components/tick.tsx';
import { shortDate } from '#frontend/words/day-words.ts';
import { counted, numberWord, sentenceCase } from '#frontend/words/number-words.ts';
import type { PlanDate, PlanView } from '#shared/contracts/season-plans.ts';
import { DateList } from './date-list.tsx';
import { PlanFrame } from './plan-frame.tsx';
import { PlanSummary } from './plan-summary.tsx';
import { planHeadline, publishedInWords } from './plan-words.ts';
import type { PlansView } from './seasons.queries.ts';
import { stripHours } from './strip-hours.ts';
import { usePublishSessions } from './use-save-plan.ts';

/** A plan of which sessions are made: what became of each date, and drafts to publish. */
export function MadePlan(props: {
  readonly plan: PlanView;
  readonly view: PlansView;
  readonly addressOfSession: (sessionId: string) => string;
  readonly onPublished: () => void;
}) {
  const { plan, view } = props;
  const { settings, preview } = plan;
  const [ticked, setTicked] = useState<ReadonlySet<string>>(new Set());
  const publish = usePublishSessions(plan.id);
  const drafts = preview.dates.flatMap(draftOfDate);
  const chosen = drafts.filter((id) => ticked.has(id));
  const onPublish = (sessionIds: string[]): void =>
    publish.mutate(sessionIds, {
      onSuccess: () => {
        setTicked(new Set());
        props.onPublished();
      },
    });
  const buttons = drafts.length > 0 && (
    <PublishButtons
      drafts={drafts}
      chosen={chosen}
      isBusy={publish.isPending}
      onPublish={onPublish}
    />
  );
  return (
    <PlanFrame
      rules={(isRoomy) => (
        <>
          <PageTitle>{settings.name}</PageTitle>
          <PageHeading>{settings.name}</PageHeading>
          <p className="text-sm text-barnacle">
            {`${sentenceCase(counted(plan.made, 'session'))} made, ${publishedInWords(plan.published)}.`}
          </p>
          {publish.error !== null && (
            <ProblemSummary title="Nothing was published.">
              <p>{sayProblem(publish.error)}</p>
            </ProblemSummary>
          )}
          <PlanSummary settings={settings} preview={preview} view={view} />
          <p className="mt-2 text-sm">
            Sessions are made of this plan, and people may hold their slots: its rules stay as they
            are.
          </p>
          {isRoomy && buttons !== false && <div className="mt-5 grid gap-2.5">{buttons}</div>}
        </>
      )}
      dates={
        <section aria-labelledby="dates">
          <h2 id="dates">{planHeadline(preview)}</h2>
          <DateList
            preview={preview}
            hours={stripHours(settings.earliestClock, settings.latestClock)}
            endRoom="state"
            endOf={(date) => (
              <SessionOfDate
                date={date}
                addressOfSession={props.addressOfSession}
                isTicked={date.sessionId !== null && ticked.has(date.sessionId)}
                onTick={(id, isTicked) =>
                  setTicked(
                    new Set(isTicked ? [...ticked, id] : [...ticked].filter((one) => one !== id)),
                  )
                }
              />
            )}
            underOf={() => null}
          />
          <div className="mt-4">
            <TideCredit shown="The water of these days" source={preview.source} />
          </div>
        </section>
      }
      foot={buttons === false ? null : <div className="grid gap-2.5">{buttons}</div>}
    />
  );
}

/** The session of a date if it is a draft that can still be published. */
function draftOfDate({ sessionId, sessionState, isPast }: PlanDate): string[] {
  return sessionId !== null && sessionState === 'draft' && !isPast ? [sessionId] : [];
}

function PublishButtons(props: {
  readonly drafts: readonly string[];
  readonly chosen: readonly string[];
  readonly isBusy: boolean;
  readonly onPublish: (sessionIds: string[]) => void;
}) {
  const { drafts, chosen, isBusy, onPublish } = props;
  return (
    <>
      <Button isBusy={isBusy} onPress={() => onPublish([...drafts])}>
        {drafts.length === 1 ? 'Publish the session' : `Publish all ${numberWord(drafts.length)}`}
      </Button>
      {chosen.length > 0 && chosen.length < drafts.length && (
        <Button look="line" isBusy={isBusy} onPress={() => onPublish([...chosen])}>
          {`Publish the ${numberWord(chosen.length)} ticked`}
        </Button>
      )}
    </>
  );
}

const stateWords: Record<NonNullable<PlanDate['sessionState']>, string> = {
  draft: 'draft',
  published: 'published',
  'stood-down': 'stood down',
  closed: 'done',
};

function SessionOfDate(props: {
  readonly date: PlanDate;
  readonly addressOfSession: (sessionId: string) => string;
  readonly isTicked: boolean;
  readonly onTick: (sessionId: string, isTicked: boolean) => void;
}) {
  const { date } = props;
  const { sessionId, sessionState } = date;
  if (sessionId === null || sessionState === null) return null;
  return (
    <span className="flex items-center justify-end gap-3.5">
      <Link
        className="inline-flex min-h-7 items-center text-sm max-wide:min-h-target"
        to={props.addressOfSession(sessionId)}
      >
        {stateWords[sessionState]} <span className="sr-only">session of {shortDate(date.on)}</span>
      </Link>
      {draftOfDate(date).length > 0 && (
        <Tick
          words="Publish"
          spoken={shortDate(date.on)}
          isTicked={props.isTicked}
          onChange={(isTicked) => props.onTick(sessionId, isTicked)}
        />
      )}
    </span>
  );
}
