import { useLayoutEffect, useRef, useState } from 'react';

/** The width of an element in pixels, kept as it changes; null until it has been measured. */
export function useMeasuredWidth<E extends Element>() {
  const ref = useRef<E>(null);
  const [widthPx, setWidthPx] = useState<number | null>(null);
  useLayoutEffect(() => {
    const element = ref.current;
    if (element === null) return undefined;
    const measure = (): void => setWidthPx(Math.floor(element.getBoundingClientRect().width));
    measure();
    const observer = new ResizeObserver(measure);
    observer.observe(element);
    return () => observer.disconnect();
  }, []);
  return [ref, widthPx] as const;
}
