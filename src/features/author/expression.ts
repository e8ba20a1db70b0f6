/** One expression while it is typed: what it is, what its place takes, and how it may go on. It loads the parser. */
import { DIMENSION_NAMES, DIMENSIONS, type DimensionName, nameDimension } from '@/engine/quantity';
import { dimensionOf, type Tree } from '@/engine/template';
import {
  columnKinds,
  type Declared,
  type Expected,
  expressionFaults,
  figureKinds,
  isSymbol,
  type Kinds,
  kindsOf,
  nameKind,
  ruleKinds,
  type Spoken,
} from '@/engine/template/author';
import { parseExpression } from '@/engine/template/parse';
import type { Written } from '@/features/review/draft';
import { listAt, textAt } from './edit';

export type { Expected };

/** What an expression may speak of: of a beam, of a rule (the result besides), of a figure (reactions besides). */
export type Scene = 'beam' | 'rule' | 'figure';

/** As much as the document declares, whatever else is wrong with it. */
function spokenOf(document: Written): Spoken {
  return {
    parameters: listAt(document, '/parameters').flatMap(declared),
    derived: listAt(document, '/derived').flatMap((entry) => {
      const parsing = parseExpression(textAt(entry, '/expression'));
      const symbol = textAt(entry, '/symbol');
      return parsing.ok && isSymbol(symbol) ? [{ symbol, expression: { tree: parsing.tree } }] : [];
    }),
    beam: {
      supports: listAt(document, '/beam/supports').map((support) => ({
        when: textAt(support, '/when') || undefined,
      })),
    },
  };
}

const dimensionNamed = (name: string): DimensionName | undefined =>
  DIMENSION_NAMES.find((known) => known === name);

function declared(entry: unknown): Declared[] {
  const symbol = textAt(entry, '/symbol');
  if (!isSymbol(symbol)) return [];
  switch (textAt(entry, '/kind')) {
    case 'quantity': {
      const dimension = dimensionNamed(textAt(entry, '/dimension'));
      return dimension ? [{ kind: 'quantity', symbol, dimension }] : [];
    }
    case 'choice': {
      const options = listAt(entry, '/options').map((option) => ({ value: textAt(option, '/value') }));
      return [{ kind: 'choice', symbol, options }];
    }
    case 'group':
      return [{ kind: 'group', symbol }];
    case 'rows':
      return [{ kind: 'rows', symbol, columns: listAt(entry, '/columns').flatMap(declared) }];
    default:
      return [];
  }
}

/** Kinds by symbol of everything that an expression may speak of here; `repeat` is the list whose rows it is for. */
export function kindsIn(document: Written, scene: Scene, repeat = ''): Kinds {
  const spoken = spokenOf(document);
  const kinds = { beam: kindsOf, rule: ruleKinds, figure: figureKinds }[scene](spoken);
  const list = spoken.parameters.find(({ symbol }) => symbol === repeat);
  return list?.kind === 'rows' ? new Map([...kinds, ...columnKinds(list.columns)]) : kinds;
}

export interface Reading {
  /** What it is, in words: "a length"; '' where it cannot be read. */
  readonly is: string;
  /** What is wrong, and what to do. */
  readonly fault?: string | undefined;
}

/** An expression against what its place takes. An empty text has no fault here: its place says whether it may be. */
export function readAs(text: string, wanted: Expected, kinds: Kinds): Reading {
  if (text.trim() === '') return { is: '' };
  const parsing = parseExpression(text);
  if (!parsing.ok) return { is: '', fault: parsing.message };
  const reading = dimensionOf(parsing.tree, kinds);
  if (!reading.ok) return { is: '', fault: reading.message };
  const [fault] = expressionFaults({ text, tree: parsing.tree }, wanted, kinds, []);
  return { is: nameKind(reading.kind), fault: fault?.message };
}

/** What a place takes, in words: "a length", "a condition". */
export function wantedWords(wanted: Expected): string {
  if (wanted === 'condition') return 'a condition';
  return wanted === 'any number' ? 'a number' : nameDimension(DIMENSIONS[wanted]);
}

/** Whether a symbol alone would do. */
export const fits = (symbol: Tree, wanted: Expected, kinds: Kinds): boolean =>
  typeof symbol === 'string' &&
  expressionFaults({ text: symbol, tree: symbol }, wanted, kinds, []).length === 0;
