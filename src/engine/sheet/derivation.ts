import type { DerivationStep } from '../derivation/index';
import { unitText } from '../quantity/index';
import type { SheetBlock, SheetFigure, SheetInput } from './types';

/** A single letter with its index before the equals sign that gives its value: R_B, M_A, f_{BB}. */
const LETTER = /^(?:.*\\Rightarrow\\quad )?([A-Za-z](?:_(?:\{\w+\}|\w))?)=/;

/** The worked derivation as it was stored, one step a block. */
export function derivationBlocks({ result }: SheetInput): SheetBlock[] {
  const steps = result.derivation ?? [];
  if (steps.length === 0)
    return [
      {
        kind: 'text',
        tone: 'note',
        text: 'This member was evaluated before derivations were stored. Save it again to print one.',
      },
    ];
  return [
    { kind: 'text', text: 'Under all loads together, unfactored. Worked in kN, m and mm.' },
    ...steps.map(stepBlock),
  ];
}

function stepBlock(step: DerivationStep, index: number): SheetBlock {
  const { title, symbols, numbers, note, charts } = step;
  const origin = [...new Set((charts ?? []).map(({ title: name, source }) => `${name}: ${source}`))].join(
    '; ',
  );
  return {
    kind: 'formula',
    source: `step ${index + 1}`,
    results: resultOf(step),
    title,
    symbols,
    numbers: numbers === '' ? '' : `=${numbers}`,
    ...(origin !== '' && { origin }),
    ...(note !== undefined && { note }),
  };
}

function resultOf({ symbols, display, unit }: DerivationStep): SheetFigure[] {
  if (display === '') return [];
  const letter = LETTER.exec(symbols)?.[1];
  const figure = { value: display, unit: unit === '' ? '' : unitText(unit) };
  return [letter === undefined ? figure : { letter, ...figure }];
}
