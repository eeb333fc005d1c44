'use client';

import { useEffect, useRef, useState, type RefObject } from 'react';

/** The width that an element has, in whole pixels; 0 before it is known. */
export function useWidth<Kind extends HTMLElement>(): readonly [RefObject<Kind | null>, number] {
  const element = useRef<Kind>(null);
  const [width, setWidth] = useState(0);
  useEffect(() => {
    const observer = new ResizeObserver(([entry]) => setWidth(Math.floor(entry.contentRect.width)));
    if (element.current) observer.observe(element.current);
    return () => observer.disconnect();
  }, []);
  return [element, width];
}
