import { type DerivationStep, joinedNumbers } from '../derivation/index';
import { type Purpose, type UnitSystemName, unitText } from '../quantity/index';
import { figuresOf } from './figures';
import type { SheetBlock, SheetFigure, SheetInput } from './types';

/** A single letter with its index before the equals sign that gives its value: R_B, M_A, f_{BB}. */
const LETTER = /^(?:.*\\Rightarrow\\quad )?([A-Za-z](?:_(?:\{\w+\}|\w))?)=/;

/** The worked derivation as it was stored, one step a block. */
export function derivationBlocks({ result, system }: SheetInput): SheetBlock[] {
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
    {
      kind: 'text',
      text: `Under all loads together, unfactored. Worked in ${workedIn(steps, system)}.`,
    },
    ...steps.map((step, index) => stepBlock(step, index, system)),
  ];
}

/** Those that were stored before a derivation was worked in the job's own units are in kN, m and mm. */
function workedIn(steps: readonly DerivationStep[], system: UnitSystemName): string {
  if (steps.some(({ unit }) => unit.startsWith('kip'))) return 'kip, ft and in';
  return `kN, m and mm${system === 'us' ? '; results also in US units' : ''}`;
}

function stepBlock(step: DerivationStep, index: number, system: UnitSystemName): SheetBlock {
  const { title, symbols, note, charts } = step;
  const origin = [...new Set((charts ?? []).map(({ title: name, source }) => `${name}: ${source}`))].join(
    '; ',
  );
  return {
    kind: 'formula',
    source: `step ${index + 1}`,
    results: resultsOf(step, system),
    title,
    symbols,
    numbers: joinedNumbers(step),
    ...(origin !== '' && { origin }),
    ...(note !== undefined && { note }),
  };
}

/** A job's own unit for what a derivation gives in kN, m and mm. */
const PURPOSES: Partial<Record<DerivationStep['unit'], Purpose>> = {
  m: 'position',
  mm: 'deflection',
  kN: 'reaction',
  kNm: 'moment',
};

function resultsOf({ symbols, display, value, unit }: DerivationStep, system: UnitSystemName): SheetFigure[] {
  if (display === '') return [];
  const letter = LETTER.exec(symbols)?.[1];
  const figure = { value: display, unit: unit === '' ? '' : unitText(unit) };
  const purpose = PURPOSES[unit];
  const own = figuresOf(system);
  return [
    letter === undefined ? figure : { letter, ...figure },
    ...(system === 'us' && purpose && value !== null
      ? [{ value: own.value(value, purpose), unit: own.unit(purpose) }]
      : []),
  ];
}
