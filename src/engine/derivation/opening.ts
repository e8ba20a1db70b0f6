import { given } from './display';
import type { NamedBeam } from './named-beam';
import { unitOf } from './symbols';
import type { DerivationStep } from './types';
import type { Worked } from './values';
import { countWord, listed, nameForce, sentence } from './words';

/** The letters that neither the drawing nor the parameters explain. */
export function givenStep({ beam }: Worked): DerivationStep[] {
  const givens = beam.letters.givens();
  if (givens.length === 0) return [];
  const note = signsOf(beam);
  return [
    {
      id: 'given',
      title: 'What the letters stand for',
      symbols: givens
        .map(({ tex, value, kind }) => `${tex}=${given(value, unitOf(kind, 'milli'))}`)
        .join(',\\quad '),
      numbers: '',
      value: null,
      unit: '',
      display: '',
      ...(note && { note }),
    },
  ];
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
    'rotational spring': 'k_θ is the stiffness of a spring against turning',
  };
  const used = Object.entries(words).flatMap(([kind, text]) => (kinds.some((k) => k === kind) ? [text] : []));
  return used.length > 0 ? `Here ${used.join('; ')}.` : '';
}

/** n = r − 2 − h, and what is chosen. */
export function countStep({ beam, unknowns }: Worked): DerivationStep {
  const held = beam.supports.flatMap(({ support }) => [support.vertical, support.rotation]);
  const r = held.filter(({ kind }) => kind !== 'free').length;
  const h = beam.beam.hinges.length;
  const count = countWord(unknowns.length);
  const chosen = listed(unknowns.map((unknown) => `the ${nameForce(unknown, 'within')}`));
  const title =
    unknowns.length === 0
      ? 'As many reactions as equations: equilibrium gives them all'
      : `${sentence(count)} more than equilibrium can find: ${chosen} ${unknowns.length === 1 ? 'is' : 'are'} chosen`;
  return {
    id: 'count',
    title,
    symbols: `n=${h > 0 ? 'r-2-h' : 'r-2'}`,
    numbers: `${r}-2${h > 0 ? `-${h}` : ''}`,
    value: unknowns.length,
    unit: '',
    display: String(unknowns.length),
    note: `r are the restraints against moving and turning, 2 the equations of equilibrium${h > 0 ? ', h the hinges' : ''}.`,
    figure: { structure: 'built' },
  };
}
