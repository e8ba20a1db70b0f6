import { createContext } from 'react';
import type { Key } from '@/engine/why';

/** Asks where a number comes from; the question is put together when it is asked. */
export type Ask = (question: () => Key | null, pressed: Element) => void;

/** Null where a page answers nothing: numbers are figures there. */
export const WhyContext = createContext<Ask | null>(null);

/** Within a grid the arrow keys go from number to number, and the Tab key stops once. */
export const InGridContext = createContext(false);
