export { formatValue } from './format';
export { recompute } from './recompute';
export { numbersTex, symbolsTex } from './tex';
export type * from './types';
export { Traces } from './why';
