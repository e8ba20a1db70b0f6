import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import {
  cornerRadii,
  depthOf,
  dimensionFaults,
  ImpossibleSection,
  outlineCorners,
  outlinePath,
  roundCorners,
  type SectionDimensions,
  sectionProperties,
  tube,
  widthOf,
} from './index';

type Point = { z: number; y: number };

const STEPS = 400; // chords per corner: a circle's area is then right within 2e-6

/** A ring as a polygon, its rounded corners as chords. Knows nothing of fillets: it samples circles. */
function polygon(ring: ReturnType<typeof outlineCorners>[number]): Point[] {
  return roundCorners(ring).flatMap(({ start, end, r, left }, index) => {
    if (r === 0) return [start];
    const corner = ring[index];
    if (!corner) return [];
    const centre = { z: start.z + end.z - corner.z, y: start.y + end.y - corner.y };
    const first = Math.atan2(start.y - centre.y, start.z - centre.z);
    const turn = ((left ? 1 : -1) * Math.PI) / 2;
    return Array.from({ length: STEPS + 1 }, (_, step) => {
      const angle = first + (turn * step) / STEPS;
      return { z: centre.z + r * Math.cos(angle), y: centre.y + r * Math.sin(angle) };
    });
  });
}

/** Area, first and second moments about the origin, by Green's theorem; a clockwise hole counts negative. */
function green(rings: readonly Point[][]) {
  const sums = { area: 0, my: 0, mz: 0, iyy: 0, izz: 0 };
  for (const ring of rings) {
    for (const [index, a] of ring.entries()) {
      const b = ring[(index + 1) % ring.length] ?? a;
      const cross = a.z * b.y - b.z * a.y;
      sums.area += cross / 2;
      sums.my += (cross * (a.y + b.y)) / 6;
      sums.mz += (cross * (a.z + b.z)) / 6;
      sums.iyy += (cross * (a.y ** 2 + a.y * b.y + b.y ** 2)) / 12;
      sums.izz += (cross * (a.z ** 2 + a.z * b.z + b.z ** 2)) / 12;
    }
  }
  return sums;
}

/** What lies on the side of the line where `along` exceeds `at` (Sutherland and Hodgman). */
function clip(ring: readonly Point[], along: 'y' | 'z', at: number): Point[] {
  return ring.flatMap((a, index) => {
    const b = ring[(index + 1) % ring.length] ?? a;
    const kept = a[along] >= at ? [a] : [];
    if (a[along] >= at === b[along] >= at) return kept;
    const share = (at - a[along]) / (b[along] - a[along]);
    return [...kept, { z: a.z + share * (b.z - a.z), y: a.y + share * (b.y - a.y) }];
  });
}

function plastic(rings: readonly Point[][], along: 'y' | 'z'): number {
  const moment = (sums: ReturnType<typeof green>) => (along === 'y' ? sums.my : sums.mz);
  const beyond = (at: number) => green(rings.map((ring) => clip(ring, along, at)));
  const whole = green(rings);
  let low = 0;
  let high = Math.max(...rings.flatMap((ring) => ring.map((point) => point[along])));
  for (let step = 0; step < 50; step++) {
    const middle = (low + high) / 2;
    if (beyond(middle).area > whole.area / 2) low = middle;
    else high = middle;
  }
  return 2 * moment(beyond(low)) - moment(whole);
}

const SECTIONS: readonly (readonly [string, SectionDimensions])[] = [
  ['an I', { shape: 'i', h: 0.3, b: 0.15, tw: 0.0071, tf: 0.0107, r: 0.015 }],
  ['an I without root radius', { shape: 'i', h: 0.2, b: 0.2, tw: 0.009, tf: 0.015, r: 0 }],
  [
    'a channel, equal areas in the fillets',
    { shape: 'channel', h: 0.2, b: 0.08, tw: 0.006, tf: 0.011, r: 0.013 },
  ],
  ['a channel, equal areas in the web', { shape: 'channel', h: 0.4, b: 0.06, tw: 0.0135, tf: 0.01, r: 0.01 }],
  [
    'a channel, equal areas in the flanges',
    { shape: 'channel', h: 0.1, b: 0.1, tw: 0.005, tf: 0.012, r: 0.006 },
  ],
  ['a rectangular tube', tube(0.2, 0.1, 0.008, 'EN 10210')],
  ['a square tube, cold formed', tube(0.15, 0.15, 0.0125, 'EN 10219')],
  ['a round tube', { shape: 'chs', d: 0.1397, t: 0.005 }],
  ['a rectangle', { shape: 'rectangle', h: 0.22, b: 0.047 }],
  ['a round bar', { shape: 'round', d: 0.05 }],
];

