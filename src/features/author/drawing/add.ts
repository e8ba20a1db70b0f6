/** Adding to a beam at a place: what each tool writes into the document, with the parameters that it needs. */
import { SUPPORT_KINDS, type SupportKind, supportLetter } from '@/engine/model';
import { formatNumber, THIN_SPACE } from '@/engine/quantity';
import type { Written } from '@/features/review/draft';
import { type Added, affectAll, freshId, parameter } from '../add';
import { type DraftSteps, plus } from '../draft-steps';
import { listAt, type Pointer, textAt } from '../edit';
import { COUPLE, CURVATURE, type NewParameter, PLACE, POINT, TRIANGULAR, UNIFORM } from '../entries';
import { changing } from './beam-reading';
import { relettered } from './letters';
import { type Bay, bayAt, drawnBays, type Place } from './places';
import type { Sketch } from './sketch';

export const AT_A_PLACE = ['pin', 'roller', 'fixed', 'guided', 'spring', 'hinge', 'point', 'couple'] as const;
const OVER_A_LENGTH = ['uniform', 'triangle', 'curvature', 'segment'] as const;
export type PlaceTool = (typeof AT_A_PLACE)[number];
export type LengthTool = (typeof OVER_A_LENGTH)[number];

/** A place that no expression leads to yet: so far right of a support or end. */
export interface NewPlace {
  readonly bay: Bay;
  /** m from the left end of the bay, as a person would type it. */
  readonly offset: number;
}

export type Target = Place | NewPlace;
export const isNew = (target: Target): target is NewPlace => 'offset' in target;

export const SPRING: NewParameter = {
  name: 'Support stiffness',
  help: 'Force for one unit of movement of the support, calculated or tested.',
  dimension: 'spring',
  default: '2000 kN/m',
  min: '1 kN/m',
  max: '10000000 kN/m',
  step: '50 kN/m',
};

const figure = (metres: number) => formatNumber(metres).replaceAll(THIN_SPACE, '');

/** The rule that keeps a place of its own on its part of the beam. */
export const ruleOf = (symbol: string): string => `${symbol.toLowerCase()}-within`;

/** The expression of a target; a new place brings its length, the rule that keeps it in, and its dimension. */
export function placed(steps: DraftSteps, target: Target): { readonly text: string; readonly x: number } {
  if (!isNew(target)) return target;
  const { bay, offset } = target;
  const symbol = parameter(steps, 'x', {
    ...PLACE,
    help: 'From the support or end on its left.',
    default: `${figure(offset)} m`,
  });
  const text = plus(bay.from.text, symbol);
  steps.append('/rules', {
    id: freshId(steps.document, '/rules', ruleOf(symbol)),
    title: `The place ${symbol} lies on its part of the beam`,
    expression: `${text} <= ${bay.to.text}`,
    severity: 'block',
    message: `The place {${symbol}} is too far to the right. Move it, or lengthen the beam.`,
    trial: { parameters: { [symbol]: `${figure(Math.min(30, bay.to.x - bay.from.x + 1))} m` } },
  });
  steps.append('/beam/dimensions', { from: bay.from.text, to: text, symbol });
  return { text, x: bay.from.x + offset };
}

const isSupport = (tool: PlaceTool): tool is Extract<PlaceTool, SupportKind | 'spring'> =>
  tool === 'spring' || SUPPORT_KINDS.some((kind) => kind === tool);

/** A change, and the part that it is about. */
function addition(document: Written, add: (steps: DraftSteps) => Pointer): Added {
  let select: Pointer = '';
  const edits = changing(document, (steps) => {
    select = add(steps);
  });
  return { edits, select };
}

/** A support, hinge, point load or couple at a place. */
export const addAt = (document: Written, sketch: Sketch, tool: PlaceTool, target: Target): Added =>
  addition(document, (steps) => {
    const { text, x } = placed(steps, target);
    if (isSupport(tool)) return addSupport(steps, sketch, tool, { text, x });
    if (tool === 'hinge') return steps.append('/beam/hinges', { at: text });
    return tool === 'point'
      ? steps.append('/beam/loads', { kind: 'point', at: text, p: parameter(steps, 'P', POINT) })
      : steps.append('/beam/loads', { kind: 'couple', at: text, m: parameter(steps, 'M', COUPLE) });
  });

