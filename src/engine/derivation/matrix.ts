import { texOf } from '../chart/index';
import { display } from './display';
import { type Letters, numberTex, toTex } from './symbols';
import { numbersOf, type System } from './system';
import type { DerivationStep } from './types';
import { acts, gapTex, type Unknown } from './unknown';
import type { Worked } from './values';
import { workSymbols } from './virtual-work';
import { countWord, listed, nameForce, negativeNote, sentence } from './words';

const matrix = (rows: readonly (readonly string[])[]): string =>
  `\\begin{bmatrix}${rows.map((row) => row.join('&')).join('\\\\')}\\end{bmatrix}`;
const column = (entries: readonly string[]): string => matrix(entries.map((entry) => [entry]));

const listing = { value: null, unit: '' as const, display: '' };

/** A matrix beyond this size would not fit a page. */
const PRINTABLE = 8;

/** F with its letters and with its numbers. */
export function matrixStep({ beam, unknowns }: Worked, system: System): DerivationStep {
  const isPrinted = unknowns.length <= PRINTABLE;
  const letters = matrix(system.coefficients.map((row) => row.map((tex) => tex ?? '0')));
  return {
    id: 'matrix',
    title: 'Flexibility matrix: positive on its diagonal, symmetric by reciprocity',
    symbols: `\\mathbf{F}=${isPrinted ? letters : '\\left[f_{ij}\\right]'}`,
    numbers: isPrinted ? matrix(numbersOf(system).coefficients.map((row) => row.map(signed))) : '',
    ...listing,
    note: unitsNote(beam.letters, unknowns),
  };
}

const signed = (value: number): string => `${value < 0 ? '-' : ''}${numberTex(Math.abs(value))}`;

/** "In mm, mrad, kN and kNm." */
function unitsNote({ units }: Letters, unknowns: readonly Unknown[]): string {
  const has = (kind: 'force' | 'moment') => unknowns.some((unknown) => acts(unknown) === kind);
  const used = [
    ...(has('force') ? [units.of('deflection', 'handed')] : []),
    ...(has('moment') ? [units.of('rotation', 'handed')] : []),
    ...(has('force') ? [units.of('force', 'handed')] : []),
    ...(has('moment') ? [units.of('moment', 'handed')] : []),
  ];
  const isMixed = units.system === 'us' && has('force') && has('moment');
  const apart = isMixed
    ? ' A pair of a force and a moment differs by its units alone: 1 in is 1000/12 thousandths of a foot.'
    : '';
  return `In ${listed(used)}.${apart}`;
}

/** Beyond a few redundants: the gaps, F and the redundants as matrices. Their letters are defined. */
export function matrixSteps(worked: Worked, system: System): DerivationStep[] {
  const { beam, unknowns, gaps, values } = worked;
  const { letters } = beam;
  const { units } = letters;
  const shown = (value: number, kind: Parameters<typeof units.of>[0], alike: readonly number[]) => {
    const largest = Math.max(...alike.map(Math.abs));
    return toTex(display(value, units.of(kind, 'handed'), largest));
  };
  const count = countWord(unknowns.length);
  const negative = unknowns.filter((_, i) => values[i]! < 0);
  return [
    {
      id: 'gaps',
      title: `The ${count} movements of the released beam at the redundants`,
      symbols: `\\mathbf{\\Delta}_{0}=${column(unknowns.map((unknown) => gapTex(unknown)))},\\quad \\Delta_{i0}=${workSymbols(beam, { own: 'i', other: '0', isLoaded: true })}`,
      numbers: column(
        gaps.map((gap, i) =>
          shown(
            gap,
            system.kinds[i]!,
            gaps.filter((_, j) => system.kinds[j] === system.kinds[i]),
          ),
        ),
      ),
      ...listing,
      note: unitsNote(letters, unknowns),
      figure: { structure: 'released' },
    },
    { ...matrixStep(worked, system), figure: { structure: 'unit', redundant: 0 } },
    {
      id: 'compatibility',
      title: `${sentence(count)} movements must be closed at once`,
      symbols: `\\mathbf{F}\\,\\mathbf{X}=\\mathbf{d}=${column(system.rights.map((right) => texOf(right, letters.symbols())))}`,
      numbers: column(numbersOf(system).right.map(signed)),
      ...listing,
      note: unitsNote(letters, unknowns),
      figure: { structure: 'built' },
    },
    {
      id: 'redundants',
      title: `${listed(unknowns.map((unknown, k) => nameForce(unknown, k === 0 ? 'first' : 'within')))}`,
      symbols: `\\mathbf{X}=${column(unknowns.map(({ tex }) => tex))}=\\mathbf{F}^{-1}\\,\\mathbf{d}`,
      numbers: column(
        values.map((value, i) =>
          shown(
            value,
            acts(unknowns[i]!),
            values.filter((_, j) => acts(unknowns[j]!) === acts(unknowns[i]!)),
          ),
        ),
      ),
      ...listing,
      key: true,
      note: [unitsOfForces(letters, unknowns), ...negative.map(negativeNote)].join(' '),
    },
  ];
}

function unitsOfForces({ units }: Letters, unknowns: readonly Unknown[]): string {
  const kinds = [...new Set(unknowns.map(acts))];
  return `In ${listed(kinds.map((kind) => units.of(kind, 'handed')))}.`;
}
