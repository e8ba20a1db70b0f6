import { type Beam, COINCIDENT, type Fault, metres, type Reading } from '../model/index';
import type { InfluenceQuantity, Side } from './types';

/** A quantity as it is asked for: without a side the section is just right of `at`. */
export type AskedQuantity =
  | Exclude<InfluenceQuantity, { kind: 'shear' | 'moment' }>
  | { kind: 'shear' | 'moment'; at: number; side?: Side | undefined };

const refused = (path: Fault['path'], code: Fault['code'], message: string): Reading<InfluenceQuantity> => ({
  ok: false,
  faults: [{ path, code, message }],
});

/**
 * The quantity with its section brought to a point of the beam that it coincides with, and to the inside of the beam
 * at an end; or why the beam has no such quantity.
 */
export function readInfluenceQuantity(beam: Beam, asked: AskedQuantity): Reading<InfluenceQuantity> {
  if (asked.kind === 'reaction') return readReaction(beam, asked);
  const { length } = beam;
  const tolerance = COINCIDENT * length;
  if (!(asked.at >= -tolerance && asked.at <= length + tolerance)) {
    const message = `The section is off the beam. Give a position from 0 to ${metres(length)}.`;
    return refused(['at'], 'out_of_range', message);
  }
  const points = [0, length, ...beam.supports.map(({ at }) => at), ...beam.hinges];
  const ends = beam.segments.map(({ to }) => to);
  const at = [...points, ...ends].find((x) => Math.abs(x - asked.at) <= tolerance) ?? asked.at;
  if (asked.kind === 'deflection') return { ok: true, value: { kind: 'deflection', at } };
  const side = at === 0 ? 'right' : at === length ? 'left' : (asked.side ?? 'right');
  return { ok: true, value: { kind: asked.kind, at, side } };
}

function readReaction(
  { supports }: Beam,
  asked: Extract<InfluenceQuantity, { kind: 'reaction' }>,
): Reading<InfluenceQuantity> {
  const support = supports[asked.support];
  if (!support) {
    const message = `There is no support ${asked.support}. The beam has ${supports.length}, counted from 0 in the order given.`;
    return refused(['support'], 'out_of_range', message);
  }
  if (support[asked.component].kind === 'free') {
    const held = asked.component === 'vertical' ? 'vertical movement' : 'rotation';
    const message = `This support does not hold ${held}: it has no such reaction. Choose another.`;
    return refused(['component'], 'unrestrained', message);
  }
  return { ok: true, value: asked };
}
