import type { CaseRow, Source } from './case';

const MANUAL = { work: 'Steel Construction Manual (AISC)', edition: '15th', table: '3-23', fromMemory: true };
const ROARK = {
  work: 'Roark’s Formulas for Stress and Strain',
  edition: '8th',
  table: '8.1',
  fromMemory: true,
};
const OWN: Source = {
  work: 'own derivation',
  edition: '',
  table: '',
  entry: 'EI·δ″ = −M integrated twice',
  fromMemory: false,
};
const OWN_SHEAR: Source = { ...OWN, entry: 'GA·δ′ = V integrated once' };
const RIGID: Source = { ...OWN, entry: 'a straight line through the supports' };
const manual = (entry: string): Source => ({ ...MANUAL, entry });
const roark = (entry: string): Source => ({ ...ROARK, entry });

const CANTILEVERS: readonly CaseRow[] = [
  {
    id: 'cantilever-point',
    title: 'Cantilever, point load P at a',
    validity: 'a ≥ 0',
    source: manual('21'),
    within: ['P*x^2*(3*a-x)/(6*EI)', 'P*x*(2*a-x)/(2*EI)'],
    beyond: ['P*a^2*(3*x-a)/(6*EI)', 'P*a^2/(2*EI)'],
  },
  {
    id: 'cantilever-uniform',
    title: 'Cantilever, uniform load w over a from the fixed end',
    validity: 'a ≥ 0',
    source: manual('19'),
    within: ['w*x^2*(6*a^2-4*a*x+x^2)/(24*EI)', 'w*x*(3*a^2-3*a*x+x^2)/(6*EI)'],
    beyond: ['w*a^3*(4*x-a)/(24*EI)', 'w*a^3/(6*EI)'],
  },
  {
    id: 'cantilever-rising',
    title: 'Cantilever, load rising from 0 at the fixed end to w at a',
    validity: 'a > 0',
    source: roark('2a'),
    within: ['w*x^2*(20*a^3-10*a^2*x+x^3)/(120*a*EI)', 'w*x*(8*a^3-6*a^2*x+x^3)/(24*a*EI)'],
    beyond: ['w*a^3*(15*x-4*a)/(120*EI)', 'w*a^3/(8*EI)'],
  },
  {
    id: 'cantilever-falling',
    title: 'Cantilever, load falling from w at the fixed end to 0 at a',
    validity: 'a > 0',
    source: manual('18'),
    within: ['w*x^2*(10*a^3-10*a^2*x+5*a*x^2-x^3)/(120*a*EI)', 'w*x*(4*a^3-6*a^2*x+4*a*x^2-x^3)/(24*a*EI)'],
    beyond: ['w*a^3*(5*x-a)/(120*EI)', 'w*a^3/(24*EI)'],
  },
  {
    id: 'cantilever-couple',
    title: 'Cantilever, couple M at a',
    validity: 'a ≥ 0',
    source: roark('3a'),
    within: ['M*x^2/(2*EI)', 'M*x/EI'],
    beyond: ['M*a*(2*x-a)/(2*EI)', 'M*a/EI'],
  },
  {
    id: 'cantilever-curvature',
    title: 'Cantilever, free curvature κ over a from the fixed end',
    validity: 'a ≥ 0',
    source: roark('6a'),
    within: ['-kappa*x^2/2', '-kappa*x'],
    beyond: ['-kappa*a*(2*x-a)/2', '-kappa*a'],
  },
  {
    id: 'cantilever-movement',
    title: 'Cantilever, the fixed end settles s and turns φ',
    validity: 'any x',
    source: roark('4a'),
    within: ['s+phi*x', 'phi'],
  },
  {
    id: 'cantilever-shear',
    title: 'Cantilever, shear: S is the area of the shear diagram from the fixed end to x',
    validity: 'one GA',
    source: OWN_SHEAR,
    within: ['S/GA', '0'],
  },
];

