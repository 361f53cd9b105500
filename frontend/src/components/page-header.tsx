import type { ReactNode } from 'react';
import { Link } from 'react-router-dom';
import { Mark } from './mark.tsx';

/** A screen that the navigation leads to. */
export interface Screen {
  readonly to: string;
  readonly name: string;
  /** Whether the page shown belongs to it, though its address is another. */
  readonly isCurrent: boolean;
}

/** The head of every page: mark and group, the screens, today's water and who is signed in. */
export function PageHeader(props: {
  readonly groupName: string;
  readonly screens: readonly Screen[];
  readonly today: ReactNode;
  readonly who: ReactNode;
}) {
  return (
    <header className="flex min-h-14 items-center gap-x-8 max-wide:flex-wrap border-hair px-4 wide:min-h-16 wide:border-b wide:px-page">
      <Link
        to="/"
        className="flex min-w-0 items-center gap-2.5 py-2 text-ink no-underline"
        aria-label={`Ebbfolk, ${props.groupName}`}
      >
        <Mark />
        <span className="leading-tight">
          <b className="block text-lg">Ebbfolk</b>
          <span className="block text-xs text-barnacle max-wide:hidden">{props.groupName}</span>
        </span>
      </Link>
      <nav aria-label="Main" className="flex flex-1 gap-5.5 max-wide:hidden">
        {props.screens.map((screen) => (
          <ScreenLink key={screen.to} screen={screen} />
        ))}
      </nav>
      <div className="max-wide:hidden">{props.today}</div>
      <div className="max-wide:ml-auto">{props.who}</div>
    </header>
  );
}

/** The screens at the foot of narrow pages. */
export function FooterNav({ screens }: { screens: readonly Screen[] }) {
  return (
    <nav
      aria-label="Main"
      className="fixed inset-x-0 bottom-0 z-10 flex min-h-foot justify-around border-t border-hair bg-foam wide:hidden"
    >
      {screens.map((screen) => (
        <ScreenLink key={screen.to} screen={screen} />
      ))}
    </nav>
  );
}

function ScreenLink({ screen }: { screen: Screen }) {
  return (
    <Link
      to={screen.to}
      className={`inline-flex min-h-target items-center self-center text-ui whitespace-nowrap no-underline ${
        screen.isCurrent ? 'font-semibold text-deep underline-wave' : 'font-medium text-ink'
      }`}
      aria-current={screen.isCurrent ? 'page' : undefined}
    >
      {screen.name}
    </Link>
  );
}

/** Leads past the head of the page; seen when it has the focus. */
export function SkipLink() {
  return (
    <a
      href="#main"
      className="absolute top-3 left-4 z-20 -translate-y-[200%] bg-paper px-4 py-2 focus:translate-y-0"
    >
      Skip to the page
    </a>
  );
}
