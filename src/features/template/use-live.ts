import { type RefObject, useEffect, useState } from 'react';

const REST_MS = 90; // after the last change; the derivation stands within 150 ms of rest

/** The value once it has rested: what takes longer than a frame waits for the hand to stop. */
export function useRestedValue<T>(value: T, rest = REST_MS): T {
  const [rested, setRested] = useState(value);
  useEffect(() => {
    const timer = setTimeout(() => setRested(() => value), rest);
    return () => clearTimeout(timer);
  }, [value, rest]);
  return rested;
}

/** True from when the element first comes near the window. */
export function useNear(element: RefObject<Element | null>): boolean {
  const [isNear, setNear] = useState(false);
  useEffect(() => {
    const { current } = element;
    if (!current || isNear) return;
    const observer = new IntersectionObserver(
      ([entry]) => {
        if (entry?.isIntersecting) setNear(true);
      },
      { rootMargin: '200px' },
    );
    observer.observe(current);
    return () => observer.disconnect();
  }, [element, isNear]);
  return isNear;
}

/** A part of the page's script that is fetched when it is first needed. */
export function useLater<T>(load: () => Promise<T>, isNeeded: boolean): T | null {
  const [part, setPart] = useState<{ value: T } | null>(null);
  useEffect(() => {
    if (!isNeeded || part) return;
    let isWanted = true;
    load().then(
      (value) => isWanted && setPart({ value }),
      // What was rendered on the server stays; the next visit tries again.
      () => undefined,
    );
    return () => {
      isWanted = false;
    };
  }, [load, isNeeded, part]);
  return part?.value ?? null;
}
