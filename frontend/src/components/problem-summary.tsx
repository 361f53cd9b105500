import type { ReactNode } from 'react';
import { useEffect, useRef } from 'react';

/**
 * What went wrong and the next step, under a rule in anemone. It takes the focus when it appears,
 * so that it is read at once wherever the reader was.
 */
export function ProblemSummary({ title, children }: { title: string; children: ReactNode }) {
  const ref = useRef<HTMLDivElement>(null);
  useEffect(() => ref.current?.focus(), []);
  return (
    <div
      ref={ref}
      tabIndex={-1}
      role="alert"
      className="mt-3 border-t-2 border-anemone py-2 text-ui max-wide:scroll-mb-20"
    >
      <p className="font-semibold">{title}</p>
      {children}
    </div>
  );
}
