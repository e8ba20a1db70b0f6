import { type Expression, type Setting, symbol } from '../chart/index';
import { type Beam, letteredSupports, type Restraint, type Support } from '../model/index';
import { type LoadGroup, nameLoads } from './named-loads';
import { Places } from './place';
import { Letters } from './symbols';
import type { DeriveInput } from './types';
import { unitsOf } from './units';

export type NamedSupport = {
  /** A, B, C … from the left. */
  letter: string;
  /** In the beam's list. */
  index: number;
  x: number;
  at: Expression;
  support: Support;
};

/** The beam with a letter for everything in it. */
export type NamedBeam = {
  beam: Beam;
  letters: Letters;
  places: Places;
  length: Expression;
  /** From the left. */
  supports: readonly NamedSupport[];
  hinges: readonly { x: number; at: Expression }[];
  /** The loads, each of one letter or of the two that its ends have. */
  groups: readonly LoadGroup[];
  /** EI and GA of each segment; one letter where all are alike. GA is null where the segment does not shear. */
  segments: readonly NamedSegment[];
  setting: (ei: Expression) => Setting;
};

type NamedSegment = { from: number; to: number; ei: Expression; ga: Expression | null };

export function nameBeam({ beam, names, redundants, system = 'metric' }: DeriveInput): NamedBeam {
  const letters = new Letters(unitsOf(system));
  const places = new Places(letters, beam.length, names?.lengths ?? []);
  const segments = nameSegments(beam, letters);
  let before = 0;
  const spanTo = (x: number) => {
    const at = places.span(x, before);
    before = x;
    return at;
  };
  const supports = letteredSupports(beam).map(
    ({ support, index, letter }): NamedSupport => ({
      letter,
      index,
      x: support.at,
      at: spanTo(support.at),
      support,
    }),
  );
  const length = spanTo(beam.length);
  for (const { letter, support } of supports) nameRestraints(letters, letter, support);
  return {
    beam,
    letters,
    places,
    length,
    supports,
    hinges: beam.hinges.map((x) => ({ x, at: places.load(x) })),
    groups: nameLoads(beam, redundants, names?.loads ?? [], letters, places),
    segments,
    setting: (ei) => ({ value: letters.value, ei, length: beam.length }),
  };
}

function nameSegments({ segments }: Beam, letters: Letters): NamedSegment[] {
  const named = (sizes: readonly number[], letter: string, kind: 'bending' | 'shear') => {
    const different = new Set(sizes).size > 1;
    const found = new Map<number, Expression>();
    return (size: number) => {
      const known = found.get(size);
      if (known) return known;
      const made = different
        ? letters.number(letter, size, kind)
        : letters.define(letter, size, kind, 'given');
      found.set(size, made);
      return made;
    };
  };
  const nameEi = named(
    segments.map(({ ei }) => ei),
    'EI',
    'bending',
  );
  const nameGa = named(
    segments.flatMap(({ ga }) => (ga === null ? [] : [ga])),
    'GA',
    'shear',
  );
  return segments.map(({ from, to, ei, ga }) => ({
    from,
    to,
    ei: nameEi(ei),
    ga: ga === null ? null : nameGa(ga),
  }));
}

/** Springs and prescribed movements, by their support's letter: k_B, Δ_B down, φ_B anticlockwise. */
function nameRestraints(letters: Letters, letter: string, { vertical, rotation }: Support): void {
  if (vertical.kind === 'spring') letters.define(springTex(letter), vertical.stiffness, 'spring', 'given');
  if (rotation.kind === 'spring')
    letters.define(turningSpringTex(letter), rotation.stiffness, 'rotational spring', 'given');
  const [rise, turn] = [movementOf(vertical), movementOf(rotation)];
  if (rise !== 0) letters.define(settlementTex(letter), -rise, 'deflection', 'given');
  if (turn !== 0) letters.define(turningTex(letter), turn, 'rotation', 'given');
}

const springTex = (letter: string): string => `k_{${letter}}`;
const turningSpringTex = (letter: string): string => `k_{\\theta ${letter}}`;
const settlementTex = (letter: string): string => `\\Delta_{${letter}}`;
const turningTex = (letter: string): string => `\\varphi_{${letter}}`;

export const movementOf = (restraint: Restraint): number =>
  restraint.kind === 'free' ? 0 : restraint.movement;

/** What a support prescribes: its settlement down, its turn anticlockwise; null for nothing. */
export const settlementOf = ({ letter, support }: NamedSupport): Expression | null =>
  movementOf(support.vertical) === 0 ? null : symbol(settlementTex(letter));
export const turningOf = ({ letter, support }: NamedSupport): Expression | null =>
  movementOf(support.rotation) === 0 ? null : symbol(turningTex(letter));

/** The stiffness of a support's springs; null where it has none. */
export const springOf = ({ letter, support }: NamedSupport): Expression | null =>
  support.vertical.kind === 'spring' ? symbol(springTex(letter)) : null;
export const turningSpringOf = ({ letter, support }: NamedSupport): Expression | null =>
  support.rotation.kind === 'spring' ? symbol(turningSpringTex(letter)) : null;