const SIMPLE: readonly CaseRow[] = [
  {
    id: 'simple-point',
    title: 'Simple span, point load P at a',
    validity: '0 ≤ a ≤ L',
    source: manual('8'),
    within: ['P*(L-a)*x*(2*a*L-a^2-x^2)/(6*L*EI)', 'P*(L-a)*(2*a*L-a^2-3*x^2)/(6*L*EI)'],
    beyond: ['P*a*(L-x)*(2*L*x-x^2-a^2)/(6*L*EI)', 'P*a*(2*L^2-6*L*x+3*x^2+a^2)/(6*L*EI)'],
  },
  {
    id: 'simple-uniform',
    title: 'Simple span, uniform load w over all of it',
    validity: 'over the whole span',
    source: manual('1'),
    within: ['w*x*(L^3-2*L*x^2+x^3)/(24*EI)', 'w*(L^3-6*L*x^2+4*x^3)/(24*EI)'],
  },
  {
    id: 'simple-part-uniform',
    title: 'Simple span, uniform load w over a from one support',
    validity: '0 ≤ a ≤ L',
    source: manual('5'),
    within: [
      'w*x*(a^2*(2*L-a)^2-2*a*x^2*(2*L-a)+L*x^3)/(24*L*EI)',
      'w*(a^2*(2*L-a)^2-6*a*x^2*(2*L-a)+4*L*x^3)/(24*L*EI)',
    ],
    beyond: ['w*a^2*(L-x)*(4*L*x-2*x^2-a^2)/(24*L*EI)', 'w*a^2*(4*L^2-12*L*x+6*x^2+a^2)/(24*L*EI)'],
  },
  {
    id: 'simple-rising',
    title: 'Simple span, load rising from 0 at one support to w at the other',
    validity: 'over the whole span',
    source: manual('2'),
    within: ['w*x*(7*L^4-10*L^2*x^2+3*x^4)/(360*L*EI)', 'w*(7*L^4-30*L^2*x^2+15*x^4)/(360*L*EI)'],
  },
  {
    id: 'simple-part-rising',
    title: 'Simple span, load rising from 0 at one support to w at a',
    validity: '0 < a ≤ L',
    source: OWN,
    within: [
      'w*x*(40*L^2*a^3-45*L*a^4+12*a^5-30*L*a^2*x^2+20*a^3*x^2+3*L*x^4)/(360*L*a*EI)',
      'w*(40*L^2*a^3-45*L*a^4+12*a^5-90*L*a^2*x^2+60*a^3*x^2+15*L*x^4)/(360*L*a*EI)',
    ],
    beyond: ['w*a^2*(L-x)*(10*L*x-5*x^2-3*a^2)/(90*L*EI)', 'w*a^2*(10*L^2-30*L*x+15*x^2+3*a^2)/(90*L*EI)'],
  },
  {
    id: 'simple-part-falling',
    title: 'Simple span, load falling from w at one support to 0 at a',
    validity: '0 < a ≤ L',
    source: roark('2e'),
    within: [
      'w*x*(20*L^2*a^3-15*L*a^4+3*a^5-30*L*a^2*x^2+10*a^3*x^2+15*L*a*x^3-3*L*x^4)/(360*L*a*EI)',
      'w*(20*L^2*a^3-15*L*a^4+3*a^5-90*L*a^2*x^2+30*a^3*x^2+60*L*a*x^3-15*L*x^4)/(360*L*a*EI)',
    ],
    beyond: ['w*a^2*(L-x)*(20*L*x-10*x^2-3*a^2)/(360*L*EI)', 'w*a^2*(20*L^2-60*L*x+30*x^2+3*a^2)/(360*L*EI)'],
  },
  {
    id: 'simple-couple',
    title: 'Simple span, couple M at a',
    validity: '0 ≤ a ≤ L',
    source: roark('3e'),
    within: ['M*x*(2*L^2-6*a*L+3*a^2+x^2)/(6*L*EI)', 'M*(2*L^2-6*a*L+3*a^2+3*x^2)/(6*L*EI)'],
    beyond: ['M*(L-x)*(2*L*x-x^2-3*a^2)/(6*L*EI)', 'M*(2*L^2-6*L*x+3*x^2+3*a^2)/(6*L*EI)'],
  },
  {
    id: 'simple-curvature',
    title: 'Simple span, free curvature κ over a from one support',
    validity: '0 ≤ a ≤ L',
    source: OWN,
    within: ['kappa*x*(2*a*L-a^2-L*x)/(2*L)', 'kappa*(2*a*L-a^2-2*L*x)/(2*L)'],
    beyond: ['kappa*a^2*(L-x)/(2*L)', '-kappa*a^2/(2*L)'],
  },
  {
    id: 'simple-movement',
    title: 'Simple span, the left support settles s, the right one t',
    validity: 'any x',
    source: RIGID,
    within: ['s*(L-x)/L+t*x/L', '(t-s)/L'],
  },
  {
    id: 'simple-shear',
    title:
      'Simple span, shear: S and T are the areas of the shear diagram from the left support to x and to L',
    validity: 'one GA',
    source: OWN_SHEAR,
    within: ['S/GA-T*x/(L*GA)', '-T/(L*GA)'],
  },
];

