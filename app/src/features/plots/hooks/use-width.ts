import { useEffect, useState, type RefObject } from 'react';

/** Width of an element, whole pixels; 0 until it is known. */
export function useWidth(element: RefObject<HTMLElement | null>): number {
  const [width, setWidth] = useState(0);
  useEffect(() => {
    const { current } = element;
    if (!current) return;
    const observer = new ResizeObserver(([entry]) => setWidth(Math.floor(entry!.contentRect.width)));
    observer.observe(current);
    return () => observer.disconnect();
  }, [element]);
  return width;
}
