import { type RefObject, useEffect, useState } from 'react';

/** Width of an element in px, so that what is drawn in it keeps the size of its letters; `initial` until it is measured. */
export function useWidth(element: RefObject<HTMLElement | null>, initial: number): number {
  const [width, setWidth] = useState(initial);
  useEffect(() => {
    if (!element.current) return;
    const observer = new ResizeObserver(([entry]) => {
      if (entry && entry.contentRect.width > 0) setWidth(Math.max(360, Math.floor(entry.contentRect.width)));
    });
    observer.observe(element.current);
    return () => observer.disconnect();
  }, [element]);
  return width;
}
