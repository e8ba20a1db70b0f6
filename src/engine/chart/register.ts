import type { Expression } from './expression';
import { formula } from './formula';

/** Deflection, positive down, and its slope along x, positive clockwise: what the printed charts mean by Δ and θ. */
export type Movement = 'deflection' | 'slope';
type Curve = Readonly<Record<Movement, Expression>>;

type Source = { work: string; edition: string; table: string; entry: string; fromMemory: boolean };

/**
 * One published closed form. x is measured from the fixed end of a cantilever, or from the left support of a simple
 * span of length L; a is where the load is, or how far it reaches from there. Loads are positive down, couples
 * clockwise, curvature sagging. Validity, for every case: straight, one EI, bending only, small deflection.
 */
export type ChartCase = {
  id: string;
  released: 'cantilever' | 'simple';
  title: string;
  validity: string;
  /** Where x ≤ a, or everywhere if there is no `beyond`. */
  within: Curve;
  /** Where x ≥ a. */
  beyond: Curve | null;
  source: Source;
};

const MANUAL = { work: 'Steel Construction Manual (AISC)', edition: '15th', table: '3-23', fromMemory: true };
const ROARK = {
  work: 'Roark’s Formulas for Stress and Strain',
  edition: '8th',
  table: '8.1',
  fromMemory: true,
};
const OWN = {
  work: 'own derivation',
  edition: '',
  table: '',
  entry: 'EI·δ″ = −M integrated twice',
  fromMemory: false,
};
const manual = (entry: string): Source => ({ ...MANUAL, entry });
const roark = (entry: string): Source => ({ ...ROARK, entry });

type Formulas = readonly [deflection: string, slope: string];

function chartCase(
  id: string,
  title: string,
  validity: string,
  source: Source,
  within: Formulas,
  beyond?: Formulas,
): ChartCase {
  const curve = ([deflection, slope]: Formulas): Curve => ({
    deflection: formula(deflection),
    slope: formula(slope),
  });
  const released = id.startsWith('cantilever') ? 'cantilever' : 'simple';
  return {
    id,
    released,
    title,
    validity,
    within: curve(within),
    beyond: beyond ? curve(beyond) : null,
    source,
  };
}

