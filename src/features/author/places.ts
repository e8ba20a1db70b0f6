/** Where a template document speaks of its symbols. */
import { listAt, type Pointer, valueAt } from './edit';

/** Keys below a part that hold expressions; '*' is every entry of a list. */
const EXPRESSIONS: readonly string[] = [
  '/derived/*/expression',
  '/beam/length',
  '/beam/own_weight',
  ...['at', 'kv', 'kr', 'rise', 'rotation', 'when'].map((key) => `/beam/supports/*/${key}`),
  ...['at', 'when'].map((key) => `/beam/hinges/*/${key}`),
  ...['from', 'to', 'ei'].map((key) => `/beam/segments/*/${key}`),
  ...['at', 'p', 'from', 'to', 'w0', 'w1', 'm', 'kappa', 'when'].map((key) => `/beam/loads/*/${key}`),
  ...['at', 'when'].map((key) => `/beam/redundants/*/${key}`),
  ...['from', 'to', 'when'].map((key) => `/beam/dimensions/*/${key}`),
  ...['expression', 'shown/expression'].map((key) => `/rules/*/${key}`),
  ...['expression', 'when'].map((key) => `/results/*/${key}`),
  ...['exact', 'times', 'over'].map((key) => `/proof_cases/*/expect/*/${key}`),
];

/** Places on the beam, which move when something is put before them. */
const PLACES: readonly string[] = [
  '/beam/supports/*/at',
  '/beam/hinges/*/at',
  ...['from', 'to'].map((key) => `/beam/segments/*/${key}`),
  ...['at', 'from', 'to'].map((key) => `/beam/loads/*/${key}`),
  '/beam/redundants/*/at',
  ...['from', 'to'].map((key) => `/beam/dimensions/*/${key}`),
];

/** What is read off the beam: where a result or an expectation looks. */
const READINGS: readonly string[] = ['/results/*/quantity', '/proof_cases/*/expect/*/quantity'];
const PLACE_KEYS = ['shear', 'moment', 'slope', 'deflection', 'from'];

/** Symbols that stand alone. */
const NAMES: readonly string[] = ['/beam/loads/*/repeat', '/rules/*/repeat', '/beam/dimensions/*/symbol'];
/** Values by symbol. */
const STATED: readonly string[] = ['/rules/*/trial/parameters', '/proof_cases/*/parameters'];
/** Texts in which a symbol stands in braces. */
const MESSAGES: readonly string[] = ['/rules/*/message'];

/** The pointers that a pattern stands for in this document. */
function resolved(document: unknown, pattern: string): Pointer[] {
  const star = pattern.indexOf('/*');
  if (star < 0) return valueAt(document, pattern) === undefined ? [] : [pattern];
  const list = pattern.slice(0, star);
  return listAt(document, list).flatMap((_, index) =>
    resolved(document, `${list}/${index}${pattern.slice(star + 2)}`),
  );
}

const all = (document: unknown, patterns: readonly string[]): Pointer[] =>
  patterns.flatMap((pattern) => resolved(document, pattern));

const readings = (document: unknown, keys: readonly string[]): Pointer[] =>
  all(
    document,
    READINGS.flatMap((quantity) => keys.map((key) => `${quantity}/${key}`)),
  );

/** Every expression of the document. */
export const expressionPlaces = (document: unknown): Pointer[] => [
  ...all(document, EXPRESSIONS),
  ...readings(document, [...PLACE_KEYS, 'figure']),
];

/** Every place on the beam. */
export const beamPlaces = (document: unknown): Pointer[] => [
  ...all(document, PLACES),
  ...readings(document, PLACE_KEYS),
];

export const namePlaces = (document: unknown): Pointer[] => all(document, NAMES);
export const statedPlaces = (document: unknown): Pointer[] => all(document, STATED);
export const messagePlaces = (document: unknown): Pointer[] => all(document, MESSAGES);
