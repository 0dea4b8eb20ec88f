import { type ReactNode, useEffect, useRef, useState } from 'react';

/** Mounts what is heavy only once it comes near the window, so that the page above does not wait for it. */
export function WhenNear({ children, waiting }: { children: () => ReactNode; waiting: ReactNode }) {
  const place = useRef<HTMLDivElement>(null);
  const [near, setNear] = useState(false);
  useEffect(() => {
    if (!place.current) return;
    const observer = new IntersectionObserver(
      (entries) => {
        if (entries.some(({ isIntersecting }) => isIntersecting)) setNear(true);
      },
      { rootMargin: '400px' },
    );
    observer.observe(place.current);
    return () => observer.disconnect();
  }, []);
  return near ? children() : <div ref={place}>{waiting}</div>;
}
