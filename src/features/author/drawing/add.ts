/** Adding to a beam: what each tool writes into the document, with the parameters that it needs. */
import { SUPPORT_KINDS, type SupportKind, supportLetter } from '@/engine/model';
import { formatNumber, THIN_SPACE } from '@/engine/quantity';
import type { LoadKind } from '@/engine/template';
import type { Written } from '@/features/review/draft';
import { type Edit, listAt, type Pointer, textAt, valueAt } from '../edit';
import { relettered } from './letters';
import { newParameter } from './parameters';
import { type Bay, bayAt, baysOf, type Place } from './places';
import { withReleases } from './releases';
import type { Sketch } from './sketch';

export const EXTENDING = ['span', 'overhang'] as const;
export const AT_A_PLACE = ['pin', 'roller', 'fixed', 'guided', 'spring', 'hinge', 'point', 'couple'] as const;
export const OVER_A_LENGTH = ['uniform', 'triangle', 'curvature', 'segment'] as const;
export type Extending = (typeof EXTENDING)[number];
export type PlaceTool = (typeof AT_A_PLACE)[number];
export type LengthTool = (typeof OVER_A_LENGTH)[number];

/** What was written, and the part that is chosen then. */
export interface Addition {
  readonly edits: readonly Edit[];
  readonly chosen: Pointer;
}

/** A place that no expression leads to yet: so far right of a support or end. */
export interface NewPlace {
  readonly bay: Bay;
  /** m from the left end of the bay, as a person would type it. */
  readonly offset: number;
}

export type Target = Place | NewPlace;
export const isNew = (target: Target): target is NewPlace => 'offset' in target;

const joined = (text: string, symbol: string): string =>
  text === '' || text === '0' ? symbol : `${text} + ${symbol}`;

/** The beam is longer by a span with a support at its end, or by an overhang without. */
export function extend(document: Written, tool: Extending): Addition {
  const { symbol, edit } = newParameter(document, tool);
  const before = textAt(document, '/beam/length');
  const after = joined(before, symbol);
  const supports = listAt(document, '/beam/supports');
  const count = supports.length;
  const first: Edit[] =
    count === 0
      ? [
          insert('/beam/supports/-', {
            at: before === '' ? '0' : before,
            kind: tool === 'span' ? 'pin' : 'fixed',
          }),
        ]
      : [];
  const own: Edit[] = tool === 'span' ? [insert('/beam/supports/-', { at: after, kind: 'roller' })] : [];
  const edits: Edit[] = [
    ...lists(document),
    edit,
    { do: 'set', at: '/beam/length', value: after },
    ...first,
    ...own,
    insert('/beam/dimensions/-', { from: before === '' ? '0' : before, to: after, symbol }),
  ];
  const index = listAt(document, '/beam/dimensions').length;
  return {
    edits: withReleases(document, edits),
    chosen: tool === 'span' ? `/beam/supports/${count + first.length}` : `/beam/dimensions/${index}`,
  };
}

/** A beam's lists stand there although nothing is in them: the document asks for them. */
const lists = (document: Written): Edit[] =>
  (['/derived', '/beam/loads', '/beam/redundants'] as const)
    .filter((at) => valueAt(document, at) === undefined)
    .map((at): Edit => ({ do: 'set', at, value: [] }));

const insert = (at: Pointer, value: unknown): Edit => ({ do: 'insert', at, value });

/** The expression of a target, and what it takes to have one. */
export function resolved(document: Written, target: Target): { text: string; x: number; edits: Edit[] } {
  if (!isNew(target)) return { text: target.text, x: target.x, edits: [] };
  const { bay, offset } = target;
  const figure = (metres: number) => formatNumber(metres).replaceAll(THIN_SPACE, '');
  const { symbol, edit } = newParameter(document, 'place', { default: `${figure(offset)} m` });
  const text = joined(bay.from.text, symbol);
  const isFirst = bay.from.text === '0';
  const rule = {
    id: `${symbol.toLowerCase()}-within`,
    title: 'The place lies on its part of the beam',
    expression: `${text} <= ${bay.to.text}`,
    severity: 'block',
    message: `The place {${symbol}} is too far to the right. Move it, or lengthen the beam.`,
    trial: { parameters: { [symbol]: `${figure(bay.to.x - bay.from.x + 1)} m` } },
  };
  const edits: Edit[] = [
    edit,
    insert('/rules/-', rule),
    insert('/beam/dimensions/-', { from: isFirst ? '0' : bay.from.text, to: text, symbol }),
  ];
  return { text, x: bay.from.x + offset, edits };
}

const HOLDS: Readonly<Record<SupportKind | 'spring', SupportKind>> = {
  pin: 'pin',
  roller: 'roller',
  fixed: 'fixed',
  guided: 'guided',
  free: 'free',
  spring: 'free',
};

const isSupport = (tool: PlaceTool): tool is Extract<PlaceTool, SupportKind | 'spring'> =>
  tool === 'spring' || SUPPORT_KINDS.some((kind) => kind === tool);

