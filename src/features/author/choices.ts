/** Words of the form's choices. */
import type { Arrangement, LoadKind, Severity } from '@/engine/template';

export interface Choice {
  readonly value: string;
  readonly label: string;
}

export const choicesOf = (values: readonly string[]): Choice[] =>
  values.map((value) => ({ value, label: value }));

const worded = <K extends string>(words: Readonly<Record<K, string>>): Choice[] =>
  Object.entries<string>(words).map(([value, label]) => ({ value, label }));

export const ARRANGEMENT_CHOICES = worded<Arrangement>({
  'simple-span': 'Simple span',
  cantilever: 'Cantilever',
  'propped-cantilever': 'Propped cantilever',
  'fixed-ends': 'Fixed at both ends',
  overhang: 'With overhangs',
  'multi-span': 'Several spans',
});

export const LOAD_KIND_CHOICES = worded<LoadKind>({
  uniform: 'Uniform',
  point: 'Point',
  triangular: 'Triangular',
  couple: 'Couple',
  settlement: 'Settlement',
  temperature: 'Temperature',
});

export const SUPPORT_CHOICES = worded({
  pin: 'Pin',
  roller: 'Roller',
  fixed: 'Fixed',
  guided: 'Guided: turns not, moves freely',
  free: 'Free, but for its springs',
});

export const SEVERITY_CHOICES = worded<Severity>({
  block: 'Block: no result',
  warn: 'Warn: shown with the result',
  note: 'Note: worth knowing',
});

export const AFFECTED_CHOICES = worded({
  reactions: 'Reactions',
  shear: 'Shear',
  moment: 'Moment',
  slope: 'Slope',
  deflection: 'Deflection',
});

export const sizedBy =
  'Of a load: G permanent, Q imposed, S snow, W wind, or another. Left empty for what is no load.';
