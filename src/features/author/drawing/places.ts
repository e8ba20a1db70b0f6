/** Places on the beam that a part may be put at, written as expressions of the draft's parameters. */
import { evaluateNumber, symbolsOf, type Tree } from '@/engine/template';
import { along, type Linear, linearOf, linearText, sum } from './linear';
import type { Sketch } from './sketch';

/** A place, its expression, and x in m at the values that are shown. */
export interface Place {
  readonly text: string;
  readonly x: number;
  /** A part of the beam ends or stands there; others divide what lies between those. */
  readonly isFixed: boolean;
}

/** A length between two supports, or between one and an end. */
export interface Bay {
  readonly from: Place;
  readonly to: Place;
}

/** Of a bay, where a part is likely to be put. */
const SHARES = [1 / 4, 1 / 3, 1 / 2, 2 / 3, 3 / 4];
/** Places within this share of the beam's length are one. */
const SAME = 1e-9;

interface Anchor extends Place {
  readonly linear: Linear | null;
}

/** Every place that there is an expression for, from the left; of two at one x the first that was written. */
export function placesOf(sketch: Sketch): Place[] {
  const { template, instance } = sketch;
  const { beam } = template;
  const anchors = bayEnds(sketch);
  const others = [
    ...(beam.hinges ?? []).map(({ at }) => at),
    ...(beam.segments ?? []).flatMap(({ from, to }) => [from, to]),
    ...beam.loads
      .filter(({ repeat }) => repeat === undefined)
      .flatMap((load) => ('at' in load ? [load.at] : [load.from, load.to])),
  ].map((expression) => anchorAt(sketch, expression));
  const inside = anchors.slice(1).flatMap((to, index) => between(anchors[index], to));
  const offset = anchors.flatMap((anchor) => beyond(sketch, anchor));
  const { length } = instance.beam;
  return apart([...anchors, ...others, ...offset, ...inside], length).filter(
    ({ x }) => x >= 0 && x <= length * (1 + SAME),
  );
}

/** The lengths between supports and ends, from the left. */
export function drawnBays(sketch: Sketch): Bay[] {
  const ends = bayEnds(sketch);
  return ends.slice(1).map((to, index) => ({ from: ends[index] ?? to, to }));
}

function bayEnds(sketch: Sketch): Anchor[] {
  const { beam } = sketch.template;
  const supports = beam.supports.filter(({ kind, kv, kr }) => kind !== 'free' || kv || kr);
  const { length } = sketch.instance.beam;
  return apart(
    [
      { text: '0', x: 0, isFixed: true, linear: new Map() },
      anchorAt(sketch, beam.length),
      ...supports.map(({ at }) => anchorAt(sketch, at)),
    ],
    length,
  ).filter(({ x }) => x >= 0 && x <= length * (1 + SAME));
}

function anchorAt({ instance }: Sketch, { text, tree }: { text: string; tree: Tree }): Anchor {
  return { text, x: evaluateNumber(tree, instance.scope), isFixed: true, linear: linearOf(tree) };
}

function between(from: Anchor | undefined, to: Anchor): Place[] {
  if (!from?.linear || !to.linear) return [];
  const [start, end] = [from.linear, to.linear];
  return SHARES.map((share) => ({
    text: linearText(along(start, end, share)),
    x: from.x + share * (to.x - from.x),
    isFixed: false,
  }));
}

/** From an anchor on by a length that places something within the beam and is no part of its own length. */
function beyond({ template, values }: Sketch, anchor: Anchor): Place[] {
  const { linear } = anchor;
  if (!linear) return [];
  const own = symbolsOf(template.beam.length.tree);
  return template.parameters.flatMap((parameter) => {
    const value = values[parameter.symbol];
    const isPlace = parameter.kind === 'quantity' && parameter.dimension === 'length';
    if (
      !isPlace ||
      own.has(parameter.symbol) ||
      typeof value !== 'number' ||
      !isUsed(template, parameter.symbol)
    )
      return [];
    const text = linearText(sum(linear, new Map([[parameter.symbol, 1]])));
    return [{ text, x: anchor.x + value, isFixed: false }];
  });
}

/** Whether a place of the beam speaks of this symbol: a settlement is a length and no place. */
const isUsed = ({ beam }: Sketch['template'], symbol: string): boolean =>
  [...beam.supports, ...(beam.hinges ?? []), ...(beam.segments ?? []), ...beam.loads]
    .flatMap((part) => ('at' in part ? [part.at] : [part.from, part.to]))
    .some(({ tree }) => symbolsOf(tree).has(symbol));

function apart<T extends Place>(places: readonly T[], length: number): T[] {
  const kept: T[] = [];
  for (const place of places)
    if (kept.every(({ x }) => Math.abs(x - place.x) > SAME * length)) kept.push(place);
  return kept.sort((a, b) => a.x - b.x);
}

/** The nearest place within `reach`, m; fixed ones win over those that only divide a bay. */
export function snapped(places: readonly Place[], x: number, reach: number): Place | null {
  const near = places
    .filter((place) => Math.abs(place.x - x) <= reach)
    .sort((a, b) => Math.abs(a.x - x) - Math.abs(b.x - x));
  return near.find(({ isFixed }) => isFixed) ?? near[0] ?? null;
}

/** The bay that x lies in; the last one beyond the end. */
export const bayAt = (bays: readonly Bay[], x: number): Bay | undefined =>
  bays.find(({ to }) => x <= to.x) ?? bays.at(-1);
