import { Link } from 'react-router-dom';
import { counted, sentenceCase } from '#frontend/words/number-words.ts';
import { publishedInWords, spanInWords } from './plan-words.ts';
import type { PlansView } from './seasons.queries.ts';

/** Every plan with its shore, its pattern and what has been made of it. */
export function PlanList({ view }: { view: PlansView }) {
  if (view.plans.length === 0) {
    return (
      <p className="text-ui">
        <b>No season is planned yet.</b> <Link to="/season-plans/new">Write a season plan</Link>
      </p>
    );
  }
  return (
    <ul className="border-t-[1.5px] border-ink">
      {view.plans.map((plan) => (
        <li
          key={plan.id}
          className="flex flex-wrap items-baseline justify-between gap-x-6 border-b border-hair py-2.5 text-ui"
        >
          <div className="min-w-0">
            <h2 className="text-md">
              <Link
                className="inline-flex min-h-7 items-center max-wide:min-h-target"
                to={`/season-plans/${plan.id}`}
              >
                {plan.name}
              </Link>
            </h2>
            <p>{`${plan.shoreName}. ${plan.sentence}, ${spanInWords(plan.fromOn, plan.toOn)}.`}</p>
          </div>
          <p className="text-barnacle">{stateInWords(plan)}</p>
        </li>
      ))}
    </ul>
  );
}

function stateInWords({ made, published }: PlansView['plans'][number]): string {
  if (made === 0) return 'Draft, nothing is on the calendar yet';
  return sentenceCase(`${counted(made, 'session')}, ${publishedInWords(published)}`);
}
