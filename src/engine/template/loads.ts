import type { Load } from '../model/index';
import type { Template } from './document';
import { evaluateNumber, evaluateTruth, type Scope, within } from './evaluate';
import { allMeasured, groupOfRow, scopeOf, sourcesOf } from './scope';
import type { Row, Value, Values } from './values';

/** What a load is called: its symbol where its size is one symbol (else ''), and that as TeX. */
export type NamedLoad = { symbol: string; tex: string; group: string };
export type InstanceLoad = { load: Load; name: NamedLoad };
type LoadTemplate = Template['beam']['loads'][number];

/** The beam's loads, one for each group of each load of the template and of each row it is repeated over. */
export function instanceLoads(template: Template, values: Values, ei: number): InstanceLoad[] {
  const whole = scopeOf(template, values, ei);
  const scopes = new Map<string, Scope>();
  const scopeFor = (group: string): Scope => {
    const scope = scopes.get(group) ?? scopeOf(template, values, ei, group);
    scopes.set(group, scope);
    return scope;
  };
  return template.beam.loads.flatMap((load) => {
    if (load.when && !evaluateTruth(load.when.tree, whole)) return [];
    if (load.repeat === undefined)
      return groupsOf(template, load, values).map((group) => ({
        load: placed(load, group, whole, scopeFor(group)),
        name: nameOf(template, load, group),
      }));
    return overRows(template, load, values, whole);
  });
}

/** One load of its group: its place from all values, its size from the group's share of them. */
function placed(load: LoadTemplate, group: string, place: Scope, share: Scope): Load {
  const at = (expression: LoadTemplate['when']) => (expression ? evaluateNumber(expression.tree, place) : 0);
  const size = (expression: LoadTemplate['when']) =>
    expression ? evaluateNumber(expression.tree, share) : 0;
  switch (load.kind) {
    case 'point':
      return { kind: 'point', at: at(load.at), p: size(load.p), group };
    case 'line':
      return {
        kind: 'line',
        from: at(load.from),
        to: at(load.to),
        w0: size(load.w0),
        w1: size(load.w1),
        group,
      };
    case 'couple':
      return { kind: 'couple', at: at(load.at), m: size(load.m), group };
    case 'curvature':
      return { kind: 'curvature', from: at(load.from), to: at(load.to), kappa: size(load.kappa), group };
  }
}

function overRows(template: Template, load: LoadTemplate, values: Values, whole: Scope): InstanceLoad[] {
  const parameter = template.parameters.find(({ symbol }) => symbol === load.repeat);
  if (parameter?.kind !== 'rows') return [];
  return rowsIn(values[parameter.symbol]).map((row, index) => {
    const group = groupOfRow(parameter.columns, row) ?? '';
    const scope = within(new Map(Object.entries(row)), whole);
    return { load: placed(load, group, scope, scope), name: nameOf(template, load, group, index + 1) };
  });
}

const rowsIn = (value: Value | undefined): readonly Row[] => (Array.isArray(value) ? value : []);

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
  const groups = new Set<string>();
  for (const symbol of loadSymbols(template, load)) {
    const value = values[symbol];
    if (typeof value === 'object' && !Array.isArray(value))
      for (const group of Object.keys(value)) groups.add(group);
  }
  return [...groups];
}

function nameOf(template: Template, load: LoadTemplate, group: string, row?: number): NamedLoad {
  const [size] = sizeExpressions(load);
  const symbol = typeof size?.tree === 'string' ? size.tree : '';
  const tex = [...allMeasured(template), ...template.derived].find((one) => one.symbol === symbol)?.tex ?? '';
  return { symbol, tex: row === undefined || tex === '' ? tex : `${tex}_{${row}}`, group };
}

/** The section's own weight over the whole beam, N/m. */
export const selfWeightLoad = (weight: number, length: number): InstanceLoad => ({
  load: { kind: 'line', from: 0, to: length, w0: weight, w1: weight, group: 'G' },
  name: { symbol: '', tex: 'g', group: 'G' },
});

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
