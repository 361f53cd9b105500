import { useEffect, useState } from 'react';

const PATIENCE_MS = 300;

/** A still wave of wash while something is on its way; nothing for the first 300 ms. */
export function LoadingWash({ what }: { what: string }) {
  const [isLate, setIsLate] = useState(false);
  useEffect(() => {
    const timer = setTimeout(() => setIsLate(true), PATIENCE_MS);
    return () => clearTimeout(timer);
  }, []);
  return (
    <div className="min-h-56" role="status">
      {isLate && (
        <>
          <svg
            className="block h-24 w-full"
            viewBox="0 0 140 62"
            preserveAspectRatio="none"
            aria-hidden
          >
            <path
              className="fill-wash"
              d="M0 26C18 8 34 10 52 22S84 44 104 38 128 18 140 16V62H0Z"
            />
          </svg>
          <p className="mt-2 text-ui text-barnacle">Loading {what}</p>
        </>
      )}
    </div>
  );
}
