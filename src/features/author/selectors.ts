/** What can be read off a solved beam, as an author picks it. */
import type { DimensionName } from '@/engine/quantity';
import { type Selector, selectorDimension } from '@/engine/template';
import { textAt, valueAt } from './edit';

export const QUANTITY_NAMES = {
  reaction: 'Reaction',
  'largest-moment': 'Largest moment',
  'largest-deflection': 'Largest deflection',
  moment: 'Moment at a place',
  shear: 'Shear at a place',
  deflection: 'Deflection at a place',
  slope: 'Slope at a place',
  contraflexure: 'Point of contraflexure',
  figure: 'A figure made of these',
} as const;
type QuantityName = keyof typeof QUANTITY_NAMES;

/** Each as it begins. */
const BEGINNINGS: Readonly<Record<QuantityName, object>> = {
  reaction: { reaction: 'A' },
  'largest-moment': { largest: 'moment', sense: 'sagging' },
  'largest-deflection': { largest: 'deflection', sense: 'down' },
  moment: { moment: '' },
  shear: { shear: '' },
  deflection: { deflection: '', sense: 'down' },
  slope: { slope: '', sense: 'clockwise' },
  contraflexure: { contraflexure: 0 },
  figure: { figure: '', dimension: 'force' },
};

export const beginningOf = (name: string): object =>
  Object.entries(BEGINNINGS).find(([known]) => known === name)?.[1] ?? BEGINNINGS.reaction;

export function quantityName(quantity: unknown): QuantityName {
  if (typeof quantity !== 'object' || quantity === null) return 'reaction';
  if ('largest' in quantity)
    return quantity.largest === 'deflection' ? 'largest-deflection' : 'largest-moment';
  const names = Object.keys(BEGINNINGS) as QuantityName[];
  return names.find((name) => name in quantity) ?? 'reaction';
}

/** Dimension of what is read. */
export const quantityDimension = (quantity: unknown): DimensionName =>
  typeof quantity === 'object' && quantity !== null ? selectorDimension(quantity as Selector) : 'ratio';

/** In one line: "reaction at B", "moment at L/2". */
export function quantityWords(quantity: unknown): string {
  const name = quantityName(quantity);
  const text = (key: string) => textAt(quantity, `/${key}`) || '?';
  switch (name) {
    case 'reaction':
      return `${textAt(quantity, '/component') === 'moment' ? 'moment reaction' : 'reaction'} at ${text('reaction')}`;
    case 'largest-moment':
      return placeWords(quantity, `largest ${text('sense')} moment`);
    case 'largest-deflection':
      return placeWords(quantity, `largest deflection ${text('sense')}`);
    case 'contraflexure':
      return `contraflexure ${Number(valueAt(quantity, '/contraflexure')) + 1}`;
    case 'figure':
      return text('figure');
    default:
      return `${name} at ${text(name)}`;
  }
}

const placeWords = (quantity: unknown, words: string): string =>
  textAt(quantity, '/read') === 'position' ? `place of the ${words}` : words;
