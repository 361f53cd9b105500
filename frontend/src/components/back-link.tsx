import { Link } from 'react-router-dom';

/** Over a page's heading: to the page that it belongs to. */
export function BackLink({ to, children }: { readonly to: string; readonly children: string }) {
  return (
    <nav aria-label="Back">
      <Link className="inline-flex min-h-7 items-center gap-2 text-sm" to={to}>
        <svg viewBox="0 0 8 12" width="8" height="12" aria-hidden>
          <path className="fill-none stroke-deep" strokeWidth="1.75" d="M7 1L2 6l5 5" />
        </svg>
        {children}
      </Link>
    </nav>
  );
}