const CHORDS = 1e-5; // what the chords leave out of a circle's second moment

describe.each(SECTIONS)('%s', (_, d) => {
  const rings = outlineCorners(d).map(polygon);
  const sums = green(rings);
  const properties = sectionProperties(d);
  const centre = { y: sums.my / sums.area, z: sums.mz / sums.area };
  const close = (value: number, expected: number) =>
    expect(Math.abs(value / expected - 1), `${value} against ${expected}`).toBeLessThan(CHORDS);

  test('area and centroid are those of its outline', () => {
    close(properties.area, sums.area);
    close(depthOf(d) / 2, centre.y);
    close(properties.centroid, centre.z);
  });

  test('second moments and elastic moduli are those of its outline', () => {
    const iMajor = sums.iyy - sums.area * centre.y ** 2;
    const iMinor = sums.izz - sums.area * centre.z ** 2;
    close(properties.iMajor, iMajor);
    close(properties.iMinor, iMinor);
    close(properties.wElMajor, iMajor / centre.y);
    close(properties.wElMinor, iMinor / Math.max(centre.z, widthOf(d) - centre.z));
  });

  test('plastic moduli are those of its outline', () => {
    close(properties.wPlMajor, plastic(rings, 'y'));
    close(properties.wPlMinor, plastic(rings, 'z'));
    close(properties.firstMoment, plastic(rings, 'y') / 2);
  });

  test('the drawing has its size and closes every ring', () => {
    const { path, width, height } = outlinePath(d);
    expect([width, height]).toEqual([widthOf(d) * 1000, depthOf(d) * 1000]);
    expect(path.match(/Z/g)).toHaveLength(outlineCorners(d).length);
    expect(path).not.toMatch(/NaN|Infinity/);
  });
});

describe('laws of any I section', () => {
  const dimensions = fc
    .record({
      h: fc.double({ min: 0.08, max: 1.1, noNaN: true }),
      slender: fc.double({ min: 0.3, max: 1.1, noNaN: true }),
      web: fc.double({ min: 0.015, max: 0.06, noNaN: true }),
      flange: fc.double({ min: 0.02, max: 0.1, noNaN: true }),
      root: fc.double({ min: 0, max: 0.05, noNaN: true }),
    })
    .map(
      ({ h, slender, web, flange, root }): SectionDimensions => ({
        shape: 'i',
        h,
        b: h * slender,
        tw: h * web,
        tf: h * flange,
        r: h * root,
      }),
    );

  test('W_pl > W_el, the shear area is below the web, and twice the size is 2ⁿ times the property', () => {
    fc.assert(
      fc.property(dimensions, (d) => {
        if (dimensionFaults(d).length > 0 || d.shape !== 'i') return;
        const one = sectionProperties(d);
        const two = sectionProperties({
          ...d,
          h: 2 * d.h,
          b: 2 * d.b,
          tw: 2 * d.tw,
          tf: 2 * d.tf,
          r: 2 * d.r,
        });
        expect(one.wPlMajor).toBeGreaterThan(one.wElMajor);
        expect(one.shearArea).toBeLessThan(one.webArea * 1.05);
        for (const [a, b, n] of [
          [one.area, two.area, 2],
          [one.iMajor, two.iMajor, 4],
          [one.wPlMinor, two.wPlMinor, 3],
          [one.j, two.j, 4],
          [one.iw, two.iw, 6],
        ] as const) {
          expect(Math.abs(b / (a * 2 ** n) - 1)).toBeLessThan(1e-12);
        }
      }),
    );
  });
});

