import { findMotion, frameOf, type MovingPart, riseOf } from './stability';
import type { Beam, DisplacedShape, Fault, Redundant, Support } from './types';
import { metres, nameSupport } from './words';

type Holding = Pick<Beam, 'length' | 'supports' | 'hinges'>;

/** How the beam without the redundants moves, for a drawing; null where it is stable. */
export function releaseMechanism(beam: Holding, released: readonly Redundant[]): DisplacedShape | null {
  const parts = findMotion(frameOf(beam, released));
  return parts && shapeOf(beam.length, parts);
}

/** The displaced shape, straight between its corners, with 1 as its largest deflection. */
function shapeOf(length: number, parts: readonly MovingPart[]): DisplacedShape {
  const [first, last] = [parts[0]!, parts.at(-1)!];
  const corners = new Map<number, number>([
    [0, 0],
    [first.from, riseOf(first, first.from).rounded()],
  ]);
  for (const part of parts) corners.set(part.to, riseOf(part, part.to).rounded());
  if (last.to < length) corners.set(length, 0);
  const largest = Math.max(...[...corners.values()].map(Math.abs));
  return [...corners].map(([x, rise]) => ({ x, deflection: rise / largest + 0 }));
}

/** Words for a beam that moves without resistance, and what to do about it; undefined where it is stable. */
export function describeMotion(beam: Holding, released: readonly Redundant[] = []): string | undefined {
  const parts = findMotion(frameOf(beam, released));
  if (!parts) return undefined;
  const [first] = parts;
  if (parts.length === 1 && first?.from === 0 && first.to === beam.length) {
    return first.about === null
      ? 'It slides up and down: nothing holds it vertically.'
      : `It turns about ${pivotName(beam, first.about, released)}.`;
  }
  const moves = parts.map((part) => {
    const move =
      part.about === null ? 'slides up and down' : `turns about ${pivotName(beam, part.about, released)}`;
    return `the part between ${metres(part.from)} and ${metres(part.to)} ${move}`;
  });
  const sentence = moves.join(', ');
  return `${sentence.charAt(0).toUpperCase()}${sentence.slice(1)}.`;
}

function pivotName(beam: Holding, at: number, released: readonly Redundant[]): string {
  const holds = (support: Support, i: number) =>
    support.at === at &&
    support.vertical.kind !== 'free' &&
    !released.some((r) => r.component === 'vertical' && r.support === i);
  const support = beam.supports.find(holds);
  if (support) return nameSupport(support);
  return beam.hinges.includes(at) ? `the hinge at ${metres(at)}` : `the released moment at ${metres(at)}`;
}

const REMEDY = 'Add a support, make one hold more, or remove a hinge.';

/** The fault of a beam that moves, vertically or sideways; none where it is stable. */
export function stabilityFaults(beam: Holding, horizontal: 'ignore' | undefined): Fault[] {
  const faults: Fault[] = [];
  const parts = findMotion(frameOf(beam));
  if (parts) {
    const message = `The beam is unstable. ${describeMotion(beam)} ${REMEDY}`;
    faults.push({ path: ['supports'], code: 'unstable', message, motion: shapeOf(beam.length, parts) });
  }
  if (horizontal !== 'ignore' && !beam.supports.some((support) => support.horizontal)) {
    faults.push({
      path: ['supports'],
      code: 'unstable',
      message:
        'The beam is unstable. It slides sideways: nothing holds it horizontally. Make one support a pin, or set "horizontal" to "ignore".',
    });
  }
  return faults;
}