const CASES = [
  chartCase(
    'cantilever-point',
    'Cantilever, point load P at a',
    'a ≥ 0',
    manual('21'),
    ['P*x^2*(3*a-x)/(6*EI)', 'P*x*(2*a-x)/(2*EI)'],
    ['P*a^2*(3*x-a)/(6*EI)', 'P*a^2/(2*EI)'],
  ),
  chartCase(
    'cantilever-uniform',
    'Cantilever, uniform load w over a from the fixed end',
    'a ≥ 0',
    manual('19'),
    ['w*x^2*(6*a^2-4*a*x+x^2)/(24*EI)', 'w*x*(3*a^2-3*a*x+x^2)/(6*EI)'],
    ['w*a^3*(4*x-a)/(24*EI)', 'w*a^3/(6*EI)'],
  ),
  chartCase(
    'cantilever-rising',
    'Cantilever, load rising from 0 at the fixed end to w at a',
    'a > 0',
    roark('2a'),
    ['w*x^2*(20*a^3-10*a^2*x+x^3)/(120*a*EI)', 'w*x*(8*a^3-6*a^2*x+x^3)/(24*a*EI)'],
    ['w*a^3*(15*x-4*a)/(120*EI)', 'w*a^3/(8*EI)'],
  ),
  chartCase(
    'cantilever-falling',
    'Cantilever, load falling from w at the fixed end to 0 at a',
    'a > 0',
    manual('18'),
    ['w*x^2*(10*a^3-10*a^2*x+5*a*x^2-x^3)/(120*a*EI)', 'w*x*(4*a^3-6*a^2*x+4*a*x^2-x^3)/(24*a*EI)'],
    ['w*a^3*(5*x-a)/(120*EI)', 'w*a^3/(24*EI)'],
  ),
  chartCase(
    'cantilever-couple',
    'Cantilever, couple M at a',
    'a ≥ 0',
    roark('3a'),
    ['M*x^2/(2*EI)', 'M*x/EI'],
    ['M*a*(2*x-a)/(2*EI)', 'M*a/EI'],
  ),
  chartCase(
    'cantilever-curvature',
    'Cantilever, free curvature κ over a from the fixed end',
    'a ≥ 0',
    roark('6a'),
    ['-kappa*x^2/2', '-kappa*x'],
    ['-kappa*a*(2*x-a)/2', '-kappa*a'],
  ),
  chartCase('cantilever-movement', 'Cantilever, the fixed end settles s and turns φ', 'any x', roark('4a'), [
    's+phi*x',
    'phi',
  ]),
  chartCase(
    'simple-point',
    'Simple span, point load P at a',
    '0 ≤ a ≤ L',
    manual('8'),
    ['P*(L-a)*x*(2*a*L-a^2-x^2)/(6*L*EI)', 'P*(L-a)*(2*a*L-a^2-3*x^2)/(6*L*EI)'],
    ['P*a*(L-x)*(2*L*x-x^2-a^2)/(6*L*EI)', 'P*a*(2*L^2-6*L*x+3*x^2+a^2)/(6*L*EI)'],
  ),
  chartCase(
    'simple-uniform',
    'Simple span, uniform load w over a from the left support',
    '0 ≤ a ≤ L',
    manual('5'),
    [
      'w*x*(a^2*(2*L-a)^2-2*a*x^2*(2*L-a)+L*x^3)/(24*L*EI)',
      'w*(a^2*(2*L-a)^2-6*a*x^2*(2*L-a)+4*L*x^3)/(24*L*EI)',
    ],
    ['w*a^2*(L-x)*(4*L*x-2*x^2-a^2)/(24*L*EI)', 'w*a^2*(4*L^2-12*L*x+6*x^2+a^2)/(24*L*EI)'],
  ),
  chartCase(
    'simple-rising',
    'Simple span, load rising from 0 at the left support to w at the right',
    'over the whole span',
    manual('2'),
    ['w*x*(7*L^4-10*L^2*x^2+3*x^4)/(360*L*EI)', 'w*(7*L^4-30*L^2*x^2+15*x^4)/(360*L*EI)'],
  ),
  chartCase(
    'simple-couple',
    'Simple span, couple M at a',
    '0 ≤ a ≤ L',
    roark('3e'),
    ['M*x*(2*L^2-6*a*L+3*a^2+x^2)/(6*L*EI)', 'M*(2*L^2-6*a*L+3*a^2+3*x^2)/(6*L*EI)'],
    ['M*(L-x)*(2*L*x-x^2-3*a^2)/(6*L*EI)', 'M*(2*L^2-6*L*x+3*x^2+3*a^2)/(6*L*EI)'],
  ),
  chartCase(
    'simple-curvature',
    'Simple span, free curvature κ over a from the left support',
    '0 ≤ a ≤ L',
    OWN,
    ['kappa*x*(2*a*L-a^2-L*x)/(2*L)', 'kappa*(2*a*L-a^2-2*L*x)/(2*L)'],
    ['kappa*a^2*(L-x)/(2*L)', '-kappa*a^2/(2*L)'],
  ),
  chartCase('simple-movement', 'Simple span, the left support settles s, the right one t', 'any x', OWN, [
    's*(L-x)/L+t*x/L',
    '(t-s)/L',
  ]),
] as const;

/** The register, in the order of the printed tables: cantilevers, then simple spans. */
export const CHART: readonly ChartCase[] = CASES;

/** A case by its id. Fails with RangeError for an id that is not in the register. */
export function chart(id: string): ChartCase {
  const found = CASES.find((entry) => entry.id === id);
  if (!found) throw new RangeError(`no chart case is called ${id}`);
  return found;
}
