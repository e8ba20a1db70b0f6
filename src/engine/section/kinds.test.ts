import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { areaMoments } from './green';
import {
  type Corner,
  compound,
  contributionsOf,
  depthOf,
  dimensionFaults,
  ImpossibleSection,
  outlineCorners,
  type SectionDimensions,
  sectionProperties,
  sideBySide,
  solidOutline,
  tube,
} from './index';

const beam: SectionDimensions & { shape: 'i' } = {
  shape: 'i',
  h: 0.3,
  b: 0.15,
  tw: 0.0071,
  tf: 0.0107,
  r: 0.015,
};
const near = (found: number, expected: number, within = 1e-9) =>
  expect(Math.abs(found / expected - 1), `${found} against ${expected}`).toBeLessThan(within);

const polygon = (...points: (readonly [number, number])[]): Corner[] =>
  points.map(([z, y]) => ({ z, y, r: 0 }));

describe('Green’s theorem along the outline', () => {
  test.each<[string, SectionDimensions]>([
    ['an I', beam],
    ['a channel', { shape: 'channel', h: 0.2, b: 0.08, tw: 0.006, tf: 0.011, r: 0.013 }],
    ['a tee', { shape: 'tee', h: 0.15, b: 0.15, tw: 0.0071, tf: 0.0107, r: 0.015 }],
    ['an angle', { shape: 'angle', h: 0.15, b: 0.075, t: 0.01, r: 0.011, toe: 0.0055 }],
    ['a rectangular tube', tube(0.2, 0.1, 0.008, 'EN 10210')],
    ['a round tube', { shape: 'chs', d: 0.1397, t: 0.005 }],
    ['a round bar', { shape: 'round', d: 0.05 }],
  ])('gives the area and second moments of %s by parts within 1e-9', (_, d) => {
    const sums = areaMoments(outlineCorners(d));
    const found = sectionProperties(d);
    near(found.area, sums.area, 1e-9);
    near(found.centroidUp, sums.y / sums.area, 1e-9);
    near(found.centroid, sums.z / sums.area, 1e-9);
    near(found.iMajor, sums.yy - sums.y ** 2 / sums.area, 1e-9);
    near(found.iMinor, sums.zz - sums.z ** 2 / sums.area, 1e-9);
  });

  test.each<[string, SectionDimensions & { h: number }]>([
    ['an I', beam],
    ['a rectangle', { shape: 'rectangle', h: 0.22, b: 0.047 }],
  ])('gives every property of %s drawn as an outline within 1e-6 of its closed forms', (_, d) => {
    const closed = sectionProperties(d);
    const drawn = sectionProperties({ shape: 'outline', rings: outlineCorners(d), t: 0.01, j: 0, iw: 0 });
    for (const name of [
      'area',
      'iMajor',
      'iMinor',
      'wElMajor',
      'wElMinor',
      'wPlMajor',
      'wPlMinor',
      'firstMoment',
    ] as const)
      near(drawn[name], closed[name], 1e-6);
    near(drawn.shearArea, closed.shearArea, 0.03); // the closed form leaves the fillets out
  });

  test('a triangle has bh³/36, and its plastic modulus is 0.0976 b h²', () => {
    // Roark's Formulas for Stress and Strain, Table A.1, from memory: Z = 0.0976 b d² of an isosceles triangle.
    const [b, h] = [0.2, 0.3];
    const found = sectionProperties(solidOutline([polygon([0, 0], [b, 0], [b / 2, h])], b));
    near(found.iMajor, (b * h ** 3) / 36);
    near(found.iMinor, (h * b ** 3) / 48);
    near(found.wElMajor, (b * h ** 2) / 24);
    near(found.wPlMajor, 0.0976 * b * h ** 2, 1e-3);
    near(found.centroidUp, h / 3);
    // τ at the centroid of a triangle is 4/3 of V/A: Timoshenko, Strength of Materials, Part I, from memory.
    near(found.webArea, (3 / 4) * ((b * h) / 2));
  });
});

