/** How influence lines and their effects are named, signed and written on the page. */
import { figure } from '@/components/drawing/format';
import { DRAWING_FORMATS } from '@/components/drawing/quantity-format';
import { lift, type Quantity, signRule, toScreen } from '@/components/drawing/signs';
import type { InfluenceQuantity } from '@/engine/influence';
import { type Beam, letteredSupports } from '@/engine/model';
import {
  formatNumber,
  fromUnit,
  toUnit,
  UNIT_SYSTEMS,
  type UnitSystemName,
  unitText,
} from '@/engine/quantity';
import { hasSides } from './choices';

/** How the ordinates and the effects of a line are written. */
export interface Script {
  /** Whose line and colour it is drawn in. */
  readonly quantity: Quantity;
  /** Above the baseline where a positive value is drawn upward. */
  readonly up: 1 | -1;
  readonly sign: string;
  /** Of an ordinate: m, mm/kN; nothing for a force of a force. */
  readonly unit: string;
  readonly ordinate: (engineValue: number) => string;
  /** With its unit: "93.8 kNm". */
  readonly effect: (engineValue: number) => string;
}

export function scriptFor(quantity: InfluenceQuantity, system: UnitSystemName): Script {
  const drawn = drawnAs(quantity);
  const format = DRAWING_FORMATS[system];
  const purpose = drawn === 'shear' ? 'force' : drawn === 'moment' ? 'moment' : 'deflection';
  const { unit, size, digits } = ORDINATES[drawn](system);
  const isCouple = quantity.kind === 'reaction' && quantity.component === 'rotation';
  const isForce = quantity.kind === 'reaction' && !isCouple;
  return {
    quantity: drawn,
    up: isCouple ? 1 : lift(drawn),
    sign: isCouple ? 'anticlockwise: +' : isForce ? 'upward: +' : signRule(drawn),
    unit,
    ordinate: (value) => formatNumber(toScreen(drawn, value) / size, digits),
    effect: (value) => figure(format, purpose, toScreen(drawn, value)),
  };
}

/** An ordinate with its unit. */
export const ordinateText = ({ ordinate, unit }: Script, value: number): string =>
  unit === '' ? ordinate(value) : `${ordinate(value)} ${unit}`;

function drawnAs(quantity: InfluenceQuantity): 'shear' | 'moment' | 'deflection' {
  if (quantity.kind !== 'reaction') return quantity.kind;
  return quantity.component === 'vertical' ? 'shear' : 'moment';
}

/** The unit of an ordinate, its size in SI, and its decimals. */
const ORDINATES = {
  shear: () => ({ unit: '', size: 1, digits: { places: 3 } }),
  moment: (system: UnitSystemName) => {
    const unit = system === 'us' ? 'ft' : 'm';
    return { unit, size: fromUnit(1, unit), digits: { places: 3 } };
  },
  deflection: (system: UnitSystemName) => {
    const { deflection, force } = UNIT_SYSTEMS[system];
    const size = fromUnit(1, deflection.unit) / fromUnit(1, force.unit);
    return { unit: `${deflection.unit}/${force.unit}`, size, digits: { significant: 3 } };
  },
} as const;

/** "1 kN/m" of the person's units, N/m. */
export function unitLoad(system: UnitSystemName): { size: number; text: string } {
  const { unit } = UNIT_SYSTEMS[system].line_load;
  return { size: fromUnit(1, unit), text: `1 ${unitText(unit)}` };
}

/** A station as it is printed: the support's letter, or the distance from the left end with its unit. */
export function stationText(beam: Beam, x: number, system: UnitSystemName): string {
  const named = letteredSupports(beam).find(
    ({ support }) =>
      Math.abs(support.at - x) < beam.length * 1e-6 &&
      (support.vertical.kind !== 'free' || support.rotation.kind !== 'free'),
  );
  return named?.letter ?? lengthText(x, system);
}

export const lengthText = (x: number, system: UnitSystemName): string =>
  figure(DRAWING_FORMATS[system], 'length', x);

/** "Moment at 3.000 m", "Shear just left of B", "Reaction at B" */
export function titleOf(beam: Beam, quantity: InfluenceQuantity, system: UnitSystemName): string {
  if (quantity.kind === 'reaction') {
    const at = stationText(beam, beam.supports[quantity.support]!.at, system);
    return `${quantity.component === 'vertical' ? 'Reaction' : 'Moment reaction'} at ${at}`;
  }
  const name = { shear: 'Shear', moment: 'Moment', deflection: 'Deflection' }[quantity.kind];
  const place = stationText(beam, quantity.at, system);
  const isSided = quantity.kind !== 'deflection' && hasSides(beam, quantity.kind, quantity.at);
  return isSided ? `${name} just ${quantity.side} of ${place}` : `${name} at ${place}`;
}

/** Newtons in the person's unit of force. */
export const forceText = (force: number, system: UnitSystemName): string =>
  formatNumber(toUnit(force, UNIT_SYSTEMS[system].force.unit), UNIT_SYSTEMS[system].force);

/** A moment with its unit, sagging positive. */
export const momentText = (moment: number, system: UnitSystemName): string =>
  figure(DRAWING_FORMATS[system], 'moment', moment);
