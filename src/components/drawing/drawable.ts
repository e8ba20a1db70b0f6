import type { Beam, BeamDocument, Restraint, Support, SupportDocument } from '@/engine/model/index';

const restraint = (rigid: boolean, stiffness: number | undefined, movement = 0): Restraint => {
  if (rigid) return { kind: 'rigid', movement };
  return stiffness ? { kind: 'spring', stiffness, movement } : { kind: 'free' };
};

function supportOf({ at, kind, kv, kr, rise, rotation }: SupportDocument): Support {
  return {
    at,
    kind,
    vertical: restraint(kind === 'fixed' || kind === 'pin' || kind === 'roller', kv, rise),
    rotation: restraint(kind === 'fixed' || kind === 'guided', kr, rotation),
    horizontal: kind === 'fixed' || kind === 'pin',
  };
}

/**
 * A document that was refused, as something to draw: what lies on the beam is kept, the rest left out. Null where there is no length to draw.
 * For pictures of what is wrong only; no result may be computed from it.
 */
export function drawableBeam(document: BeamDocument): Beam | null {
  const { length } = document;
  if (!(length > 0) || !Number.isFinite(length)) return null;
  const on = (x: number) => x >= 0 && x <= length;
  const loads = (document.loads ?? []).filter((load) =>
    'at' in load ? on(load.at) : on(load.from) && on(load.to),
  );
  return {
    length,
    segments: [{ from: 0, to: length, ei: document.ei ?? 1, ga: null }],
    supports: document.supports.filter(({ at }) => on(at)).map(supportOf),
    hinges: (document.hinges ?? []).filter((x) => x > 0 && x < length).sort((a, b) => a - b),
    loads,
    degree: 0,
  };
}
