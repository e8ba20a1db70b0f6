export { derive } from './derive';
export type {
  ChartUse,
  DerivationStep,
  DeriveInput,
  DisplayUnit,
  Figure,
  LoadName,
  NamedLength,
} from './types';
