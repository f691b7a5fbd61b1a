import { useEffect, useRef, useState, type RefObject } from 'react';

/** The width of a figure's place in px, so that it is drawn anew for each width and never shrunk. */
export function useWidth<T extends HTMLElement>(before: number): [RefObject<T | null>, number] {
  const ref = useRef<T>(null);
  const [width, setWidth] = useState(before);
  useEffect(() => {
    const element = ref.current;
    if (!element) return;
    const observer = new ResizeObserver((entries) => {
      const seen = Math.round(entries[0]!.contentRect.width);
      if (seen > 0) setWidth(seen);
    });
    observer.observe(element);
    return () => observer.disconnect();
  }, []);
  return [ref, width];
}
