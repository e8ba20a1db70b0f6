/** The parts of a drawn draft: where each stands on the beam, and where in the document. */
import { type Load, type SegmentDocument, type SupportDocument, supportLetter } from '@/engine/model';
import { formatQuantity } from '@/engine/quantity';
import { type Dimensioned, evaluateNumber, evaluateTruth, type Template } from '@/engine/template';
import { drawnName } from '@/features/template/names';
import type { Pointer } from '../edit';
import type { Sketch } from './sketch';

export interface Part {
  readonly kind: 'support' | 'hinge' | 'segment' | 'point' | 'line' | 'couple' | 'curvature' | 'dimension';
  readonly pointer: Pointer;
  /** What is said of it: "Support B, roller, at L1, 6 m". */
  readonly name: string;
  /** m; the same where the part stands at one place. */
  readonly from: number;
  readonly to: number;
  /** Which of its kind it is in the drawn beam. */
  readonly nth: number;
}

/** A support as it is drawn: springs beside its kind. */
interface DrawnSupport extends SupportDocument {
  readonly letter: string;
}

export interface DrawnBeam {
  readonly length: number;
  readonly supports: readonly DrawnSupport[];
  readonly hinges: readonly number[];
  readonly loads: readonly Load[];
  /** Of each load, with its group: "w, G". */
  readonly loadNames: readonly string[];
  readonly segments: readonly (SegmentDocument & { readonly share: string })[];
  readonly dimensions: readonly Dimensioned[];
}

export interface Drawn {
  readonly beam: DrawnBeam;
  /** From the left; what stands at one place in the order of drawing. */
  readonly parts: readonly Part[];
}

type Beam = Template['beam'];
type Conditional = { when?: Beam['length'] | undefined };

const metres = (si: number): string => formatQuantity(si, 'm');

/** What the parts of a sketch are read with. */
interface Reading extends Sketch {
  readonly isOn: (part: Conditional) => boolean;
  readonly at: (expression: Beam['length']) => number;
  readonly isWithin: (...places: readonly number[]) => boolean;
}

function readingOf(sketch: Sketch): Reading {
  const { scope, beam } = sketch.instance;
  return {
    ...sketch,
    isOn: ({ when }) => when === undefined || evaluateTruth(when.tree, scope),
    at: ({ tree }) => evaluateNumber(tree, scope),
    isWithin: (...places) => places.every((x) => x >= 0 && x <= beam.length * (1 + 1e-9)),
  };
}

/** A part and what is drawn of it. */
interface Read<T> {
  readonly part: Omit<Part, 'nth'>;
  readonly drawn: T;
}

function supportsOf({ template, instance, isOn, isWithin }: Reading): Read<DrawnSupport>[] {
  return shown(template.beam.supports, isOn).flatMap(({ one, index }, nth) => {
    const support = instance.beam.supports[nth];
    if (!support || !isWithin(support.at)) return [];
    const letter = supportLetter(index);
    const name = `Support ${letter}, ${supportName(one)}, at ${one.at.text}, ${metres(support.at)}`;
    const pointer = `/beam/supports/${index}`;
    return [
      {
        part: { kind: 'support', pointer, name, from: support.at, to: support.at },
        drawn: { ...support, letter },
      },
    ];
  });
}

function hingesOf({ template, isOn, at, isWithin }: Reading): Read<number>[] {
  return shown(template.beam.hinges ?? [], isOn).flatMap(({ one, index }) => {
    const x = at(one.at);
    const name = `Hinge at ${one.at.text}, ${metres(x)}`;
    const part = { kind: 'hinge', pointer: `/beam/hinges/${index}`, name, from: x, to: x } as const;
    return isWithin(x) ? [{ part, drawn: x }] : [];
  });
}

