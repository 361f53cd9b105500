import type { ReactNode } from 'react';
import { Link } from 'react-router-dom';
import { Mark } from './mark.tsx';
import { SkipLink } from './page-header.tsx';

/** The frame of the pages outside: mark and group, the page, and water at its foot. */
export function FrontPage(props: {
  readonly groupName: string | null;
  readonly foot: ReactNode;
  readonly children: ReactNode;
}) {
  return (
    <div className="flex min-h-dvh flex-col">
      <SkipLink />
      <main
        id="main"
        tabIndex={-1}
        className="mx-auto w-full max-w-front px-4 pt-4 wide:px-page wide:pt-11"
      >
        <Link to="/sign-in" className="inline-flex items-center gap-2.5 text-ink no-underline">
          <Mark sizePx={34} />
          <span className="leading-tight">
            <b className="block text-brand">Ebbfolk</b>
            {props.groupName !== null && (
              <span className="block text-xs text-barnacle">{props.groupName}</span>
            )}
          </span>
        </Link>
        {props.children}
      </main>
      {props.foot !== null && <footer className="mt-auto">{props.foot}</footer>}
    </div>
  );
}
