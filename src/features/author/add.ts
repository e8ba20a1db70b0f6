/** What one press adds to a draft: the parts with their parameters, names, ranges and dimension lines. */
import type { Written } from '@/features/review/draft';
import { type Bay, baysOf, holdingSupports, lengthOf, tipOf } from './bays';
import { isWholeLength, redescribe } from './describe';
import { DraftSteps, plus, sameText } from './draft-steps';
import { type Edit, listAt, type Pointer, textAt, valueAt } from './edit';
import {
  COUPLE,
  CURVATURE,
  type NewParameter,
  OVERHANG,
  PLACE,
  POINT,
  pointLoadRows,
  quantity,
  SETTLEMENT,
  SPAN,
  STIFFNESS,
  TRIANGULAR,
  UNIFORM,
} from './entries';
import { beamPlaces } from './places';
import { releasable } from './redundants';

/** What was added: the edits, and the part to go on with. */
export interface Added {
  readonly edits: readonly Edit[];
  readonly select: Pointer;
}

/** Adds with `add`, then brings up the redundants and what the draft says of itself. */
export function adding(before: Written, add: (steps: DraftSteps) => Pointer): Added {
  const steps = new DraftSteps(before);
  const select = add(steps);
  completeLists(steps);
  rechoose(steps, before);
  redescribe(steps, before);
  return { edits: steps.edits, select };
}

const LISTS = ['/tags', '/derived', '/rules', '/results', '/beam/loads', '/beam/redundants'];

/** What a document may have nothing of must still be there: a draft that began empty has none of it. */
function completeLists(steps: DraftSteps): void {
  for (const list of LISTS) if (valueAt(steps.document, list) === undefined) steps.set(list, []);
  if (valueAt(steps.document, '/stiffness') === undefined) steps.set('/stiffness', STIFFNESS);
}

/** Another beam has other redundants: its usual ones, unless those that are written will do. */
function rechoose(steps: DraftSteps, before: Written): void {
  const now = releasable(steps.document);
  if (!now) return;
  const was = releasable(before);
  const written = listAt(before, '/beam/redundants');
  const isOwn =
    was?.degree === now.degree &&
    written.length === now.degree &&
    JSON.stringify(written) !== JSON.stringify(was.usual);
  const usual = JSON.stringify(now.usual);
  if (!isOwn && usual !== JSON.stringify(listAt(steps.document, '/beam/redundants')))
    steps.set('/beam/redundants', now.usual);
}

export function parameter(steps: DraftSteps, symbol: string, what: NewParameter): string {
  const name = steps.fresh(symbol);
  steps.append('/parameters', quantity(name, what));
  return name;
}

const dimension = (steps: DraftSteps, from: string, to: string, symbol: string): Pointer =>
  steps.append('/beam/dimensions', { from, to, symbol });

/** Loads over the whole beam go on to its new end. */
function lengthen(steps: DraftSteps, length: string): void {
  const { document } = steps;
  for (const [index, load] of listAt(document, '/beam/loads').entries())
    if (isWholeLength(document, textAt(load, '/from'), textAt(load, '/to')))
      steps.set(`/beam/loads/${index}/to`, length);
  steps.set('/beam/length', length);
}

/** A span more at the right; an overhang there stays behind it. The free end of a cantilever is propped instead. */
export function addSpan(document: Written): Added {
  return adding(document, (steps) => {
    const supports = holdingSupports(document);
    const last = supports.at(-1);
    const length = lengthOf(document);
    if (last && supports.length === 1 && last.kind === 'fixed' && !sameText(length, '0'))
      return steps.append('/beam/supports', { at: length, kind: 'roller' });
    const span = parameter(steps, 'L', {
      ...SPAN,
      name: supports.length > 1 ? `Span ${supports.length}` : SPAN.name,
    });
    const from = last?.at ?? '0';
    const to = plus(from, span);
    if (!last) steps.append('/beam/supports', { at: '0', kind: 'pin' });
    const support = steps.append('/beam/supports', { at: to, kind: 'roller' });
    const isHeld = sameText(from, length);
    const behind = length.replaceAll(' ', '').startsWith(`${from.replaceAll(' ', '')}+`);
    const end =
      isHeld || !behind
        ? plus(length, span)
        : plus(to, length.slice(length.indexOf('+', from.length) + 1).trim());
    if (!isHeld && behind) {
      const tail = listAt(steps.document, '/beam/dimensions').findIndex(
        (one) => sameText(textAt(one, '/from'), from) && sameText(textAt(one, '/to'), length),
      );
      if (tail >= 0) steps.set(`/beam/dimensions/${tail}/from`, to);
      steps.replace(beamPlaces(steps.document), length, end);
      steps.set('/beam/length', end);
    } else lengthen(steps, end);
    dimension(steps, from, to, span);
    return support;
  });
}

