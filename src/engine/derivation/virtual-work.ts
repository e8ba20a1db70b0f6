import { type ForceMethodParts, forceMethod } from '../beam/index';
import type { Beam, Load, Restraint } from '../model/index';
import { between, fractionTerm, type NumberTerm, productTerm } from './integral';
import { movementOf, type NamedBeam } from './named-beam';
import type { Kind } from './units';
import type { Unknown } from './unknown';

type BeamState = ForceMethodParts['loads'];

/** The released beam in one state, in the engine's senses, and what its moments and forces are called. */
export type State = {
  beam: BeamState;
  /** Of m and M: B, or 0 for the loads. */
  index: string;
  /** A unit force's moment is a length; a unit moment's, a number; the loads', a moment. */
  kinds: { moment: Kind; force: Kind };
  /** Against the engine's sense. */
  sense: 1 | -1;
};

/** A part of a movement by virtual work. */
export type WorkPart = {
  kind: 'bending' | 'curvature' | 'shear' | 'springs' | 'movements';
  symbols: string;
  terms: NumberTerm[];
};

/** The released beam under the loads, some of them, or a unit value of a redundant; each state is made once. */
export class ReleasedStates {
  private readonly parts;
  private readonly single = new Map<string, State>();

  constructor(
    private readonly beam: Beam,
    private readonly unknowns: readonly Unknown[],
  ) {
    this.parts = forceMethod(
      beam,
      unknowns.map(({ redundant }) => redundant),
    );
  }

  unit(unknown: Unknown): State {
    const { index, kind, sense } = unknown;
    const isForce = kind === 'reaction';
    return {
      beam: this.parts.units[this.unknowns.indexOf(unknown)]!,
      index,
      kinds: { moment: isForce ? 'length' : 'number', force: isForce ? 'number' : 'curvature' },
      sense,
    };
  }

  loads(): State {
    return underLoads(this.parts.loads, '0');
  }

  /** Under the loads of one letter alone. */
  load(tex: string, loads: readonly Load[]): State {
    const known = this.single.get(tex);
    if (known) return known;
    const { loads: state } = forceMethod(
      { ...this.beam, loads },
      this.unknowns.map(({ redundant }) => redundant),
    );
    const made = underLoads(state, tex);
    this.single.set(tex, made);
    return made;
  }

  /** Under a unit load at a place, down; on supports that stay where they are. */
  unitLoad(at: number): State {
    const { loads: state } = forceMethod(
      { ...this.beam, supports: still(this.beam), loads: [{ kind: 'point', at, p: 1 }] },
      this.unknowns.map(({ redundant }) => redundant),
    );
    return { beam: state, index: '1', kinds: { moment: 'length', force: 'number' }, sense: 1 };
  }
}

export const underLoads = (beam: BeamState, index: string): State => ({
  beam,
  index,
  kinds: { moment: 'moment', force: 'force' },
  sense: 1,
});

const still = ({ supports }: Beam): Beam['supports'] => {
  const rest = (restraint: Restraint): Restraint =>
    restraint.kind === 'free' ? restraint : { ...restraint, movement: 0 };
  return supports.map((support) => ({
    ...support,
    vertical: rest(support.vertical),
    rotation: rest(support.rotation),
  }));
};

type Work = {
  beam: NamedBeam;
  /** Whose supports are released. */
  unknowns: readonly Unknown[];
  own: State;
  other: State;
  /** The curvature and the movements of supports come with the loads. */
  isLoaded: boolean;
  sense: 1 | -1;
  /** Where the integrals are parted beside the joints of the beam. */
  cuts?: readonly number[];
};

/**
 * sense · (∫ m M/EI dx + ∫ m κ dx + ∫ v V/GA dx + Σ r R/k − Σ r Δ) over each stretch on which all is one polynomial.
 * The parts that are nothing are left out.
 */
export function workParts(work: Work): WorkPart[] {
  const names = namesOf(work);
  const parts: WorkPart[] = [
    {
      kind: 'bending',
      symbols: names.signed(`\\int\\dfrac{${names.pair('m', 'M')}}{EI}\\,dx`),
      terms: integrals(work, 'moment'),
    },
    {
      kind: 'curvature',
      symbols: names.signed(`\\int m_{${work.own.index}}\\,\\kappa\\,dx`),
      terms: curvatureTerms(work),
    },
    {
      kind: 'shear',
      symbols: names.signed(`\\int\\dfrac{${names.pair('v', 'V')}}{GA}\\,dx`),
      terms: integrals(work, 'shear'),
    },
    {
      kind: 'springs',
      symbols: names.signed(`\\sum\\dfrac{${names.pair('r', 'R')}}{k}`),
      terms: supportTerms(work, springTerm),
    },
    {
      kind: 'movements',
      symbols: names.against(`\\sum r_{${work.own.index}}\\,\\Delta`),
      terms: work.isLoaded ? supportTerms(work, movementTerm) : [],
    },
  ];
  return parts.filter(({ terms }) => terms.length > 0);
}

/** ∫ m M/EI dx and what else the beam has, in letters alone. */
export function workSymbols(
  { beam }: NamedBeam,
  { own, other, isLoaded }: { own: string; other: string; isLoaded: boolean },
): string {
  const pair = (letter: string, whole: string) =>
    isLoaded ? `${letter}_{${own}}\\,${whole}_{${other}}` : `${letter}_{${own}}\\,${letter}_{${other}}`;
  const restraints = beam.supports.flatMap(({ vertical, rotation }) => [vertical, rotation]);
  const has = {
    curvature: isLoaded && beam.loads.some(({ kind }) => kind === 'curvature'),
    shear: beam.segments.some(({ ga }) => ga !== null),
    springs: restraints.some(({ kind }) => kind === 'spring'),
    movements: isLoaded && restraints.some((restraint) => movementOf(restraint) !== 0),
  };
  return [
    `\\int\\dfrac{${pair('m', 'M')}}{EI}\\,dx`,
    has.curvature ? `+\\int m_{${own}}\\,\\kappa\\,dx` : '',
    has.shear ? `+\\int\\dfrac{${pair('v', 'V')}}{GA}\\,dx` : '',
    has.springs ? `+\\sum\\dfrac{${pair('r', 'R')}}{k}` : '',
    has.movements ? `-\\sum r_{${own}}\\,\\Delta` : '',
  ].join('');
}

