/** A place of a template document, in the words of its form. */
import { supportLetter } from '@/engine/model';
import type { Written } from '@/features/review/draft';
import { keysOf, type Pointer, textAt } from './edit';

const PARTS: Readonly<Record<string, string>> = {
  name: 'Title',
  reference: 'Reference',
  arrangement: 'Arrangement',
  load_kinds: 'Kinds of load',
  tags: 'Tags',
  summary: 'Summary',
  you_give: 'You give',
  you_get: 'You get',
  use: 'Use for',
  do_not_use: 'Do not use for',
  method: 'Method',
  parameters: 'Parameters',
  derived: 'Derived values',
  stiffness: 'Stiffness',
  rules: 'Rules',
  results: 'Closed forms',
  sources: 'Sources',
  proof_cases: 'Proof cases',
  'beam/length': 'Length of the beam',
  'beam/own_weight': 'Share of own weight',
  'beam/supports': 'Supports',
  'beam/hinges': 'Hinges',
  'beam/segments': 'Lengths of other stiffness',
  'beam/loads': 'Loads',
  'beam/redundants': 'Redundants',
  'beam/dimensions': 'Dimension lines',
};

const ONE: Readonly<Record<string, string>> = {
  parameters: 'Parameter',
  derived: 'Derived value',
  rules: 'Rule',
  results: 'Closed form',
  sources: 'Source',
  proof_cases: 'Proof case',
  'beam/supports': 'Support',
  'beam/hinges': 'Hinge',
  'beam/segments': 'Length',
  'beam/loads': 'Load',
  'beam/redundants': 'Redundant',
  'beam/dimensions': 'Dimension line',
};

/** "Parameter L: largest", "Support B: place". */
export function placeWords(document: Written, pointer: Pointer): string {
  const keys = keysOf(pointer);
  const depth = keys[0] === 'beam' ? 2 : 1;
  const part = keys.slice(0, depth).join('/');
  const [index, ...rest] = keys.slice(depth);
  const one = ONE[part];
  if (one === undefined || index === undefined)
    return [
      PARTS[part] ?? (part || 'The whole document'),
      ...[index, ...rest].filter((key) => key !== undefined),
    ]
      .slice(0, 2)
      .join(': ');
  const entry = `/${part}/${index}`;
  const called =
    part === 'beam/supports'
      ? supportLetter(Number(index))
      : textAt(document, `${entry}/symbol`) || textAt(document, `${entry}/name`) || String(Number(index) + 1);
  return `${one} ${called}${rest.length > 0 ? `: ${fieldWords(rest)}` : ''}`;
}

const FIELDS: Readonly<Record<string, string>> = {
  at: 'place',
  min: 'smallest',
  max: 'largest',
  tex: 'in formulas',
  help: 'what it is',
  printed: 'value',
  id: 'id',
};

const fieldWords = (keys: readonly string[]): string =>
  keys
    .filter((key) => !/^\d+$/.test(key))
    .map((key) => FIELDS[key] ?? key.replaceAll('_', ' '))
    .join(', ');
