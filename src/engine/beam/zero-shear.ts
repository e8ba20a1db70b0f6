import { signChanges } from '../polynomial/index';
import type { Solution } from './types';

/**
 * Where the shear changes its sign, ascending: through zero, or by a jump under a force or at a support. There the
 * moment has its peaks. Where it stays zero in between, the two ends of that stretch.
 */
export const zeroShear = ({ diagrams }: Pick<Solution, 'diagrams'>): number[] => signChanges(diagrams.shear);
