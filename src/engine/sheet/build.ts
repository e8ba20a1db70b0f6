import { basisBlocks } from './basis';
import { checkBlocks } from './checks';
import { combinationBlocks } from './combinations';
import { derivationBlocks } from './derivation';
import { figuresOf } from './figures';
import { givensTable } from './givens';
import { reactionBlocks } from './reactions';
import { resultBlocks } from './results';
import { sectionBlocks } from './section';
import type { SheetBlock, SheetCaution, SheetInput } from './types';

/**
 * The calc sheet of a member as blocks, in the order in which a checker reads: what it covers, givens, combinations, drawing,
 * derivation, results, section, checks, reactions, cautions. Every figure is one that was stored, shown in the units and
 * the rounding of the job's unit system; nothing is solved here.
 */
export function buildSheet(input: SheetInput): SheetBlock[] {
  const figures = figuresOf(input.system);
  const sections: [title: string, blocks: SheetBlock[]][] = [
    ['What this sheet covers', covers(input)],
    ['Givens', [givensTable(input, figures), ...basisBlocks(input, figures)]],
    ['Combinations and patterns', combinationBlocks(input)],
    ['Elevation and diagrams: all loads together, unfactored', [drawing(input)]],
    ['Derivation', derivationBlocks(input)],
    ['Results', resultBlocks(input, figures)],
    ['Section properties used', sectionBlocks(input, figures)],
    ['Checks, governing first', checkBlocks(input, figures)],
    ['Reactions to hand on', reactionBlocks(input, figures)],
    ['Cautions', cautionBlocks(input.cautions)],
  ];
  return sections.flatMap(([title, blocks], k) => [{ kind: 'heading', number: k + 1, title }, ...blocks]);
}

/** What is printed in place of a sheet without a result: what it covers, why there are no figures, and the cautions. */
export const buildFaultSheet = (
  input: Pick<SheetInput, 'purpose' | 'basis' | 'template' | 'cautions'>,
  message: string,
): SheetBlock[] => [
  { kind: 'heading', number: 1, title: 'What this sheet covers' },
  ...covers(input),
  { kind: 'heading', number: 2, title: 'No result' },
  { kind: 'text', tone: 'warning', text: message },
  { kind: 'heading', number: 3, title: 'Cautions' },
  ...cautionBlocks(input.cautions),
];

function covers({
  purpose,
  basis,
  template,
}: Pick<SheetInput, 'purpose' | 'basis' | 'template'>): SheetBlock[] {
  const { reference, name, revision } = template;
  const text = `${purpose === '' ? 'No purpose is given.' : purpose} Made from ${reference}, ${name}, revision ${revision}.`;
  return [
    { kind: 'text', source: `${reference} rev ${revision}`, text },
    ...(basis === '' ? [] : [{ kind: 'text', text: `Basis of the job: ${basis}` } as const]),
  ];
}

function drawing({ result }: SheetInput): SheetBlock {
  const { beam, total, lengths, load_names, section } = result;
  return {
    kind: 'drawing',
    beam,
    solution: total,
    lengths,
    loads: load_names,
    ...(section && { depth: section.depth }),
  };
}

const cautionBlocks = (cautions: readonly SheetCaution[]): SheetBlock[] =>
  cautions.map(({ text, version }) => ({ kind: 'caution', text, version }));
