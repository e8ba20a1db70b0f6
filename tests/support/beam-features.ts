import type { BeamDocument, Load, SupportDocument } from '@/engine/model/index';

/** What a random beam must be able to hold. A run that holds one of them too rarely has tested too little. */
export function featuresOf(beam: BeamDocument): string[] {
  const found = [
    ...spanFeatures(beam),
    ...beam.supports.flatMap((support) => supportFeatures(support, beam.length)),
    ...hingeFeatures(beam),
    ...segmentFeatures(beam),
    ...loadFeatures(beam),
  ];
  return [...new Set(found)];
}

const when = (held: boolean, name: string) => (held ? [name] : []);

function spanFeatures(beam: BeamDocument): string[] {
  const places = verticalsOf(beam);
  return [
    `spans: ${Math.max(1, places.length - 1)}`,
    ...when(places[0]! > 0, 'overhang at the left'),
    ...when(places.at(-1)! < beam.length, 'overhang at the right'),
    ...when(places.length === 1, 'cantilever'),
  ];
}

function verticalsOf(beam: BeamDocument): number[] {
  return beam.supports
    .filter(({ kind, kv }) => kv !== undefined || kind === 'fixed' || kind === 'pin' || kind === 'roller')
    .map(({ at }) => at)
    .sort((a, b) => a - b);
}

function supportFeatures({ at, kind, kv, kr, rise, rotation }: SupportDocument, length: number): string[] {
  return [
    `support: ${kind}`,
    ...when(kv !== undefined, 'spring against movement'),
    ...when(kr !== undefined, 'spring against rotation'),
    ...when(rise !== undefined && kv === undefined, 'prescribed rise'),
    ...when(rise !== undefined && kv !== undefined, 'rise of a spring’s ground'),
    ...when(rotation !== undefined && kr === undefined, 'prescribed rotation'),
    ...when(rotation !== undefined && kr !== undefined, 'rotation of a spring’s ground'),
    ...when(at === 0 || at === length, 'support at an end'),
  ];
}

function hingeFeatures({ hinges = [], supports }: BeamDocument): string[] {
  return [
    ...when(hinges.length > 0, 'hinge'),
    ...when(hinges.length > 1, 'hinges: several'),
    ...when(
      supports.some(({ at }) => hinges.includes(at)),
      'hinge on a support',
    ),
  ];
}

function segmentFeatures({ segments = [], supports, hinges = [] }: BeamDocument): string[] {
  const steps = segments.slice(1).map(({ from }) => from);
  return [
    ...when(steps.length > 0, 'stepped EI'),
    ...when(
      segments.some(({ ga }) => ga != null),
      'shear flexibility',
    ),
    ...when(
      supports.some(({ at }) => steps.includes(at)),
      'step on a support',
    ),
    ...when(
      hinges.some((at) => steps.includes(at)),
      'step at a hinge',
    ),
  ];
}

function loadFeatures(beam: BeamDocument): string[] {
  const loads = beam.loads ?? [];
  const pointsOf = (load: Load) => ('at' in load ? [load.at] : [load.from, load.to]);
  const ends = loads.flatMap((load) => ('at' in load ? [] : pointsOf(load)));
  const places = loads.flatMap((load) => ('at' in load ? [load.at] : []));
  return [
    ...when(loads.length === 0, 'no load'),
    ...loads.flatMap((load) => [...kindOf(load), ...placeOf(beam, load)]),
    ...when(new Set(places).size < places.length, 'coincident loads'),
    ...when(new Set(ends).size < ends.length, 'load ends coinciding'),
    ...when(
      places.some((at) => ends.includes(at)),
      'load at the end of another',
    ),
    ...when(crowded(beam), 'points closer than a thousandth'),
  ];
}

function kindOf(load: Load): string[] {
  switch (load.kind) {
    case 'point':
      return ['load: point', ...when(load.p < 0, 'load: uplift'), ...when(load.p === 0, 'zero load')];
    case 'couple':
      return ['load: couple', ...when(load.m === 0, 'zero load')];
    case 'curvature':
      return ['load: curvature'];
    case 'line':
      if (load.from === load.to) return ['zero-length line load'];
      if (load.w0 === load.w1) return ['load: uniform', ...when(load.w0 === 0, 'zero load')];
      return [load.w0 * load.w1 === 0 ? 'load: triangular' : 'load: trapezoidal'];
  }
}

function placeOf({ length, supports, hinges = [], segments = [] }: BeamDocument, load: Load): string[] {
  const points = 'at' in load ? [load.at] : [load.from, load.to];
  const name = 'at' in load ? load.kind : `${load.kind} end`;
  return points.flatMap((x) => [
    ...when(
      supports.some(({ at }) => at === x),
      `${name} on a support`,
    ),
    ...when(
      supports.some(({ at }) => at !== x && Math.abs(at - x) < 1e-12 * length),
      'load a rounding off a support',
    ),
    ...when(hinges.includes(x), `${name} at a hinge`),
    ...when(x === 0 || x === length, `${name} at an end of the beam`),
    ...when(
      segments.slice(1).some(({ from }) => from === x),
      `${name} at a step`,
    ),
  ]);
}

function crowded({ length, supports, hinges = [], loads = [] }: BeamDocument): boolean {
  const points = [
    ...supports.map(({ at }) => at),
    ...hinges,
    ...loads.flatMap((load) => ('at' in load ? [load.at] : [load.from, load.to])),
  ].sort((a, b) => a - b);
  return points.slice(1).some((x, k) => x - points[k]! < 1e-3 * length && x - points[k]! > 1e-12 * length);
}