/** A support, hinge, point load or couple at a place. */
export function addAt(document: Written, sketch: Sketch, tool: PlaceTool, target: Target): Addition {
  const { text, x, edits } = resolved(document, target);
  if (isSupport(tool)) return addSupport(document, sketch, tool, { text, x, edits });
  if (tool === 'hinge') {
    const index = listAt(document, '/beam/hinges').length;
    return {
      edits: withReleases(document, [...edits, insert('/beam/hinges/-', { at: text })]),
      chosen: `/beam/hinges/${index}`,
    };
  }
  const needed = newParameter(document, tool === 'point' ? 'force' : 'couple');
  const load =
    tool === 'point'
      ? { kind: 'point', at: text, p: needed.symbol }
      : { kind: 'couple', at: text, m: needed.symbol };
  return addLoad(document, tool, load, [...edits, needed.edit]);
}

function addSupport(
  document: Written,
  sketch: Sketch,
  tool: SupportKind | 'spring',
  place: { text: string; x: number; edits: Edit[] },
): Addition {
  const { length, supports } = sketch.instance.beam;
  const there = supports.findIndex(({ at }) => Math.abs(at - place.x) < 1e-9 * length);
  // Supports that only stand under a condition are counted in the document, not on the beam.
  const isPlain = supports.length === listAt(document, '/beam/supports').length;
  const count = listAt(document, '/beam/supports').length;
  const spring = tool === 'spring' ? newParameter(document, 'spring') : null;
  const support = { at: place.text, kind: HOLDS[tool], ...(spring && { kv: spring.symbol }) };
  const needed = [...place.edits, ...(spring ? [spring.edit] : [])];
  if (there >= 0 && isPlain) {
    const at = `/beam/supports/${there}`;
    const edits = [
      ...needed,
      { do: 'set', at, value: { ...support, at: textAt(document, `${at}/at`) } } as const,
    ];
    return { edits: withReleases(document, edits), chosen: at };
  }
  const index = isPlain ? supports.filter(({ at }) => at < place.x).length : count;
  const letters = new Map(
    Array.from({ length: count }, (_, k) => [supportLetter(k), supportLetter(k < index ? k : k + 1)]),
  );
  const chosen = `/beam/supports/${index}`;
  const edits = [...needed, ...relettered(document, letters), insert(chosen, support)];
  return { edits: withReleases(document, edits), chosen };
}

const LOAD_KINDS: Partial<Record<PlaceTool | LengthTool, LoadKind>> = {
  point: 'point',
  couple: 'couple',
  uniform: 'uniform',
  triangle: 'triangular',
  curvature: 'temperature',
};

function addLoad(
  document: Written,
  tool: PlaceTool | LengthTool,
  load: unknown,
  needed: readonly Edit[],
): Addition {
  const kind = LOAD_KINDS[tool];
  const isNamed = listAt(document, '/load_kinds').includes(kind);
  const index = listAt(document, '/beam/loads').length;
  return {
    edits: [
      ...needed,
      insert('/beam/loads/-', load),
      ...(isNamed || !kind ? [] : [insert('/load_kinds/-', kind)]),
    ],
    chosen: `/beam/loads/${index}`,
  };
}

/** A load or a section over a length between two places. */
export function addOver(document: Written, sketch: Sketch, tool: LengthTool, bay: Bay): Addition {
  const { from, to } = bay;
  const place = { from: from.text, to: to.text };
  switch (tool) {
    case 'uniform': {
      const { symbol, edit } = newParameter(document, 'uniform');
      return addLoad(document, tool, { kind: 'line', ...place, w0: symbol, w1: symbol }, [edit]);
    }
    case 'triangle': {
      const { symbol, edit } = newParameter(document, 'varying');
      return addLoad(document, tool, { kind: 'line', ...place, w0: '0', w1: symbol }, [edit]);
    }
    case 'curvature': {
      const { symbol, edit } = newParameter(document, 'curvature');
      return addLoad(document, tool, { kind: 'curvature', ...place, kappa: symbol }, [edit]);
    }
    case 'segment':
      return addSegment(document, sketch, bay);
  }
}

/** Sections cover the whole beam without a gap: a new one parts the section that it lies in. */
function addSegment(document: Written, sketch: Sketch, { from, to }: Bay): Addition {
  const { segments = [] } = sketch.instance.beam;
  const within = segments.findIndex((one) => one.from <= from.x && to.x <= one.to);
  const around =
    within < 0
      ? { from: '0', to: textAt(document, '/beam/length'), ei: '1' }
      : Object(listAt(document, '/beam/segments')[within]);
  const own = { from: from.text, to: to.text, ei: '2' };
  const parts = [
    ...(around.from === own.from ? [] : [{ ...around, to: own.from }]),
    own,
    ...(around.to === own.to ? [] : [{ ...around, from: own.to }]),
  ];
  const at = Math.max(0, within);
  const removed: Edit[] = within < 0 ? [] : [{ do: 'remove', at: `/beam/segments/${within}` }];
  return {
    edits: [...removed, ...parts.map((part, k) => insert(`/beam/segments/${at + k}`, part))],
    chosen: `/beam/segments/${at + parts.indexOf(own)}`,
  };
}

/** The whole of the beam as a length to put something over. */
export function wholeOf(sketch: Sketch): Bay | undefined {
  const bays = baysOf(sketch);
  const [first, last] = [bays[0], bays.at(-1)];
  return first && last && { from: first.from, to: last.to };
}

/** Where the pointer is, as a place of its own: to the step that a person would type. */
export function newPlaceAt(sketch: Sketch, x: number, step: number): NewPlace | null {
  const bay = bayAt(baysOf(sketch), x);
  if (!bay) return null;
  const offset = Math.round((x - bay.from.x) / step) * step;
  return { bay, offset: Number(offset.toFixed(6)) };
}
