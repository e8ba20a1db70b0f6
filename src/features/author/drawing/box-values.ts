/** Values at the ends of a draft's ranges. */
import type { Template } from '@/engine/template';
import type { StatedValues } from '../edit';

/** Lengths, springs and the like at one end of their ranges; loads, choices and lists stay as they are. */
export const atEnds = ({ parameters }: Pick<Template, 'parameters'>, end: 'min' | 'max'): StatedValues =>
  Object.fromEntries(
    parameters.flatMap((one) =>
      one.kind === 'quantity' && one.group === undefined ? [[one.symbol, one[end]]] : [],
    ),
  );