/** A free length beyond the last or the first support. */
export function addOverhang(document: Written, side: 'left' | 'right'): Added {
  return adding(document, (steps) => {
    const length = lengthOf(document);
    const has = baysOf(document).some(({ is }) => is === 'left' || is === 'right');
    const name = has ? `Overhang at the ${side}` : OVERHANG.name;
    const overhang = parameter(steps, 'a', { ...OVERHANG, name });
    if (side === 'right') {
      const end = plus(length, overhang);
      lengthen(steps, end);
      return dimension(steps, length, end, overhang);
    }
    const whole = listAt(document, '/beam/loads').map((load) =>
      isWholeLength(document, textAt(load, '/from'), textAt(load, '/to')),
    );
    for (const at of beamPlaces(document)) {
      const load = /^\/beam\/loads\/(\d+)\/from$/.exec(at)?.[1];
      if (load === undefined || !whole[Number(load)]) steps.set(at, plus(overhang, textAt(document, at)));
    }
    steps.set('/beam/length', plus(overhang, length));
    steps.do({
      do: 'insert',
      at: '/beam/dimensions/0',
      value: { from: '0', to: overhang, symbol: overhang },
    });
    return '/beam/dimensions/0';
  });
}

/** Why there is no room for an overhang there; null where there is. */
export function noOverhang(document: Written, side: 'left' | 'right'): string | null {
  if (holdingSupports(document).length === 0) return 'Add a support first.';
  return baysOf(document).some(({ is }) => is === side) ? `The ${side} end is free already.` : null;
}

const LINES = { uniform: UNIFORM, triangular: TRIANGULAR } as const;

/** A load over the whole beam, or over one length. */
export function addLine(document: Written, is: keyof typeof LINES, bay: Bay | null): Added {
  return adding(document, (steps) => {
    const isFirst = !listAt(document, '/beam/loads').some((load) => textAt(load, '/kind') === 'line');
    const name = bay ? `${LINES[is].name}, ${inWords(bay)}` : LINES[is].name;
    const w = parameter(steps, 'w', { ...LINES[is], name, group: isFirst ? 'G' : 'Q' });
    const from = bay?.from ?? '0';
    const to = bay?.to ?? lengthOf(document);
    return steps.append('/beam/loads', { kind: 'line', from, to, w0: is === 'uniform' ? w : '0', w1: w });
  });
}

/** A point load at the tip of an overhang, else at a place of its own within the last span. */
export function addPoint(document: Written, chosen: Bay | null): Added {
  return adding(document, (steps) => {
    const tip = chosen ? tipIn(chosen) : tipOf(document);
    const bay = chosen ?? baysOf(document).at(-1);
    const name = tip === null ? POINT.name : 'Point load at the tip';
    const at = tip ?? (bay ? placeIn(steps, bay) : '0');
    const load = parameter(steps, 'P', { ...POINT, name });
    return steps.append('/beam/loads', { kind: 'point', at, p: load });
  });
}

const tipIn = ({ is, from, to }: Bay): string | null => {
  if (is === 'span') return null;
  return is === 'right' ? to : from;
};

const inWords = ({ name }: Bay): string => name.charAt(0).toLowerCase() + name.slice(1);

/** A parameter that places something within a length, with the rule that keeps it there. */
function placeIn(steps: DraftSteps, bay: Bay): string {
  const x = parameter(steps, 'x', {
    ...PLACE,
    name: `Place in ${inWords(bay)}`,
  });
  if (bay.symbol !== null) {
    steps.append('/rules', {
      id: freshId(steps.document, '/rules', `place-${x.toLowerCase()}`),
      title: `The place ${x} lies within ${inWords(bay)}`,
      expression: `${x} <= ${bay.symbol}`,
      severity: 'block',
      message: `The place {${x}} lies beyond {${bay.symbol}}. Give at most {${bay.symbol}}.`,
      trial: { parameters: { [bay.symbol]: '6 m', [x]: '7 m' } },
    });
  }
  return plus(bay.from, x);
}