const GUIDED: readonly CaseRow[] = [
  {
    id: 'guided-point',
    title: 'Guided at one end, propped at the other, point load P at a from the guide',
    validity: '0 ≤ a ≤ L',
    source: roark('1f'),
    within: ['P*(L-a)*(2*L^2+2*a*L-a^2-3*x^2)/(6*EI)', '-P*x*(L-a)/EI'],
    beyond: ['P*(L-x)*(2*L^2+2*L*x-x^2-3*a^2)/(6*EI)', '-P*(2*L*x-x^2-a^2)/(2*EI)'],
  },
  {
    id: 'guided-uniform',
    title: 'Guided at one end, propped at the other, uniform load w over a from the guide',
    validity: '0 ≤ a ≤ L',
    source: roark('2f'),
    within: ['w*(8*L^3*a-4*L*a^3+a^4-12*L*a*x^2+6*a^2*x^2+x^4)/(24*EI)', '-w*x*(6*L*a-3*a^2-x^2)/(6*EI)'],
    beyond: ['w*a*(L-x)*(2*L^2+2*L*x-x^2-a^2)/(6*EI)', '-w*a*(6*L*x-3*x^2-a^2)/(6*EI)'],
  },
  {
    id: 'guided-rising',
    title: 'Guided at one end, propped at the other, load rising from 0 at the guide to w at a',
    validity: '0 < a ≤ L',
    source: roark('2f'),
    within: [
      'w*(20*L^3*a^2-15*L*a^4+4*a^5-30*L*a^2*x^2+20*a^3*x^2+x^5)/(120*a*EI)',
      '-w*x*(12*L*a^2-8*a^3-x^3)/(24*a*EI)',
    ],
    beyond: ['w*a*(L-x)*(4*L^2+4*L*x-2*x^2-3*a^2)/(24*EI)', '-w*a*(4*L*x-2*x^2-a^2)/(8*EI)'],
  },
  {
    id: 'guided-falling',
    title: 'Guided at one end, propped at the other, load falling from w at the guide to 0 at a',
    validity: '0 < a ≤ L',
    source: roark('2f'),
    within: [
      'w*(20*L^3*a^2-5*L*a^4+a^5-30*L*a^2*x^2+10*a^3*x^2+5*a*x^4-x^5)/(120*a*EI)',
      '-w*x*(12*L*a^2-4*a^3-4*a*x^2+x^3)/(24*a*EI)',
    ],
    beyond: ['w*a*(L-x)*(4*L^2+4*L*x-2*x^2-a^2)/(24*EI)', '-w*a*(12*L*x-6*x^2-a^2)/(24*EI)'],
  },
  {
    id: 'guided-couple',
    title: 'Guided at one end, propped at the other, couple M at a from the guide',
    validity: '0 ≤ a ≤ L',
    source: roark('3f'),
    within: ['M*(x^2+a^2-2*a*L)/(2*EI)', 'M*x/EI'],
    beyond: ['-M*a*(L-x)/EI', 'M*a/EI'],
  },
  {
    id: 'guided-curvature',
    title: 'Guided at one end, propped at the other, free curvature κ over a from the guide',
    validity: '0 ≤ a ≤ L',
    source: OWN,
    within: ['kappa*(2*a*L-a^2-x^2)/2', '-kappa*x'],
    beyond: ['kappa*a*(L-x)', '-kappa*a'],
  },
  {
    id: 'guided-movement',
    title: 'Guided at one end, propped at the other, the prop settles t and the guide turns φ',
    validity: 'any x',
    source: RIGID,
    within: ['t-phi*(L-x)', 'phi'],
  },
  {
    id: 'guided-shear',
    title:
      'Guided at one end, propped at the other, shear: S and T are the areas of the shear diagram from the guide to x and to L',
    validity: 'one GA',
    source: OWN_SHEAR,
    within: ['S/GA-T/GA', '0'],
  },
];

/** In the order of the printed tables: cantilevers, simple spans, spans with a guided end. */
export const CASES: readonly CaseRow[] = [...CANTILEVERS, ...SIMPLE, ...GUIDED];
