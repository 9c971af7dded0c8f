/** The width of an element in px, followed as it changes; 0 until it is known. */
import { useEffect, useRef, useState } from 'react';
import type { RefObject } from 'react';

export function useElementWidth<E extends HTMLElement>(): [RefObject<E | null>, number] {
  const element = useRef<E>(null);
  const [width, setWidth] = useState(0);
  useEffect(() => {
    const current = element.current;
    if (!current) return undefined;
    const measure = () => setWidth(Math.round(current.clientWidth));
    measure();
    if (typeof ResizeObserver === 'undefined') return undefined;
    const observer = new ResizeObserver(measure);
    observer.observe(current);
    return () => observer.disconnect();
  }, []);
  return [element, width];
}