describe('closed forms', () => {
  test('a rectangle has 5/6 of its area in shear and a shape factor of 1.5', () => {
    const { area, shearArea, wElMajor, wPlMajor, webArea } = sectionProperties({
      shape: 'rectangle',
      h: 0.3,
      b: 0.1,
    });
    expect(shearArea).toBeCloseTo((5 / 6) * area, 15);
    expect(wPlMajor / wElMajor).toBeCloseTo(1.5, 12);
    expect(webArea).toBeCloseTo((2 / 3) * area, 15);
  });

  // Printed torsion constants k of a rectangle, J = k·long·short³: Timoshenko and Goodier, Theory of Elasticity,
  // 3rd ed., article 109, from memory.
  test.each([
    [1, '0.1406'],
    [1.5, '0.196'],
    [2, '0.229'],
    [3, '0.263'],
    [5, '0.291'],
    [10, '0.312'],
  ])('a rectangle %d times as deep as wide has the printed k = %s within 0.5 %%', (ratio, printed) => {
    const { j } = sectionProperties({ shape: 'rectangle', h: ratio * 0.1, b: 0.1 });
    expect(Math.abs(j / (ratio * 0.1 ** 4) / Number(printed) - 1)).toBeLessThan(0.005);
  });

  // AISC Manual, 15th ed., Table 1-11 and 1-12, from memory: A, I_x, S_x, Z_x, J in inches.
  test.each([
    ['HSS6x4x1/4', 6, 4, 0.25, '4.30', '20.9', '6.96', '8.53', '23.6'],
    ['HSS8x8x1/2', 8, 8, 0.5, '13.5', '125', '31.2', '37.5', '204'],
  ])('%s to ASTM A500, with its design wall, has the printed properties', (_name, h, b, t, ...printed) => {
    const inch = 0.0254;
    const p = sectionProperties(tube(h * inch, b * inch, t * inch, 'ASTM A500'));
    const found = [
      p.area / inch ** 2,
      p.iMajor / inch ** 4,
      p.wElMajor / inch ** 3,
      p.wPlMajor / inch ** 3,
      p.j / inch ** 4,
    ];
    for (const [index, text] of printed.entries()) {
      expect(Math.abs((found[index] ?? Number.NaN) / Number(text) - 1), text).toBeLessThan(0.006);
    }
  });

  test('the shear centre of a channel lies behind its web', () => {
    const { shearCentre } = sectionProperties({
      shape: 'channel',
      h: 0.2,
      b: 0.08,
      tw: 0.006,
      tf: 0.011,
      r: 0.013,
    });
    expect(shearCentre).toBeLessThan(0);
  });
});

describe('dimensions that describe no section', () => {
  test.each<[string, SectionDimensions]>([
    ['a root of less than nothing', { shape: 'i', h: 0.3, b: 0.15, tw: 0.007, tf: 0.01, r: -0.001 }],
    ['a flange of nothing', { shape: 'i', h: 0.3, b: 0.15, tw: 0.007, tf: 0, r: 0.015 }],
    ['flanges that fill the depth', { shape: 'i', h: 0.03, b: 0.15, tw: 0.007, tf: 0.01, r: 0.015 }],
    ['a web wider than the flange', { shape: 'i', h: 0.3, b: 0.02, tw: 0.03, tf: 0.01, r: 0 }],
    ['a tube that is all wall', { shape: 'rhs', h: 0.1, b: 0.05, t: 0.025, ro: 0.03, ri: 0.02 }],
    ['a depth that is no number', { shape: 'rectangle', h: Number.NaN, b: 0.1 }],
    ['a round tube with too thick a wall', { shape: 'chs', d: 0.1, t: 0.06 }],
  ])('%s', (_name, d) => {
    expect(dimensionFaults(d).length).toBeGreaterThan(0);
    expect(() => sectionProperties(d)).toThrow(ImpossibleSection);
  });
});

/** EN 10219-2:2006 Annex B and EN 10210-2:2006 Annex B, from memory: outer radius over the wall. */
test.each([
  [6, 'EN 10219', 2],
  [6.3, 'EN 10219', 2.5],
  [10, 'EN 10219', 2.5],
  [12.5, 'EN 10219', 3],
  [12.5, 'EN 10210', 1.5],
] as const)('a wall of %d mm to %s has an outer radius of %d walls', (t, standard, ratio) => {
  const { ro, ri } = cornerRadii(t / 1000, standard);
  expect(ro / (t / 1000)).toBeCloseTo(ratio, 12);
  expect(ro - ri).toBeCloseTo(standard === 'EN 10210' ? (0.5 * t) / 1000 : t / 1000, 12);
});
