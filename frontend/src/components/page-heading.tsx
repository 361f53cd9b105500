import type { ReactNode } from 'react';
import { useEffect, useRef } from 'react';
import { useLocation } from 'react-router-dom';

const FIRST_PAGE = 'default';

/**
 * The heading of a page. It takes the focus when the page is reached from within, so that speech
 * reads where one is; not on the first page, where the browser does so itself.
 */
export function PageHeading({
  children,
  isSmall = false,
}: {
  readonly children: ReactNode;
  /** Over a page that is one drawing, such as the month. */
  readonly isSmall?: boolean;
}) {
  const ref = useRef<HTMLHeadingElement>(null);
  const { key, pathname } = useLocation();
  const isFirstPage = useRef(key === FIRST_PAGE);
  useEffect(() => {
    if (!isFirstPage.current) ref.current?.focus();
  }, [pathname]);
  return (
    <h1 ref={ref} tabIndex={-1} className={isSmall ? 'text-2xl' : 'text-2xl wide:text-3xl'}>
      {children}
    </h1>
  );
}

/** The title of the browser's tab: the page, then the product. */
export function PageTitle({ children }: { children: string }) {
  return <title>{`${children} · Ebbfolk`}</title>;
}
