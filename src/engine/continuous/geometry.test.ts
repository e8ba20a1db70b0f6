import { describe, expect, test } from 'vitest';
import { type BeamDocument, readBeam } from '../model/index';
import { Geometry } from './geometry';

function take(
  document: Partial<BeamDocument> & Pick<BeamDocument, 'supports'>,
  geometry = new Geometry(),
): Geometry {
  const reading = readBeam({ length: 10, ei: 2, horizontal: 'ignore', ...document });
  if (!reading.ok) throw new Error(reading.faults.map(({ message }) => message).join(' '));
  expect(geometry.take(reading.value)).toBe(true);
  return geometry;
}

const roller = (at: number) => ({ at, kind: 'roller' }) as const;
const positions = ({ piece, points }: Geometry) => piece.slice(0, points).map(({ from }) => from);
const pieces = ({ piece, points }: Geometry) => piece.slice(0, points - 1);

describe('Geometry', () => {
  test('has a point at every end, support, step and load, once, from left to right', () => {
    const geometry = take({
      ei: undefined,
      segments: [
        { from: 0, to: 4, ei: 2 },
        { from: 4, to: 10, ei: 5, ga: 8 },
      ],
      supports: [roller(9), roller(1), { at: 6, kind: 'free' }],
      loads: [
        { kind: 'point', at: 7, p: 1 },
        { kind: 'line', from: 0, to: 10, w0: 1, w1: 1 },
        { kind: 'couple', at: 3, m: 1 },
        { kind: 'curvature', from: 3, to: 9, kappa: 1 },
      ],
    });
    expect(positions(geometry)).toEqual([0, 1, 3, 4, 6, 7, 9, 10]);
    expect(pieces(geometry).map(({ length }) => length)).toEqual([1, 2, 1, 2, 1, 2, 1]);
    expect(pieces(geometry).map(({ bending }) => bending)).toEqual([0.5, 0.5, 0.5, 0.2, 0.2, 0.2, 0.2]);
    expect(pieces(geometry).map(({ shearing }) => shearing)).toEqual([0, 0, 0, 0.125, 0.125, 0.125, 0.125]);
    expect(geometry.shears).toBe(true);
    expect(geometry.shortest()).toBe(1);
  });

  test('orders the supports and keeps their numbers, points and restraints', () => {
    const { support, supports, sprung, holds } = take({
      supports: [
        { at: 10, kind: 'roller', kr: 4, rotation: 0.1, rise: -0.2 },
        { at: 5, kind: 'free', kv: 8, rise: 0.3 },
        { at: 0, kind: 'fixed', rotation: 0.4, rise: 0.5 },
      ],
    });
    expect(supports).toBe(3);
    expect(support.slice(0, 3)).toMatchObject([
      { number: 2, point: 0, at: 0, give: 0, rise: 0.5, held: true, turnGive: 0, turn: 0.4 },
      { number: 1, point: 1, at: 5, give: 0.125, rise: 0.3, held: false, turnGive: 0, turn: 0 },
      { number: 0, point: 2, at: 10, give: 0, rise: -0.2, held: true, turnGive: 0.25, turn: 0.1 },
    ]);
    expect([sprung, holds]).toEqual([true, true]);
  });

  test('forgets the beam before: its springs, its held ends, its shear, its points', () => {
    const geometry = take({
      ga: 3,
      supports: [
        { at: 0, kind: 'fixed' },
        { at: 5, kind: 'free', kv: 8 },
      ],
      loads: [{ kind: 'point', at: 2, p: 1 }],
    });
    take({ supports: [roller(0), roller(10)] }, geometry);
    expect(positions(geometry)).toEqual([0, 10]);
    expect(pieces(geometry)).toMatchObject([{ length: 10, bending: 0.5, shearing: 0 }]);
    expect([geometry.sprung, geometry.holds, geometry.shears]).toEqual([false, false, false]);
    expect(geometry.support[0]).toMatchObject({ held: false, give: 0, turn: 0, turnGive: 0 });
  });

  test('orders many loads as it orders few', () => {
    const loads = Array.from(
      { length: 60 },
      (_, i) => ({ kind: 'point', at: ((i * 37) % 60) / 6, p: 1 }) as const,
    );
    const geometry = take({ supports: [roller(0), roller(10)], loads });
    expect(positions(geometry)).toEqual([...Array.from({ length: 60 }, (_, i) => i / 6), 10]);
  });

  test('knows its points, and says where there is none', () => {
    const geometry = take({
      supports: [roller(0), roller(4), roller(10)],
      loads: [{ kind: 'point', at: 7, p: 1 }],
    });
    expect([0, 4, 7, 10].map((x) => geometry.pointAt(x))).toEqual([0, 1, 2, 3]);
    for (const x of [-1, 3, 5, 9, 11])
      expect(() => geometry.pointAt(x)).toThrow(`no load of the beam acts or ends at ${x} m`);
  });

  test('refuses hinges, and rotation held where nothing holds the beam up', () => {
    const read = (document: Partial<BeamDocument>) => {
      const supports: BeamDocument['supports'] = [{ at: 0, kind: 'fixed' }, roller(10)];
      const reading = readBeam({ length: 10, ei: 2, horizontal: 'ignore', supports, ...document });
      return reading.ok && new Geometry().take(reading.value);
    };
    expect(read({})).toBe(true);
    expect(read({ hinges: [5] })).toBe(false);
    expect(
      read({
        supports: [
          { at: 0, kind: 'fixed' },
          { at: 10, kind: 'guided' },
        ],
      }),
    ).toBe(false);
    expect(
      read({
        supports: [
          { at: 0, kind: 'fixed' },
          { at: 10, kind: 'free', kr: 5 },
        ],
      }),
    ).toBe(false);
    expect(
      read({
        supports: [
          { at: 0, kind: 'fixed' },
          { at: 10, kind: 'free' },
        ],
      }),
    ).toBe(true);
    expect(
      read({
        supports: [
          { at: 0, kind: 'fixed' },
          { at: 10, kind: 'guided', kv: 5 },
        ],
      }),
    ).toBe(true);
  });
});
