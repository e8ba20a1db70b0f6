/** What is said of a number in the panel. Pure. */
import type { Leaf, Method, Source, Trace } from '@/engine/why';

const METHODS: Readonly<Record<Method, string>> = {
  expression: 'An expression of the template',
  'closed form': 'A closed form',
  definition: 'By definition',
  sum: 'The sum of its parts',
  equilibrium: 'From equilibrium',
  compatibility: 'From compatibility',
  superposition: 'Superposition: the released beam, and each redundant times its unit case',
  'unit load': 'By a unit load: the work of the moments, stretch by stretch',
  combination: 'A combination: each load case times its factor',
  extreme: 'Where the derivative is zero, or something acts',
  check: 'A check of the criteria',
};

/** How a number came about, in a line. */
export function methodWords({ how }: Trace): string {
  switch (how.kind) {
    case 'formula':
      return METHODS[how.method];
    case 'solution':
      return 'The equations of compatibility, solved together';
    case 'root':
      return 'A root of the polynomial that holds from there on';
    case 'section':
      return 'Computed from the dimensions, by rectangles and fillets';
    case 'input':
      return 'Given';
    case 'station':
      return 'A place that was chosen on the page';
    case 'row':
      return how.isComputed ? 'Computed for the row of a section table' : 'A row of a section table';
    case 'material':
      return 'A material';
    case 'criteria':
      return 'The criteria';
    case 'constant':
      return 'A constant';
  }
}

export const isLeaf = (how: Trace['how']): how is Leaf =>
  !(how.kind === 'formula' || how.kind === 'solution' || how.kind === 'root' || how.kind === 'section');

/** Where a chain ends, in a few words; "" for what goes on. */
export function leafWords({ how }: Trace): string {
  if (!isLeaf(how)) return '';
  switch (how.kind) {
    case 'input':
      if (how.typed === null) return 'given';
      return how.isDefault ? `default, ${how.typed}` : `typed, ${how.typed}`;
    case 'station':
      return 'chosen on the page';
    case 'row':
      return `${how.designation}, ${how.tableName}${how.edition === null ? '' : `, edition ${how.edition}`}`;
    case 'material':
      return how.material;
    case 'criteria':
      return how.document || sourceWords(how.source);
    case 'constant':
      return how.source.text;
  }
}

const sourceWords = ({ text, fromMemory }: Source): string => `${text}${fromMemory ? ' (from memory)' : ''}`;

/** Everything that is printed of a number, for its details. */
export function sourcesOf({ how }: Trace): string[] {
  switch (how.kind) {
    case 'formula':
      return how.sources.map(sourceWords);
    case 'material':
      return [sourceWords(how.source)];
    case 'criteria':
      return [how.document, sourceWords(how.source)].filter((text) => text !== '');
    case 'constant':
      return [sourceWords(how.source)];
    case 'row':
      return [leafWords({ how } as Trace)];
    default:
      return [];
  }
}
