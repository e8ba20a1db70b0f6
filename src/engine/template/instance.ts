import {
  type BeamDocument,
  type Load,
  type Redundant,
  type SegmentDocument,
  type SupportDocument,
  supportLetter,
} from '../model/index';
import { readQuantity } from '../quantity/index';
import type { Template } from './document';
import { evaluateNumber, evaluateTruth, type Scope } from './evaluate';
import { type LoadShare, loadOf, loadShares, loadSizes, type NamedLoad, nameOf } from './loads';
import type { ParameterFault } from './measured';
import { judgeRules, type RuleOutcome } from './rules';
import { scopeOf } from './scope';
import type { Values } from './values';

export type InstanceOptions = {
  /** N·m²; the template's own without. */
  ei?: number | undefined;
  /** N; shear deformation is left out without. */
  ga?: number | null | undefined;
  /** N/m of the section's own weight, group G. */
  selfWeight?: number | undefined;
  /** Instead of the template's own choice. */
  redundants?: readonly Redundant[] | undefined;
  /** m; depth of the section, for rules that speak of it. */
  depth?: number | undefined;
};

/** A length of the drawing and what it is called. */
export type Dimensioned = { from: number; to: number; symbol: string; tex: string };

export type Instance = {
  beam: BeamDocument & { supports: SupportDocument[]; loads: NonNullable<BeamDocument['loads']> };
  /** N·m², as given or by default. */
  ei: number;
  /** Parameters (a load as the sum of its groups) and derived values, SI. */
  scope: ReadonlyMap<string, number | string | readonly Scope[]>;
  derived: Readonly<Record<string, number>>;
  letters: readonly string[];
  dimensions: readonly Dimensioned[];
  /** In the order of the beam's loads. */
  loadNames: readonly NamedLoad[];
  /** What each load of the beam is made from, in its order; the section's own weight, after them, from none. */
  shares: readonly LoadShare[];
  /** Those that need no result yet. */
  rules: readonly RuleOutcome[];
};

export type InstanceReading = { ok: true; instance: Instance } | { ok: false; faults: ParameterFault[] };

/** EI of a template without a section, N·m². */
export function defaultEi(template: Template): number {
  const reading = readQuantity(template.stiffness.default_ei, 'bending_stiffness');
  return reading.ok ? reading.value : Number.NaN;
}

/**
 * The beam of a checked template at these values (SI, as readParameters returns them), with the names its lengths
 * and loads carry. Refused, with faults at the parameters: a block rule that is broken, and an expression that is
 * not finite. Loads are split by their groups, so that each stays in its own.
 */
export function instantiate(
  template: Template,
  given: Values,
  options: InstanceOptions = {},
): InstanceReading {
  const values = byGroup(template, given);
  const ei = options.ei ?? defaultEi(template);
  const scope = scopeOf(template, values, ei);
  const rules = judgeRules(template, scope, { depth: options.depth, ga: options.ga });
  const broken = rules.filter(({ state, severity }) => state === 'broken' && severity === 'block');
  if (broken.length > 0) return { ok: false, faults: broken.map(toFault) };
  // A load of nothing would only stand in the derivation as 0 × L.
  const shares = loadShares(template, values, ei).filter((share) =>
    loadSizes(loadOf(share)).some((size) => size !== 0),
  );
  const beam = beamOf(template, scope, options);
  const { selfWeight } = options;
  const across = template.beam.own_weight ? evaluateNumber(template.beam.own_weight.tree, scope) : 1;
  const own = selfWeight === undefined ? [] : [ownWeight(selfWeight * across, beam.length)];
  const loads = [...shares.map(loadOf), ...own];
  const stray = firstStray({ ...beam, loads });
  if (stray) return { ok: false, faults: [stray] };
  return {
    ok: true,
    instance: {
      beam: { ...beam, loads },
      ei,
      scope,
      derived: Object.fromEntries(template.derived.map(({ symbol }) => [symbol, Number(scope.get(symbol))])),
      letters: beam.supports.map((_, index) => supportLetter(index)),
      dimensions: dimensionsOf(template, scope),
      shares,
      loadNames: [...shares.map((share) => nameOf(template, share)), ...own.map(() => OWN_WEIGHT)],
      rules,
    },
  };
}