describe('principal axes', () => {
  test('of an angle with equal legs lie at 45°, through the corner', () => {
    const { principal } = sectionProperties({
      shape: 'angle',
      h: 0.1,
      b: 0.1,
      t: 0.01,
      r: 0.012,
      toe: 0.006,
    });
    near(Math.abs(principal?.angle ?? 0), Math.PI / 4);
  });

  test('of symmetric sections are the axes themselves', () => {
    expect(sectionProperties(beam).principal).toBeNull();
    expect(sectionProperties({ ...beam, shape: 'tee' }).principal).toBeNull();
  });

  test('keep the sum of the second moments and their determinant', () => {
    const legs = fc.record({
      h: fc.double({ min: 0.06, max: 0.3, noNaN: true }),
      b: fc.double({ min: 0.06, max: 0.3, noNaN: true }),
    });
    fc.assert(
      fc.property(legs, ({ h, b }) => {
        const d: SectionDimensions = { shape: 'angle', h, b, t: 0.008, r: 0.01, toe: 0.004 };
        const found = sectionProperties(d);
        const sums = areaMoments(outlineCorners(d));
        const product = sums.yz - (sums.y * sums.z) / sums.area;
        const { iU, iV } = found.principal ?? { iU: 0, iV: 0 };
        near(iU + iV, found.iMajor + found.iMinor);
        near(iU * iV, found.iMajor * found.iMinor - product ** 2, 1e-6);
      }),
    );
  });
});

describe('compound sections', () => {
  const one = sectionProperties(beam);

  test('two beams side by side have twice the area, moment and moduli', () => {
    const two = sectionProperties(sideBySide({ name: 'Beam', of: beam }, 2, 0.01));
    for (const name of ['area', 'iMajor', 'wElMajor', 'wPlMajor', 'j', 'iw', 'firstMoment'] as const)
      near(two[name], 2 * one[name], 1e-6);
    near(two.iMinor, 2 * (one.iMinor + one.area * 0.08 ** 2)); // parallel axes, 80 mm from the middle
  });

  test('a plate on each flange adds A d² and its own moment', () => {
    const plate: SectionDimensions & { shape: 'rectangle' } = { shape: 'rectangle', h: 0.012, b: 0.13 };
    const found = sectionProperties(
      compound([
        { name: 'Plate', of: plate, z: 0.01, y: 0 },
        { name: 'Beam', of: beam, z: 0, y: 0.012 },
        { name: 'Plate', of: plate, z: 0.01, y: 0.312 },
      ]),
    );
    const area = plate.b * plate.h;
    near(found.iMajor, one.iMajor + 2 * ((plate.b * plate.h ** 3) / 12 + area * 0.156 ** 2));
    near(found.wPlMajor, one.wPlMajor + 2 * area * 0.156, 1e-6);
    expect(
      depthOf(
        compound([
          { name: 'Plate', of: plate, z: 0, y: 0 },
          { name: 'Beam', of: beam, z: 0, y: 0.012 },
        ]),
      ),
    ).toBeCloseTo(0.312, 12);
  });

  test('a plate under the bottom flange alone moves the axis down', () => {
    const plate: SectionDimensions & { shape: 'rectangle' } = { shape: 'rectangle', h: 0.01, b: 0.15 };
    const found = sectionProperties(
      compound([
        { name: 'Plate', of: plate, z: 0, y: 0 },
        { name: 'Beam', of: beam, z: 0, y: 0.01 },
      ]),
    );
    const area = plate.b * plate.h;
    const axis = (area * 0.005 + one.area * 0.16) / (area + one.area);
    near(found.centroidUp, axis);
    near(
      found.iMajor,
      one.iMajor + one.area * (0.16 - axis) ** 2 + (plate.b * plate.h ** 3) / 12 + area * (axis - 0.005) ** 2,
    );
    near(found.wElMajor, found.iMajor / (0.31 - axis));
  });

  test('the parts say what each adds to I, and add up to it', () => {
    const plate: SectionDimensions & { shape: 'rectangle' } = { shape: 'rectangle', h: 0.01, b: 0.15 };
    const made = compound([
      { name: 'Plate', of: plate, z: 0, y: 0 },
      { name: 'Beam', of: beam, z: 0, y: 0.01 },
    ]);
    const found = sectionProperties(made);
    const [under, above, ...others] = contributionsOf(made);
    expect(others).toEqual([]);
    expect([under?.name, above?.name]).toEqual(['Plate', 'Beam']);
    near(under?.own ?? 0, (plate.b * plate.h ** 3) / 12);
    near(under?.offset ?? 0, 0.005 - found.centroidUp);
    near(above?.own ?? 0, one.iMajor);
    near(above?.shifted ?? 0, one.area * (0.16 - found.centroidUp) ** 2);
    near(
      [under, above].reduce((sum, part) => sum + (part?.own ?? 0) + (part?.shifted ?? 0), 0),
      found.iMajor,
    );
  });

  test('an outline with a hole that was drawn has its rings for parts, the hole with a negative area', () => {
    const square = (from: number, to: number) => polygon([from, from], [to, from], [to, to], [from, to]);
    const hole = square(0.02, 0.06).reverse();
    const drawn = { shape: 'outline', rings: [square(0, 0.1), hole], t: 0.01, j: 0, iw: 0 } as const;
    const [outer, inner] = contributionsOf(drawn);
    near(outer?.own ?? 0, 0.1 ** 4 / 12);
    near(inner?.area ?? 0, -(0.04 ** 2));
    expect([outer?.name, inner?.name]).toEqual(['Outline', 'Hole']);
  });
});

