import { given } from './display';
import type { NamedBeam } from './named-beam';
import type { Piece } from './pieces';
import type { Letter } from './symbols';
import type { DerivationStep } from './types';
import { type Unknown, unknownsOf } from './unknown';
import type { Worked } from './values';
import { countWord, describeReleased, listed, nameForce, sentence } from './words';

const listing = { numbers: '', value: null, unit: '' as const, display: '' };

/** The letters that neither the drawing nor the parameters explain, and the units of the working. */
export function givenStep({ beam }: Worked): DerivationStep[] {
  const givens = beam.letters.givens();
  const { units } = beam.letters;
  const used = `Worked in ${units.shown('force')} and ${units.of('length', 'base')}.`;
  return [
    {
      id: 'given',
      title: 'What the letters stand for',
      symbols: givens.map((letter) => givenTex(beam, letter)).join(',\\quad '),
      ...listing,
      note: [used, signsOf(beam)].filter((text) => text !== '').join(' '),
    },
  ];
}

/** EI = 1 583 000 kip-in² = 10 993 kip-ft², where the trade's unit is not that of the working. */
function givenTex({ letters: { units } }: NamedBeam, { tex, value, kind }: Letter): string {
  const own = units.given(kind);
  const worked = units.of(kind, 'handed');
  return own ? `${tex}=${given(value, own)}=${given(value, worked)}` : `${tex}=${given(value, worked)}`;
}

function signsOf({ letters }: NamedBeam): string {
  const kinds = letters.givens().map(({ kind, tex }) => (tex.startsWith('a_') ? 'place' : kind));
  const words = {
    place: 'a is measured from the support at its left, or from the left end',
    deflection: 'Δ is a settlement, down',
    rotation: 'φ is a turn, anticlockwise',
    moment: 'C is a couple, anticlockwise',
    curvature: 'κ is a free curvature, sagging',
    spring: 'k is the stiffness of a spring',
    'rotational spring': 'k_{θ} is the stiffness of a spring against turning',
  };
  const used = Object.entries(words).flatMap(([kind, text]) => (kinds.some((k) => k === kind) ? [text] : []));
  return used.length > 0 ? `Here ${used.join('; ')}.` : '';
}

/** n = r − 2 − h, and what may be released. */
export function countStep({ beam, unknowns, solution }: Worked): DerivationStep {
  const held = beam.supports.flatMap(({ support }) => [support.vertical, support.rotation]);
  const r = held.filter(({ kind }) => kind !== 'free').length;
  const h = beam.beam.hinges.length;
  const n = unknowns.length;
  const title =
    n === 0
      ? 'As many reactions as equations: equilibrium gives them all'
      : `${sentence(countWord(n))} more ${n === 1 ? 'reaction' : 'reactions'} than equilibrium can find`;
  const eligible = unknownsOf(beam, solution.forceMethod.eligible).map((unknown) => eligibleName(unknown));
  const choice =
    n === 0
      ? ''
      : ` ${n === 1 ? 'Any one' : `Of these, ${countWord(n)}`} may be released: ${listed(eligible, 'or')}.`;
  return {
    id: 'count',
    title,
    symbols: `n=${h > 0 ? 'r-2-h' : 'r-2'}`,
    numbers: `${r}-2${h > 0 ? `-${h}` : ''}`,
    value: n,
    unit: '',
    display: String(n),
    note: `r are the restraints against moving and turning, 2 the equations of equilibrium${h > 0 ? ', h the hinges' : ''}. They leave the beam no movement: it is stable.${choice}`,
    figure: { structure: 'built' },
  };
}

const eligibleName = (unknown: Unknown): string => `the ${nameForce(unknown, 'within')}`;

/** What is released, in which sense it is assumed, and what is left. */
export function releasedStep({ beam, unknowns }: Worked, pieces: readonly Piece[] | null): DerivationStep {
  const without = listed(unknowns.map((unknown) => `the ${nameForce(unknown, 'within')}`));
  return {
    id: 'released',
    title: `Released: ${without}. What is left is ${describeReleased(pieces, beam.beam.length)}`,
    symbols: unknowns.map((unknown) => `${unknown.tex}\\ (${senseTex(unknown)})`).join(',\\quad '),
    ...listing,
    note: `${unknowns.length === 1 ? 'Its sense is' : 'Their senses are'} assumed. What is left has as many restraints as equations and no part of it can move: the choice is admissible.`,
    figure: { structure: 'released' },
  };
}

function senseTex({ kind, sense }: Unknown): string {
  if (kind === 'reaction') return '\\uparrow';
  if (kind === 'internal') return '\\text{sagging}';
  return sense > 0 ? '\\circlearrowleft' : '\\circlearrowright';
}
