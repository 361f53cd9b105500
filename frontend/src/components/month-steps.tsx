import { Link } from 'react-router-dom';

interface Step {
  readonly to: string;
  readonly name: string;
}

/** To the month before, to today's, and to the month after. */
export function MonthSteps(props: {
  readonly before: Step;
  readonly after: Step;
  readonly now: string;
  readonly isNow: boolean;
}) {
  return (
    <div className="flex items-center gap-1 text-sm">
      <Arrow step={props.before} path="M8 2L2 8l6 6" />
      <Link className="px-1 py-1.5" to={props.now} aria-current={props.isNow ? 'date' : undefined}>
        Today
      </Link>
      <Arrow step={props.after} path="M2 2l6 6-6 6" />
    </div>
  );
}

function Arrow({ step, path }: { step: Step; path: string }) {
  return (
    <Link className="grid size-8 place-items-center" to={step.to} aria-label={step.name}>
      <svg viewBox="0 0 10 16" width="10" height="16" aria-hidden>
        <path className="fill-none stroke-deep" strokeWidth="2" d={path} />
      </svg>
    </Link>
  );
}