describe('outlines that bound no section', () => {
  const square = polygon([0, 0], [1, 0], [1, 1], [0, 1]);
  const outline = (...rings: Corner[][]): SectionDimensions => ({
    shape: 'outline',
    rings,
    t: 0.1,
    j: 0,
    iw: 0,
  });

  test.each<[string, SectionDimensions]>([
    ['no ring', outline()],
    ['two corners', outline(polygon([0, 0], [1, 0]))],
    ['a ring that runs clockwise', outline([...square].reverse())],
    ['a ring that crosses itself', outline(polygon([0, 0], [1, 1], [1, 0], [0, 1]))],
    ['two rings that overlap', outline(square, polygon([0.5, 0], [1.5, 0], [1.5, 1], [0.5, 1]))],
    ['the same ring twice', outline(square, square)],
    ['a hole outside', outline(square, polygon([2, 0], [2, 1], [3, 1], [3, 0]))],
    ['a corner radius larger than its edges', outline(square.map((corner) => ({ ...corner, r: 0.6 })))],
    ['a place that is no number', outline(polygon([0, 0], [Number.NaN, 0], [1, 1]))],
    ['a torsion constant below 0', { shape: 'outline', rings: [square], t: 0.1, j: -1, iw: 0 }],
    [
      'a flange that tapers away',
      {
        shape: 'tapered_i',
        h: 0.2,
        b: 0.3,
        tw: 0.008,
        tf: 0.008,
        r: 0.008,
        toe: 0.004,
        slope: 0.14,
        at: 0.07,
      },
    ],
    ['a leg shorter than its radii', { shape: 'angle', h: 0.02, b: 0.1, t: 0.01, r: 0.012, toe: 0.006 }],
    [
      'values without an area',
      {
        shape: 'values',
        h: 0.2,
        b: 0.1,
        t: 0.01,
        area: 0,
        iMajor: 1,
        iMinor: 1,
        wElMajor: 1,
        wElMinor: 1,
        wPlMajor: 1,
        wPlMinor: 1,
        j: 1,
        iw: 1,
        shearArea: 1,
      },
    ],
  ])('%s', (_, d) => {
    expect(dimensionFaults(d).length).toBeGreaterThan(0);
    expect(() => sectionProperties(d)).toThrow(ImpossibleSection);
  });

  test('rings that touch bound one', () => {
    expect(dimensionFaults(outline(square, polygon([1, 0], [2, 0], [2, 1], [1, 1])))).toEqual([]);
    expect(dimensionFaults(outline(square, polygon([0.2, 0.2], [0.2, 0.8], [0.8, 0.8], [0.8, 0.2])))).toEqual(
      [],
    );
  });
});

test('a section known by its values gives them back', () => {
  const values = {
    area: 2e-3,
    iMajor: 3e-6,
    iMinor: 1e-6,
    wElMajor: 4e-5,
    wElMinor: 2e-5,
    wPlMajor: 5e-5,
    wPlMinor: 3e-5,
    j: 1e-8,
    iw: 0,
    shearArea: 8e-4,
  };
  const found = sectionProperties({ shape: 'values', h: 0.15, b: 0.08, t: 0.01, ...values });
  expect(found).toMatchObject(values);
  near((found.iMajor * found.webThickness) / found.firstMoment, values.shearArea);
});
