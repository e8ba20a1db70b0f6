import type { ArrangementNamer } from '../combination/index';
import type { CombinationEnvelope, GoverningExtreme } from '../envelope/index';
import type { UnitSystemName } from '../quantity/index';
import type { Criteria } from './criteria';
import { texFigure, texQuotient } from './figure';
import type { CheckRow, ElasticSection } from './types';

/** The largest |value| of V or M over every combination and pattern: the first of equals, where it is reached first. */
function largest(strength: readonly CombinationEnvelope[], quantity: 'moment' | 'shear') {
  let found: GoverningExtreme = {
    value: 0,
    at: [],
    combination: strength[0]?.combination.name ?? '',
    pattern: [],
  };
  for (const { extremes } of strength)
    for (const extreme of [extremes[quantity].max, extremes[quantity].min])
      if (Math.abs(extreme.value) > Math.abs(found.value)) found = extreme;
  const { value, at, combination, pattern } = found;
  return { value, at: at[0] ?? 0, by: { combination, pattern } };
}

/** How a place and the loads that act at once are said. */
export type Words = { readonly place: (x: number) => string; readonly nameOf: ArrangementNamer };

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
  { kind, title, action, property, factor, strength: resistance, symbols }: Stress,
  strength: readonly CombinationEnvelope[],
  { publication, clause }: Criteria['strength']['source'],
  words: Words,
  system: UnitSystemName,
): CheckRow {
  const { value, at, by } = largest(strength, action);
  const demand = Math.abs(value) / property.value;
  const capacity = factor * resistance;
  const acting = { value: Math.abs(value), purpose: action === 'moment' ? 'moment' : 'force' } as const;
  const limit = `${factor.toPrecision(4)} \\times ${texFigure(resistance, 'stress', system)}`;
  return {
    id: kind,
    kind,
    title,
    place: `${words.place(at)}, ${words.nameOf(by)}`,
    clause: `${publication}, ${clause}`,
    demand,
    capacity,
    dimension: 'stress',
    ratio: demand / capacity,
    ...by,
    at,
    symbols,
    numbers: `${texQuotient(acting, property, 'stress', system)} \\le ${limit}`,
  };
}

/**
 * Bending: σ = M/W_el ≤ k·f over every combination and pattern, M the largest of either sign, W_el the smaller elastic modulus.
 * Navier's formula; the factor k is the practice's own (criteria). No stability of the compression flange in it.
 */
export function bendingCheck(
  strength: readonly CombinationEnvelope[],
  section: ElasticSection,
  { strength: limits }: Criteria,
  words: Words,
  system: UnitSystemName,
): CheckRow {
  const stress: Stress = {
    kind: 'bending',
    title: 'Bending stress',
    action: 'moment',
    property: { value: section.elasticModulus, purpose: 'section_modulus' },
    factor: limits.bending,
    strength: section.bendingStrength,
    symbols: '\\sigma = \\frac{|M|}{W_{el}} \\le k\\,f',
  };
  return stressRow(stress, strength, limits.source, words, system);
}

/**
 * Shear: τ = V·Q/(I·t) ≤ k·f over every combination and pattern, where τ is greatest in the section (Jourawski's formula).
 */
export function shearCheck(
  strength: readonly CombinationEnvelope[],
  section: ElasticSection,
  { strength: limits }: Criteria,
  words: Words,
  system: UnitSystemName,
): CheckRow {
  const stress: Stress = {
    kind: 'shear',
    title: 'Shear stress',
    action: 'shear',
    property: { value: section.shearAreaAtAxis, purpose: 'area' },
    factor: limits.shear,
    strength: section.shearStrength,
    symbols: '\\tau = \\frac{|V|\\,Q}{I\\,t} \\le k\\,f',
  };
  return stressRow(stress, strength, limits.source, words, system);
}