/** Between those on its left and right; one that stands there already is held in another way. */
function addSupport(
  steps: DraftSteps,
  sketch: Sketch,
  tool: SupportKind | 'spring',
  { text, x }: { readonly text: string; readonly x: number },
): Pointer {
  const { length, supports } = sketch.instance.beam;
  const count = listAt(steps.document, '/beam/supports').length;
  // Supports that only stand under a condition are counted in the document, not on the beam.
  const isPlain = supports.length === count;
  const there = isPlain ? supports.findIndex(({ at }) => Math.abs(at - x) < 1e-9 * length) : -1;
  const support = {
    kind: tool === 'spring' ? 'free' : tool,
    ...(tool === 'spring' && { kv: parameter(steps, 'k', SPRING) }),
  };
  if (tool === 'spring') affectAll(steps);
  if (there >= 0) {
    const at = `/beam/supports/${there}`;
    steps.set(at, { at: textAt(steps.document, `${at}/at`), ...support });
    return at;
  }
  const index = isPlain ? supports.filter(({ at }) => at < x).length : count;
  const letters = new Map(
    Array.from({ length: count }, (_, k) => [supportLetter(k), supportLetter(k < index ? k : k + 1)]),
  );
  for (const edit of relettered(steps.document, letters)) steps.do(edit);
  steps.do({ do: 'insert', at: `/beam/supports/${index}`, value: { at: text, ...support } });
  return `/beam/supports/${index}`;
}

/** A load or a section over a length between two places. */
export const addOver = (document: Written, sketch: Sketch, tool: LengthTool, bay: Bay): Added =>
  addition(document, (steps) => {
    const over = { from: bay.from.text, to: bay.to.text };
    if (tool === 'segment') return addSegment(steps, sketch, bay);
    if (tool === 'curvature') {
      affectAll(steps);
      const kappa = parameter(steps, 'k', CURVATURE);
      return steps.append('/beam/loads', { kind: 'curvature', ...over, kappa });
    }
    const w = parameter(steps, 'w', tool === 'uniform' ? UNIFORM : TRIANGULAR);
    return steps.append('/beam/loads', { kind: 'line', ...over, w0: tool === 'uniform' ? w : '0', w1: w });
  });

/** Sections cover the whole beam without a gap: a new one parts the section that it lies in. */
function addSegment(steps: DraftSteps, sketch: Sketch, { from, to }: Bay): Pointer {
  affectAll(steps);
  const { segments = [] } = sketch.instance.beam;
  const within = segments.findIndex((one) => one.from <= from.x && to.x <= one.to);
  const around =
    within < 0
      ? { from: '0', to: textAt(steps.document, '/beam/length'), ei: '1' }
      : Object(listAt(steps.document, '/beam/segments')[within]);
  const own = { from: from.text, to: to.text, ei: '2' };
  const parts = [
    ...(around.from === own.from ? [] : [{ ...around, to: own.from }]),
    own,
    ...(around.to === own.to ? [] : [{ ...around, from: own.to }]),
  ];
  const at = Math.max(0, within);
  if (within >= 0) steps.do({ do: 'remove', at: `/beam/segments/${within}` });
  for (const [k, part] of parts.entries())
    steps.do({ do: 'insert', at: `/beam/segments/${at + k}`, value: part });
  return `/beam/segments/${at + parts.indexOf(own)}`;
}

/** The whole of the beam as a length to put something over. */
export function wholeOf(sketch: Sketch): Bay | undefined {
  const bays = drawnBays(sketch);
  const [first, last] = [bays[0], bays.at(-1)];
  return first && last && { from: first.from, to: last.to };
}

/** Where the pointer is, as a place of its own: to the step that a person would type. */
export function newPlaceAt(sketch: Sketch, x: number, step: number): NewPlace | null {
  const bay = bayAt(drawnBays(sketch), x);
  if (!bay) return null;
  const offset = Math.round((x - bay.from.x) / step) * step;
  return { bay, offset: Number(offset.toFixed(6)) };
}