function segmentsOf({ template, at, isWithin }: Reading): Read<DrawnBeam['segments'][number]>[] {
  return (template.beam.segments ?? []).flatMap(({ from, to, ei }, index) => {
    const drawn = { from: at(from), to: at(to), ei: at(ei), share: ei.text };
    const name = `Section of ${ei.text} EI from ${from.text} to ${to.text}`;
    const pointer = `/beam/segments/${index}`;
    const part = { kind: 'segment', pointer, name, from: drawn.from, to: drawn.to } as const;
    return isWithin(drawn.from, drawn.to) ? [{ part, drawn }] : [];
  });
}

function loadsOf({ template, instance, isWithin }: Reading): Read<{ load: Load; name: string }>[] {
  return instance.shares.flatMap(({ template: written, row }, nth) => {
    const load = instance.beam.loads[nth];
    if (!load) return [];
    const [from, to] = placeOf(load);
    if (!isWithin(from, to)) return [];
    const { tex, group } = instance.loadNames[nth] ?? { tex: '', group: '' };
    const spoken = [LOAD_NAMES[load.kind], drawnName(tex).replaceAll(/[_{}]/g, '')].filter(Boolean).join(' ');
    const name = [spoken, `group ${group}`, placeText(written), ...(row ? [`row ${row}`] : [])].join(', ');
    const pointer = `/beam/loads/${template.beam.loads.indexOf(written)}`;
    return [
      {
        part: { kind: load.kind, pointer, name, from, to },
        drawn: { load, name: [drawnName(tex), group].filter(Boolean).join(', ') },
      },
    ];
  });
}

function dimensionsOf({ template, instance, isOn, isWithin }: Reading): Read<Dimensioned>[] {
  return shown(template.beam.dimensions, isOn).flatMap(({ one, index }, nth) => {
    const drawn = instance.dimensions[nth];
    if (!drawn || !isWithin(drawn.from, drawn.to)) return [];
    const [from, to] = [Math.min(drawn.from, drawn.to), Math.max(drawn.from, drawn.to)];
    const name = `Dimension ${drawn.symbol}, ${metres(to - from)}, from ${one.from.text} to ${one.to.text}`;
    return [{ part: { kind: 'dimension', pointer: `/beam/dimensions/${index}`, name, from, to }, drawn }];
  });
}

/** What of the draft lies on the beam at these values; the rest has faults, and is not drawn. */
export function drawnOf(sketch: Sketch): Drawn {
  const reading = readingOf(sketch);
  const [supports, hinges, segments] = [supportsOf(reading), hingesOf(reading), segmentsOf(reading)];
  const [loads, dimensions] = [loadsOf(reading), dimensionsOf(reading)];
  const drawn = <T>(list: readonly Read<T>[]): T[] => list.map((one) => one.drawn);
  return {
    beam: {
      length: sketch.instance.beam.length,
      supports: drawn(supports),
      hinges: drawn(hinges),
      segments: drawn(segments),
      dimensions: drawn(dimensions),
      loads: drawn(loads).map(({ load }) => load),
      loadNames: drawn(loads).map(({ name }) => name),
    },
    parts: [supports, hinges, segments, loads, dimensions]
      .flatMap((list) => list.map(({ part }, nth): Part => ({ ...part, nth })))
      .sort((a, b) => a.from + a.to - b.from - b.to),
  };
}

const shown = <T extends Conditional>(list: readonly T[], isOn: (one: T) => boolean) =>
  list.map((one, index) => ({ one, index })).filter(({ one }) => isOn(one));

function supportName({ kind, kv, kr, rise }: Beam['supports'][number]): string {
  const springs = [...(kv ? ['vertical spring'] : []), ...(kr ? ['rotational spring'] : [])];
  const held = kind === 'free' && springs.length > 0 ? springs : [kind, ...springs];
  return [...held, ...(rise ? ['which moves'] : [])].join(', ');
}

const LOAD_NAMES = {
  point: 'Point load',
  line: 'Line load',
  couple: 'Couple',
  curvature: 'Curvature',
} as const;

const placeOf = (load: Load): readonly [number, number] =>
  'at' in load ? [load.at, load.at] : [load.from, load.to];

const placeText = (load: Beam['loads'][number]): string =>
  'at' in load ? `at ${load.at.text}` : `from ${load.from.text} to ${load.to.text}`;
