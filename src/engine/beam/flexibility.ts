import { Cholesky, type LowerRow, Wide } from '../linear/index';
import { type Beam, defaultRedundants, placeOf, placeRedundant, type Redundant } from '../model/index';
import { type Mesh, meshOf } from './mesh';
import { type Reaction, reactionsWithout } from './released';
import {
  bendsOf,
  flexibilityBetween,
  type Member,
  membersOf,
  type UnitState,
  unitState,
} from './virtual-work';

/** All of the force method that does not depend on the loads: made once per geometry and set of redundants. */
export type Flexibility = {
  beam: Beam;
  redundants: readonly Redundant[];
  mesh: Mesh;
  members: readonly Member[];
  /** Reactions of the released beam. */
  reactions: readonly Reaction[];
  units: readonly UnitState[];
  /** Rows of F up to the diagonal. */
  rows: readonly LowerRow[];
  factors: Cholesky;
};

/**
 * The released beam, its unit states and its flexibility matrix
 *
 *   f_ij = ∫ m_i m_j/EI dx + ∫ v_i v_j/GA dx + Σ r_i r_j/k        (unit-load theorem)
 *
 * with 1/k of a released spring on its own diagonal. m/N between forces, rad/(N·m) between moments. Only the lower half
 * is computed and mirrored (Maxwell). Fails with SingularMatrix, which names the row, where the redundants repeat one
 * another to within the digits carried; a set that leaves a mechanism is refused before, by checkRedundants.
 */
export function flexibilityOf(beam: Beam, chosen?: readonly Redundant[]): Flexibility {
  const redundants = chosen?.map((r) => placeRedundant(beam, r)) ?? defaultRedundants(beam);
  const releases = redundants.flatMap((r) => (r.component === 'moment' ? [r.at] : []));
  const mesh = meshOf(beam, releases);
  const joints = new Set([...beam.supports.map(({ at }) => at), ...beam.hinges, ...releases]);
  const numbers = [...joints].map((x) => mesh.index.get(x)!).sort((a, b) => a - b);
  const members = membersOf(mesh, numbers);
  const reactions = reactionsWithout(beam, redundants);
  const units = redundants.map((r) => unitState(mesh, members, reactions, r, placeOf(beam, r)));
  const rows = flexibilityRows(beam, redundants, members, reactions, units);
  return { beam, redundants, mesh, members, reactions, units, rows, factors: new Cholesky(rows) };
}

function flexibilityRows(
  beam: Beam,
  redundants: readonly Redundant[],
  members: readonly Member[],
  reactions: readonly Reaction[],
  units: readonly UnitState[],
): LowerRow[] {
  const compliances = new Map<number, Wide>();
  reactions.forEach(({ restraint }, c) => {
    if (restraint.kind === 'spring') compliances.set(c, Wide.ONE.over(restraint.stiffness));
  });
  return units.map((unit, i) => {
    const bends = bendsOf(members, unit);
    const row = units.slice(0, i + 1).map((other) => flexibilityBetween(unit, bends, other, compliances));
    row[i] = row[i]!.plus(ownCompliance(beam, redundants[i]!));
    const first = row.findIndex(({ hi }) => hi !== 0);
    return { first: first < 0 ? i : first, entries: row.slice(first < 0 ? i : first) };
  });
}

/** 1/k where the redundant is the force in a spring. */
function ownCompliance(beam: Beam, redundant: Redundant): Wide {
  if (redundant.component === 'moment') return Wide.ZERO;
  const restraint = beam.supports[redundant.support]![redundant.component];
  return restraint.kind === 'spring' ? Wide.ONE.over(restraint.stiffness) : Wide.ZERO;
}

/** F whole, rounded. */
export function flexibilityMatrix(rows: readonly LowerRow[]): number[][] {
  const entry = (i: number, j: number) => {
    const { first, entries } = rows[i]!;
    return j < first ? 0 : entries[j - first]!.rounded();
  };
  return rows.map((_, i) => rows.map((_, j) => (j <= i ? entry(i, j) : entry(j, i))));
}
