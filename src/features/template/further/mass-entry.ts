/** What moves with the beam, as a person says it. */
import type { Beam, Load } from '@/engine/model';
import { joinMasses, type Masses, massOfLoads } from '@/engine/vibration';

/** The groups that the beam's loads are in, each once, in their order; '' is those of none. */
export const groupsOf = ({ loads }: Beam): string[] => [...new Set(loads.map(({ group }) => group ?? ''))];

/** Permanent loads, by the name that groups of them have. */
export const isPermanent = (group: string): boolean => group === 'G';

export interface GivenMasses {
  readonly masses: Masses;
  /** How many loads of the chosen groups have no mass: couples, curvatures, and what pulls up. */
  readonly leftOut: number;
}

/** The beam's own mass per length, kg/m, and the weights of the loads in the groups. */
export function massesFrom(beam: Beam, own: number, groups: ReadonlySet<string>): GivenMasses {
  const counts = ({ group }: Load) => groups.has(group ?? '');
  const weights = massOfLoads(beam.loads, counts);
  const alongAll = { from: 0, to: beam.length, start: own, end: own };
  return {
    masses: joinMasses({ distributed: [alongAll], lumped: [] }, weights.masses),
    leftOut: weights.leftOut.length,
  };
}