const OWN_WEIGHT: NamedLoad = { symbol: '', tex: 'w_{\\text{self}}', group: 'G' };

/** The section's own weight over the whole beam, N/m. */
const ownWeight = (weight: number, length: number): Load => ({
  kind: 'line',
  from: 0,
  to: length,
  w0: weight,
  w1: weight,
  group: OWN_WEIGHT.group,
});

/** A load given as one number belongs to its own group. */
const byGroup = (template: Template, given: Values): Values =>
  Object.fromEntries(
    template.parameters.map((parameter) => {
      const value = given[parameter.symbol] ?? 0;
      const isWhole =
        parameter.kind === 'quantity' && parameter.group !== undefined && typeof value === 'number';
      return [parameter.symbol, isWhole ? { [parameter.group ?? '']: value } : value];
    }),
  );

const isOn = (
  part: { when?: Template['derived'][number]['expression'] | undefined },
  scope: Scope,
): boolean => part.when === undefined || evaluateTruth(part.when.tree, scope);

function beamOf(template: Template, scope: Scope, options: InstanceOptions): Omit<Instance['beam'], 'loads'> {
  const { beam } = template;
  const number = (expression: { tree: Template['beam']['length']['tree'] }) =>
    evaluateNumber(expression.tree, scope);
  const ei = Number(scope.get('EI'));
  const ga = options.ga ?? null;
  const supports = beam.supports
    .filter((support) => isOn(support, scope))
    .map((support): SupportDocument => {
      const { at, kind, kv, kr, rise, rotation } = support;
      return {
        at: number(at),
        kind,
        ...(kv && { kv: number(kv) }),
        ...(kr && { kr: number(kr) }),
        ...(rise && { rise: number(rise) }),
        ...(rotation && { rotation: number(rotation) }),
      };
    });
  const segments = beam.segments?.map(
    (segment): SegmentDocument => ({
      from: number(segment.from),
      to: number(segment.to),
      ei: ei * number(segment.ei),
      ga,
    }),
  );
  const hinges = beam.hinges?.filter((hinge) => isOn(hinge, scope)).map(({ at }) => number(at));
  return {
    length: number(beam.length),
    ...(segments ? { segments } : { ei, ga }),
    supports,
    ...(hinges && { hinges }),
    redundants: options.redundants ? [...options.redundants] : redundantsOf(template, scope),
  };
}

/** The template's own choice of what to release. */
const redundantsOf = (template: Template, scope: Scope): Redundant[] =>
  template.beam.redundants
    .filter((redundant) => isOn(redundant, scope))
    .map((redundant) =>
      'support' in redundant
        ? { support: redundant.support.charCodeAt(0) - 'A'.charCodeAt(0), component: redundant.component }
        : { at: evaluateNumber(redundant.at.tree, scope), component: redundant.component },
    );

function dimensionsOf(template: Template, scope: Scope): Dimensioned[] {
  const named = [...template.parameters, ...template.derived];
  return template.beam.dimensions
    .filter((dimension) => isOn(dimension, scope))
    .map(({ from, to, symbol }) => ({
      from: evaluateNumber(from.tree, scope),
      to: evaluateNumber(to.tree, scope),
      symbol,
      tex: named.find((one) => one.symbol === symbol)?.tex ?? symbol,
    }));
}

const toFault = ({ path, message }: RuleOutcome): ParameterFault => ({ path, code: 'rule_broken', message });

/** A number in the beam that is not finite: a division by zero in one of the template's expressions. */
function firstStray(beam: BeamDocument): ParameterFault | undefined {
  const { loads = [], supports, segments = [], hinges = [], length } = beam;
  const numbers = [
    length,
    ...hinges,
    ...[...loads, ...supports, ...segments].flatMap((part) => Object.values(part)),
  ];
  const isStray = numbers.some((value) => typeof value === 'number' && !Number.isFinite(value));
  return isStray
    ? {
        path: [],
        code: 'not_finite',
        message: 'With these values a place or a load is not finite. Change them.',
      }
    : undefined;
}
