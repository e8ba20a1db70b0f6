import { solveBeam } from '../beam/index';
import { evaluate as evaluateFormula, symbolsOf } from '../chart/index';
import type { Beam, Load, Restraint } from '../model/index';
import { evaluate, integrate, multiply, type Piecewise } from '../polynomial/index';
import { movementOf, type NamedBeam } from './named-beam';
import { type Equilibrium, equilibrium } from './statics';
import { fixingSense, fixingTex, reactionTex, type Unknown } from './unknown';
import type { Worked } from './values';

/** The released beam in one state: its reactions by letter, in the derivation's senses, and its V and M. */
export type ReleasedState = { reactions: ReadonlyMap<string, number>; shear: Piecewise; moment: Piecewise };

/** The released beam under the loads (null) or a unit value of a redundant; each state is made once. */
export function releasedStates(worked: Worked): (unit: Unknown | null) => ReleasedState {
  const made = new Map<Unknown | null, ReleasedState>();
  const equations = equilibrium(worked.beam, worked.parts, worked.unknowns);
  return (unit) => {
    const state = made.get(unit) ?? releasedState(worked, equations, unit);
    made.set(unit, state);
    return state;
  };
}

function releasedState(
  worked: Worked,
  equations: readonly Equilibrium[],
  unit: Unknown | null,
): ReleasedState {
  const { beam, unknowns } = worked;
  const loadLetters = new Set(
    beam.loads.flatMap(({ load }) => {
      if (load.kind === 'point') return symbolsOf(load.p);
      if (load.kind === 'couple') return symbolsOf(load.m);
      return load.kind === 'line' ? [...symbolsOf(load.w0), ...symbolsOf(load.w1)] : [];
    }),
  );
  const values = new Map(unknowns.map((unknown) => [unknown.tex, unknown === unit ? 1 : 0]));
  const value = (tex: string) =>
    values.get(tex) ?? (unit && loadLetters.has(tex) ? 0 : beam.letters.value(tex));
  for (const step of equations) values.set(step.tex, evaluateFormula(step.value, value));
  // A support that does not hold rotation has no fixing moment; its letter may be that of the moment within the beam.
  const acting = (restraint: Restraint, tex: string) =>
    restraint.kind === 'free' ? 0 : (values.get(tex) ?? 0);
  const actions = beam.supports.flatMap((named): Load[] => {
    const { x, support } = named;
    const moment = fixingSense(beam, named) * acting(support.rotation, fixingTex(named));
    return [
      { kind: 'point', at: x, p: -acting(support.vertical, reactionTex(named)) },
      { kind: 'couple', at: x, m: moment },
    ];
  });
  const { shear, moment } = diagramsUnder(beam.beam, unit ? actions : [...beam.beam.loads, ...actions]);
  return { reactions: values, shear, moment };
}

/** Diagrams of a free body in equilibrium: those of a cantilever to whose wall nothing is left to do. */
function diagramsUnder(beam: Beam, loads: Load[]) {
  const wall = { kind: 'rigid', movement: 0 } as const;
  const cantilever: Beam = {
    ...beam,
    supports: [{ at: 0, kind: 'fixed', vertical: wall, rotation: wall, horizontal: true }],
    hinges: [],
    loads: loads.filter(({ kind }) => kind !== 'curvature'),
    degree: 0,
  };
  return solveBeam(cantilever).diagrams;
}

/**
 * ∫ m (M/EI + κ) dx + ∫ v V/GA dx over each stretch between supports, hinges and steps, then Σ r R/k over springs, and
 * −Σ r Δ over supports that move: the parts of a movement by virtual work.
 */
