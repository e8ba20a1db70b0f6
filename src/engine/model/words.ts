import { MINUS } from '../quantity/index';
import type { Beam, Redundant, Support } from './types';

/** A position in words: millimetres where that says it, else six figures. */
export function metres(x: number): string {
  const rounded = x.toFixed(3);
  const text = Number(rounded) === x ? rounded : String(Number(x.toPrecision(6)));
  return `${text.replace('-', MINUS)} m`;
}

const KIND_WORDS = {
  fixed: 'fixed support',
  pin: 'pin',
  roller: 'roller',
  guided: 'guided support',
  free: 'elastic support',
} as const;

/** "the roller at 7.000 m" */
export const nameSupport = ({ kind, at }: Support): string => `the ${KIND_WORDS[kind]} at ${metres(at)}`;

/** "the vertical reaction of the roller at 7.000 m" */
export function nameRedundant(beam: Pick<Beam, 'supports'>, redundant: Redundant): string {
  if (redundant.component === 'moment') return `the moment at ${metres(redundant.at)}`;
  const support = beam.supports[redundant.support];
  const force = redundant.component === 'vertical' ? 'vertical' : 'moment';
  return support
    ? `the ${force} reaction of ${nameSupport(support)}`
    : `the ${force} reaction of support ${redundant.support}`;
}