function namesOf({ own, other, isLoaded, sense, beam }: Work) {
  const clash = other.index === '0' && beam.letters.has('M_0') ? '\\mathrm{r}' : other.index;
  const pair = (letter: string, whole: string): string => {
    const mine = `${letter}_{${own.index}}`;
    if (isLoaded) return `${mine}\\,${whole}${clash && `_{${clash}}`}`;
    return own.index === other.index ? `${mine}^2` : `${mine}\\,${letter}_{${other.index}}`;
  };
  return {
    pair,
    signed: (tex: string) => (sense < 0 ? `-${tex}` : tex),
    against: (tex: string) => (sense < 0 ? tex : `-${tex}`),
  };
}

/** ∫ m M/EI dx or ∫ v V/GA dx, one number for each stretch. */
function integrals(work: Work, quantity: 'moment' | 'shear'): NumberTerm[] {
  const { beam, own, other } = work;
  return stretchesOf(work).flatMap(({ from, to }) => {
    const segment = beam.beam.segments.find((s) => s.from <= from && to <= s.to)!;
    const stiffness = quantity === 'moment' ? segment.ei : segment.ga;
    if (stiffness === null) return [];
    const force = quantity === 'moment' ? ('moment' as const) : ('force' as const);
    const side = (state: State) => ({
      coefficients: between(state.beam.diagrams[quantity], from, to),
      kind: state.kinds[force],
    });
    const term = productTerm(beam.letters, {
      length: to - from,
      p: side(own),
      q: side(other),
      sign: (work.sense * own.sense * other.sense) as 1 | -1,
      times: { value: stiffness, kind: quantity === 'moment' ? 'bending' : 'shear', isBelow: true },
    });
    return term ?? [];
  });
}

function curvatureTerms(work: Work): NumberTerm[] {
  const { beam, own, sense, isLoaded } = work;
  if (!isLoaded) return [];
  return beam.beam.loads.flatMap((load) => {
    if (load.kind !== 'curvature') return [];
    return stretchesOf(work).flatMap((stretch) => {
      const [from, to] = [Math.max(stretch.from, load.from), Math.min(stretch.to, load.to)];
      if (to <= from) return [];
      const term = productTerm(beam.letters, {
        length: to - from,
        p: { coefficients: between(own.beam.diagrams.moment, from, to), kind: own.kinds.moment },
        q: null,
        sign: (sense * own.sense) as 1 | -1,
        times: { value: load.kappa, kind: 'curvature', isBelow: false },
      });
      return term ?? [];
    });
  });
}

/** Neither diagram has a break within a stretch, and no stiffness changes there. */
function stretchesOf({ beam: { beam }, own, other, cuts = [] }: Work): { from: number; to: number }[] {
  const breaks = [own, other].flatMap(({ beam: { diagrams } }) => [...diagrams.moment.breaks]);
  const ends = [...beam.segments.map(({ to }) => to), 0, beam.length];
  const points = [...new Set([...breaks, ...ends, ...cuts])].sort((a, b) => a - b);
  return points.slice(1).map((to, k) => ({ from: points[k]!, to }));
}

type SupportTerm = (
  work: Work,
  restraint: Restraint,
  r: number,
  R: number,
  kinds: { own: Kind; other: Kind; spring: Kind; movement: Kind },
) => NumberTerm | null;

function supportTerms(work: Work, termOf: SupportTerm): NumberTerm[] {
  const { beam, own, other, unknowns } = work;
  return beam.supports.flatMap((named) =>
    (['vertical', 'rotation'] as const).flatMap((component) => {
      const isReleased = unknowns.some(
        ({ redundant: r }) => r.component === component && r.support === named.index,
      );
      if (termOf === movementTerm && isReleased) return [];
      const carried = (state: State) => {
        const { vertical, moment } = state.beam.reactions[named.index]!;
        return component === 'vertical' ? vertical : moment;
      };
      const kinds = kindsOf(work, component);
      return termOf(work, named.support[component], carried(own), carried(other), kinds) ?? [];
    }),
  );
}

function kindsOf({ own, other }: Work, component: 'vertical' | 'rotation') {
  const isUp = component === 'vertical';
  return {
    own: isUp ? own.kinds.force : own.kinds.moment,
    other: isUp ? other.kinds.force : other.kinds.moment,
    spring: isUp ? ('spring' as const) : ('rotational spring' as const),
    movement: isUp ? ('deflection' as const) : ('rotation' as const),
  };
}

const springTerm: SupportTerm = ({ beam, own, other, sense }, restraint, r, R, kinds) =>
  restraint.kind === 'spring'
    ? fractionTerm(
        beam.letters,
        [
          { value: r * own.sense, kind: kinds.own },
          { value: R * other.sense, kind: kinds.other },
        ],
        { value: restraint.stiffness, kind: kinds.spring },
        sense,
      )
    : null;

const movementTerm: SupportTerm = ({ beam, own, sense }, restraint, r, _R, kinds) =>
  fractionTerm(
    beam.letters,
    [
      { value: r * own.sense, kind: kinds.own },
      { value: movementOf(restraint), kind: kinds.movement },
    ],
    null,
    sense < 0 ? 1 : -1,
  );
