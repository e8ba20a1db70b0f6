import type { Beam, Redundant } from '../model/index';
import type { UnitSystemName } from '../quantity/index';

/** Units of results in kN, m and mm, and in kip, ft and in, each with the SI unit of the value. */
export const SI_UNITS = {
  '': '',
  m: 'm',
  mm: 'm',
  mrad: 'rad',
  kN: 'N',
  kNm: 'N·m',
  kNm2: 'N·m²',
  'mm/kN': 'm/N',
  'mm/kNm': 'm/(N·m)',
  'mrad/kN': 'rad/N',
  'mrad/kNm': 'rad/(N·m)',
  ft: 'm',
  in: 'm',
  kip: 'N',
  'kip-ft': 'N·m',
  'kip-ft2': 'N·m²',
  'in/kip': 'm/N',
  'in/kip-ft': 'm/(N·m)',
  'mrad/kip': 'rad/N',
  'mrad/kip-ft': 'rad/(N·m)',
} as const;

/** The unit in which a result is shown; "" where it is a plain number or there is no single one. */
export type DisplayUnit = keyof typeof SI_UNITS;

/** What to draw beside a step: the released beam under the loads, under a unit value of one redundant, or the beam. */
type Figure = { structure: 'released' } | { structure: 'unit'; redundant: number } | { structure: 'built' };

/** A published closed form that a step uses. */
export type ChartUse = { id: string; title: string; source: string };

/**
 * One line of the worked derivation. `symbols` and `numbers` are TeX for maths mode: δ_B0 = wL⁴/8EI, then the same with
 * numbers, joined as `joinedNumbers` does. What the numbers come to, in the units of the working, is `display`.
 */
export type DerivationStep = {
  /** Unique in the derivation, e.g. "gap-B". */
  id: string;
  /** Plain words. */
  title: string;
  symbols: string;
  /** Empty where a step has no arithmetic of its own. */
  numbers: string;
  /** SI; null where the step lists several. */
  value: number | null;
  unit: DisplayUnit;
  /** The value in `unit`, to four figures, with the minus and the thin space of the screen. */
  display: string;
  /** The step that finds the redundant. */
  key?: true;
  /** A sentence that belongs under the step, such as which way a negative reaction acts. */
  note?: string;
  charts?: ChartUse[];
  figure?: Figure;
};

/** The numbers as they follow the symbols: after an equals sign, unless they are equations of their own. */
export const joinedNumbers = ({ numbers }: Pick<DerivationStep, 'numbers'>): string =>
  numbers === '' || numbers.startsWith('\\begin{aligned}') ? numbers : `=${numbers}`;

/** A length of the drawing and its letter, as TeX. */
export type NamedLength = { from: number; to: number; tex: string };
/** A load's letter, as TeX; "" where it has none. */
export type LoadName = { tex: string };

export type DeriveInput = {
  beam: Beam;
  /** The beam's own choice where left out. */
  redundants?: readonly Redundant[] | undefined;
  /** Letters of a template instance; loads in the order of the beam's. */
  names?: { lengths: readonly NamedLength[]; loads: readonly LoadName[] } | undefined;
  /** Worked in kN, m and mm, or in kip, ft and in; metric where left out. */
  system?: UnitSystemName | undefined;
};