export function workParts(
  worked: Worked,
  unit: ReleasedState,
  state: ReleasedState,
  underLoads: boolean,
  cuts: readonly number[] = [],
): number[] {
  const { beam } = worked.beam;
  const bending = integrate(multiply(unit.moment, state.moment));
  const shearing = integrate(multiply(unit.shear, state.shear));
  const turning = integrate(unit.moment);
  const between = (p: Piecewise, a: number, b: number) => evaluate(p, b)[0] - evaluate(p, a)[1];
  const joints = [...new Set([...jointsOf(worked), ...cuts])].sort((a, b) => a - b);
  const stretches = joints.slice(1).map((to, k) => {
    const from = joints[k]!;
    const segment = beam.segments.find((s) => s.from <= from && to <= s.to)!;
    const curving = underLoads
      ? beam.loads.map((load) => curvatureWork(load, from, to, (a, b) => between(turning, a, b)))
      : [];
    return (
      between(bending, from, to) / segment.ei +
      (segment.ga === null ? 0 : between(shearing, from, to) / segment.ga) +
      curving.reduce((sum, part) => sum + part, 0)
    );
  });
  return [...stretches, ...supportParts(worked, unit, state, underLoads)];
}

function supportParts(
  { beam, unknowns }: Worked,
  unit: ReleasedState,
  state: ReleasedState,
  underLoads: boolean,
): number[] {
  return beam.supports.flatMap((named) =>
    [
      { restraint: named.support.vertical, tex: reactionTex(named), sense: 1 },
      { restraint: named.support.rotation, tex: fixingTex(named), sense: fixingSense(beam, named) },
    ].map(({ restraint, tex, sense }) => {
      const [r, R] = [unit.reactions.get(tex) ?? 0, state.reactions.get(tex) ?? 0];
      const yielding = restraint.kind === 'spring' ? (r * R) / restraint.stiffness : 0;
      const released = unknowns.some((unknown) => unknown.tex === tex && unknown.kind !== 'internal');
      return yielding - (underLoads && !released ? r * sense * movementOf(restraint) : 0);
    }),
  );
}

function jointsOf({ beam, unknowns }: Worked): number[] {
  const { length, segments, hinges } = beam.beam;
  const points = [0, length, ...hinges, ...segments.map(({ to }) => to), ...beam.supports.map(({ x }) => x)];
  return [...points, ...unknowns.map(({ x }) => x)];
}

/** κ ∫ m dx over what the curvature has in common with the stretch. */
function curvatureWork(
  load: Load,
  from: number,
  to: number,
  integral: (a: number, b: number) => number,
): number {
  if (load.kind !== 'curvature') return 0;
  const [start, end] = [Math.max(from, load.from), Math.min(to, load.to)];
  return end > start ? load.kappa * integral(start, end) : 0;
}

/** What the integrals are called: m, v, r of the unit state with its index, and M, V, R of the other with its own. */
type WorkLetters = { own: string; other: string; underLoads: boolean; isAgainst: boolean };

/** ∫ m M/EI dx and what else the beam has: free curvature, shear, springs, movements. */
export function workTex({ beam }: NamedBeam, { own, other, underLoads, isAgainst }: WorkLetters): string {
  const pair = (letter: string, whole: string): string => {
    const mine = `${letter}_{${own}}`;
    if (underLoads) return `${mine}\\,${whole}${other && `_{${other}}`}`;
    return own === other ? `${mine}^2` : `${mine}\\,${letter}_{${other}}`;
  };
  const restraints = beam.supports.flatMap(({ vertical, rotation }) => [vertical, rotation]);
  const terms = [`\\int\\dfrac{${pair('m', 'M')}}{EI}\\,dx`];
  if (underLoads && beam.loads.some(({ kind }) => kind === 'curvature'))
    terms.push(`\\int m_{${own}}\\,\\kappa\\,dx`);
  if (beam.segments.some(({ ga }) => ga !== null)) terms.push(`\\int\\dfrac{${pair('v', 'V')}}{GA}\\,dx`);
  if (restraints.some(({ kind }) => kind === 'spring')) terms.push(`\\sum\\dfrac{${pair('r', 'R')}}{k}`);
  const isMoved =
    underLoads && restraints.some((restraint) => restraint.kind !== 'free' && restraint.movement !== 0);
  const sum = `${terms.join('+')}${isMoved ? `-\\sum r_{${own}}\\,\\Delta` : ''}`;
  if (!isAgainst) return sum;
  return terms.length > 1 || isMoved ? `-\\left(${sum}\\right)` : `-${sum}`;
}