/** A list of point loads from the left end, each row with its own group. */
export function addPointRows(document: Written): Added {
  return adding(document, (steps) => {
    const [list, x, load, group] = ['loads', 'x', 'P', 'g'].map((symbol) => steps.fresh(symbol));
    if (!list || !x || !load || !group) return '/parameters';
    steps.append('/parameters', pointLoadRows(list, x, load, group));
    return steps.append('/beam/loads', { kind: 'point', at: x, p: load, repeat: list });
  });
}

export function addCouple(document: Written, bay: Bay | null): Added {
  return adding(document, (steps) => {
    const couple = parameter(steps, 'M', COUPLE);
    return steps.append('/beam/loads', { kind: 'couple', at: bay?.to ?? lengthOf(document), m: couple });
  });
}

/** A temperature difference between top and bottom, over the whole beam or one length. */
export function addCurvature(document: Written, bay: Bay | null): Added {
  return adding(document, (steps) => {
    const kappa = parameter(steps, 'k', CURVATURE);
    const [from, to] = [bay?.from ?? '0', bay?.to ?? lengthOf(document)];
    affectAll(steps);
    return steps.append('/beam/loads', { kind: 'curvature', from, to, kappa });
  });
}

/** The last support that does not settle yet, settles. */
export function addSettlement(document: Written): Added {
  return adding(document, (steps) => {
    const support = holdingSupports(document).findLast(
      ({ index }) => textAt(document, `/beam/supports/${index}/rise`) === '',
    );
    if (!support) return '/beam/supports';
    const drop = parameter(steps, 's', { ...SETTLEMENT, name: `Settlement of ${support.letter}` });
    steps.set(`/beam/supports/${support.index}/rise`, `-${drop}`);
    affectAll(steps);
    return `/beam/supports/${support.index}`;
  });
}

/** With what does not follow from loads alone, the stiffness changes every result. */
export function affectAll(steps: DraftSteps): void {
  steps.set('/stiffness/affects', ['reactions', 'shear', 'moment', 'slope', 'deflection']);
}

export function addHinge(document: Written, chosen: Bay | null): Added {
  return adding(document, (steps) => {
    const bay = chosen ?? baysOf(document).findLast(({ is }) => is === 'span');
    return steps.append('/beam/hinges', { at: bay ? placeIn(steps, bay) : '0' });
  });
}

/** Another stiffness over one length; the rest of the beam keeps the member's. */
export function addSegment(document: Written, chosen: Bay | null): Added {
  return adding(document, (steps) => {
    const length = lengthOf(document);
    const bay = chosen ?? baysOf(document).at(-1);
    const known = listAt(document, '/beam/segments');
    affectAll(steps);
    if (known.length > 0 || !bay)
      return steps.append('/beam/segments', { from: bay?.from ?? '0', to: bay?.to ?? length, ei: '1' });
    const parts = [
      { from: '0', to: bay.from, ei: '1' },
      { from: bay.from, to: bay.to, ei: '2' },
      { from: bay.to, to: length, ei: '1' },
    ].filter(({ from, to }) => !sameText(from, to));
    steps.set('/beam/segments', parts);
    return `/beam/segments/${parts.findIndex(({ ei }) => ei === '2')}`;
  });
}

/** A support at the free end, else at the right end. */
export function addSupport(document: Written): Added {
  return adding(document, (steps) =>
    steps.append('/beam/supports', { at: tipOf(document) ?? lengthOf(document), kind: 'roller' }),
  );
}

/** An id that no entry of the list has. */
export function freshId(document: Written, list: Pointer, wanted: string): string {
  const taken = listAt(document, list).map((entry) => textAt(entry, '/id'));
  for (let number = 1; ; number++) {
    const id = number === 1 ? wanted : `${wanted}-${number}`;
    if (!taken.includes(id)) return id;
  }
}
