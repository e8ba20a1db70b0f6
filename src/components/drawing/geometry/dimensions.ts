import type { Beam } from '@/engine/model/index';

/** A length that the template names; `editable` marks its figure as a second way into that input. */
export type NamedLength = { symbol: string; from: number; to: number; editable?: boolean | undefined };

export type DimensionPart = { from: number; to: number; name?: NamedLength | undefined };

const same = (a: number, b: number, length: number): boolean => Math.abs(a - b) < length * 1e-7;

function ascending(positions: readonly number[], length: number): number[] {
  const sorted = [...positions].sort((a, b) => a - b);
  return sorted.filter((x, i) => i === 0 || !same(x, sorted[i - 1] ?? 0, length));
}

const loadPositions = (beam: Beam): number[] =>
  beam.loads.flatMap((load) => ('at' in load ? [load.at] : [load.from, load.to]));

function partsBetween(positions: readonly number[]): DimensionPart[] {
  return positions.slice(1).map((to, i) => ({ from: positions[i] ?? 0, to }));
}

/** Puts each part in the innermost row where it meets no other: its ends, or what it covers with its letters. */
export function packed<T extends DimensionPart>(
  parts: readonly T[],
  covers: (part: T) => readonly [number, number] = ({ from, to }) => [from, to],
): T[][] {
  const rows: T[][] = [];
  for (const part of [...parts].sort((a, b) => a.to - a.from - (b.to - b.from))) {
    const [from, to] = covers(part);
    const row = rows.find((taken) => taken.map(covers).every(([left, right]) => to <= left || from >= right));
    if (row) row.push(part);
    else rows.push([part]);
  }
  return rows;
}

/**
 * Dimension rows from the member outward: every part, named lengths that are no part, the spans, the whole. Rows that would repeat
 * the one inside them are left out.
 */
export function dimensionRows(beam: Beam, names: readonly NamedLength[] = []): DimensionPart[][] {
  const { length } = beam;
  const held = beam.supports.filter(
    ({ vertical, rotation }) => vertical.kind !== 'free' || rotation.kind !== 'free',
  );
  const spans = ascending([0, ...held.map(({ at }) => at), length], length);
  const every = ascending([...spans, ...loadPositions(beam), ...beam.hinges], length);
  const unused = new Set(names);
  const claim = (part: DimensionPart): DimensionPart => {
    const name = [...unused].find(
      (each) => same(each.from, part.from, length) && same(each.to, part.to, length),
    );
    if (!name) return part;
    unused.delete(name);
    return { ...part, name };
  };

  const whole = claim({ from: 0, to: length });
  const inner = every.length > 2 ? partsBetween(every).map(claim) : [];
  const middle = spans.length > 2 && spans.length < every.length ? partsBetween(spans).map(claim) : [];
  const others = packed([...unused].map((name) => ({ from: name.from, to: name.to, name })));
  return [inner, ...others, middle, [whole]].filter((row) => row.length > 0);
}
