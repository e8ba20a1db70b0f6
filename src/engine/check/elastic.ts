import type { UnitSystemName } from '../quantity/index';
import type { Criteria } from './criteria';
import { texFigure, texQuotient } from './figure';
import type { Arrangement, CheckRow, ElasticSection } from './types';

/** The largest |value| of V or M over every arrangement: the first of equals, and the leftmost place it is reached. */
function largest(arrangements: readonly Arrangement[], quantity: 'moment' | 'shear') {
  let found = { value: 0, at: 0, combination: arrangements[0]?.combination.name ?? '' };
  for (const { combination, solution } of arrangements)
    for (const { value, at } of [solution.extremes[quantity].max, solution.extremes[quantity].min])
      if (Math.abs(value) > Math.abs(found.value))
        found = { value, at: at[0] ?? 0, combination: combination.name };
  return found;
}

type Placed = (x: number) => string;

/** A stress as the action over one property of the section, the limit as a share of the strength. */
type Stress = {
  kind: 'bending' | 'shear';
  title: string;
  action: 'moment' | 'shear';
  /** What the action is divided by. */
  property: { value: number; purpose: 'section_modulus' | 'area' };
  factor: number;
  strength: number;
  symbols: string;
};

function stressRow(
  { kind, title, action, property, factor, strength, symbols }: Stress,
  arrangements: readonly Arrangement[],
  { publication, clause }: Criteria['strength']['source'],
  place: Placed,
  system: UnitSystemName,
): CheckRow {
  const { value, at, combination } = largest(arrangements, action);
  const demand = Math.abs(value) / property.value;
  const capacity = factor * strength;
  const acting = { value: Math.abs(value), purpose: action === 'moment' ? 'moment' : 'force' } as const;
  const limit = `${factor.toPrecision(4)} \\times ${texFigure(strength, 'stress', system)}`;
  return {
    id: kind,
    kind,
    title,
    place: `${place(at)}, ${combination}`,
    clause: `${publication}, ${clause}`,
    demand,
    capacity,
    dimension: 'stress',
    ratio: demand / capacity,
    combination,
    at,
    symbols,
    numbers: `${texQuotient(acting, property, 'stress', system)} \\le ${limit}`,
  };
}

/**
 * Bending: σ = M/W_el ≤ k·f over every combination, M the largest of either sign, W_el the smaller elastic modulus.
 * Navier's formula; the factor k is the practice's own (criteria). No stability of the compression flange in it.
 */
export function bendingCheck(
  arrangements: readonly Arrangement[],
  section: ElasticSection,
  { strength }: Criteria,
  place: Placed,
  system: UnitSystemName,
): CheckRow {
  const stress: Stress = {
    kind: 'bending',
    title: 'Bending stress',
    action: 'moment',
    property: { value: section.elasticModulus, purpose: 'section_modulus' },
    factor: strength.bending,
    strength: section.bendingStrength,
    symbols: '\\sigma = \\frac{|M|}{W_{el}} \\le k\\,f',
  };
  return stressRow(stress, arrangements, strength.source, place, system);
}

/**
 * Shear: τ = V·Q/(I·t) ≤ k·f over every combination, where τ is greatest in the section (Jourawski's formula).
 */
export function shearCheck(
  arrangements: readonly Arrangement[],
  section: ElasticSection,
  { strength }: Criteria,
  place: Placed,
  system: UnitSystemName,
): CheckRow {
  const stress: Stress = {
    kind: 'shear',
    title: 'Shear stress',
    action: 'shear',
    property: { value: section.shearAreaAtAxis, purpose: 'area' },
    factor: strength.shear,
    strength: section.shearStrength,
    symbols: '\\tau = \\frac{|V|\\,Q}{I\\,t} \\le k\\,f',
  };
  return stressRow(stress, arrangements, strength.source, place, system);
}
