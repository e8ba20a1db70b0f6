import type { Load } from '../model/index';
import type { Template } from './document';
import { evaluateNumber, evaluateTruth, type Scope, within } from './evaluate';
import { allMeasured, groupOfRow, scopeOf, sourcesOf } from './scope';
import type { Expression } from './tree';
import { isRows, type Values } from './values';

export type LoadTemplate = Template['beam']['loads'][number];
/** What a load is called: its symbol where a size of it is one symbol (else ''), and that as TeX. */
export type NamedLoad = { symbol: string; tex: string; group: string };

/** One load of the beam: a load of the template, of one group, in one row of the list it is repeated over. */
export type LoadShare = {
  template: LoadTemplate;
  group: string;
  /** Values for its place, and the group's share of the values for its size. */
  place: Scope;
  share: Scope;
  /** Of the list it is repeated over, counted from 1. */
  row?: number;
};

/** The beam's loads, one for each group of each load of the template and of each row it is repeated over. */
export function loadShares(template: Template, values: Values, ei: number): LoadShare[] {
  const place = scopeOf(template, values, ei);
  const scopes = new Map<string, Scope>();
  const shareOf = (group: string): Scope => {
    const scope = scopes.get(group) ?? scopeOf(template, values, ei, group);
    scopes.set(group, scope);
    return scope;
  };
  return template.beam.loads.flatMap((load): LoadShare[] => {
    if (load.when && !evaluateTruth(load.when.tree, place)) return [];
    if (load.repeat !== undefined) return rowShares(template, load, values, place);
    return groupsOf(template, load, values).map((group) => ({
      template: load,
      group,
      place,
      share: shareOf(group),
    }));
  });
}

function rowShares(template: Template, load: LoadTemplate, values: Values, whole: Scope): LoadShare[] {
  const parameter = template.parameters.find(({ symbol }) => symbol === load.repeat);
  const rows = values[load.repeat ?? ''] ?? [];
  if (parameter?.kind !== 'rows' || !isRows(rows)) return [];
  return rows.map((row, index) => {
    const place = within(new Map(Object.entries(row)), whole);
    return {
      template: load,
      group: groupOfRow(parameter.columns, row) ?? '',
      place,
      share: place,
      row: index + 1,
    };
  });
}

/** The load in numbers. */
export function loadOf({ template: load, group, place, share }: LoadShare): Load {
  const at = ({ tree }: Expression) => evaluateNumber(tree, place);
  const size = ({ tree }: Expression) => evaluateNumber(tree, share);
  switch (load.kind) {
    case 'point':
      return { kind: 'point', at: at(load.at), p: size(load.p), group };
    case 'line': {
      const [from, to] = [at(load.from), at(load.to)];
      return { kind: 'line', from, to, w0: size(load.w0), w1: size(load.w1), group };
    }
    case 'couple':
      return { kind: 'couple', at: at(load.at), m: size(load.m), group };
    case 'curvature':
      return { kind: 'curvature', from: at(load.from), to: at(load.to), kappa: size(load.kappa), group };
  }
}

const sizeExpressions = (load: LoadTemplate) => {
  switch (load.kind) {
    case 'point':
      return [load.p];
    case 'line':
      return [load.w0, load.w1];
    case 'couple':
      return [load.m];
    case 'curvature':
      return [load.kappa];
  }
};

/** Symbols of the loads that size this one. */
export function loadSymbols(template: Template, load: LoadTemplate): Set<string> {
  const sources = new Set(sizeExpressions(load).flatMap(({ tree }) => [...sourcesOf(template, tree)]));
  const loads = allMeasured(template).filter(
    ({ group, symbol }) => group !== undefined && sources.has(symbol),
  );
  return new Set(loads.map(({ symbol }) => symbol));
}

function groupsOf(template: Template, load: LoadTemplate, values: Values): string[] {
  const parts = [...loadSymbols(template, load)].map((symbol) => values[symbol] ?? 0);
  return [
    ...new Set(parts.flatMap((part) => (typeof part === 'object' && !isRows(part) ? Object.keys(part) : []))),
  ];
}

/** What drawing and derivation call a load: P_2 is the one of the second row; groups share their letter. */
export function nameOf(template: Template, { template: load, group, row }: LoadShare): NamedLoad {
  const symbol =
    sizeExpressions(load)
      .map(({ tree }) => tree)
      .find((tree) => typeof tree === 'string') ?? '';
  const tex = [...allMeasured(template), ...template.derived].find((one) => one.symbol === symbol)?.tex ?? '';
  return { symbol, tex: row === undefined || tex === '' ? tex : `${tex}_{${row}}`, group };
}

/** The sizes of a load: what grows in proportion to it. */
export function loadSizes(load: Load): number[] {
  switch (load.kind) {
    case 'point':
      return [load.p];
    case 'line':
      return [load.w0, load.w1];
    case 'couple':
      return [load.m];
    case 'curvature':
      return [load.kappa];
  }
}
