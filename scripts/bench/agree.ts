import { ContinuousBeam } from '@/engine/continuous/index';
import type { Beam } from '@/engine/model/index';
import { STATIONS } from './frame';
import type { Peer } from './peers';

const QUANTITIES = ['shear', 'moment', 'slope', 'deflection'] as const;
const LIMIT = 1e-9;

/** A race is one only if all do the same work: the peer's reactions and stations are ours. */
export function verify(beams: readonly Beam[], peerOf: (beam: Beam, perSpan: number) => Peer): void {
  const solver = new ContinuousBeam();
  const peer = peerOf(beams[0]!, 0);
  for (const beam of beams) {
    if (!solver.take(beam)) throw new Error('a beam of the bench is no continuous one');
    solver.solve();
    const answer = peer(beam);
    const stations = solver.stations(STATIONS);
    for (const quantity of QUANTITIES) {
      const { max, min } = solver.extremes()[quantity];
      compare(Array.from(stations[quantity]), answer[quantity], Math.max(max, -min));
    }
    const reactions = solver.reactions().map(({ vertical }) => vertical);
    compare(reactions, answer.reactions, Math.max(...reactions.map(Math.abs)));
  }
}

function compare(ours: readonly number[], theirs: Float64Array, largest: number): void {
  theirs.forEach((value, i) => {
    if (!(Math.abs(value - ours[i]!) <= LIMIT * largest))
      throw new Error(`a peer answers ${value}, we ${ours[i]}`);
  });
}
