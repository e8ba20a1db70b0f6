import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { type IDimensions, plausibilityFindings, sectionProperties, type Tabulated, tube } from './index';
import { slipCause } from './slip';

const OV260: IDimensions = { shape: 'i', h: 0.258, b: 0.13, tw: 0.0062, tf: 0.0098, r: 0.01 };
const OPTIONS = { density: 7850, rootRadiusKnown: true };

/** A row as its maker computed it. */
function row(change: Partial<Record<keyof Tabulated, number>> = {}): Tabulated {
  const { area, iMajor, iMinor, wElMajor, wElMinor, wPlMajor, wPlMinor, rMajor, rMinor, j, iw } =
    sectionProperties(OV260);
  const right = { area, iMajor, iMinor, wElMajor, wElMinor, wPlMajor, wPlMinor, rMajor, rMinor, j, iw };
  return { mass: 7850 * area, ...right, ...change };
}
const right = (name: keyof Tabulated): number => row()[name] ?? Number.NaN;
const findings = (change: Partial<Record<keyof Tabulated, number>>) =>
  plausibilityFindings(OV260, row(change), OPTIONS);

test('a row that agrees with its dimensions is silent', () => {
  expect(findings({})).toEqual([]);
});

test('any tube that agrees with itself is silent, be it square but for rounding', () => {
  const size = fc.double({ min: 0.05, max: 0.4, noNaN: true });
  const slenderness = fc.oneof(fc.double({ min: 0.4, max: 1, noNaN: true }), fc.constant(1 - 2 ** -52));
  fc.assert(
    fc.property(size, slenderness, (h, ratio) => {
      const d = tube(h, h * ratio, h / 20, 'EN 10210');
      const { area, iMajor, iMinor, wElMajor, wPlMajor, j } = sectionProperties(d);
      const tabulated = { mass: 7850 * area, area, iMajor, iMinor, wElMajor, wPlMajor, j };
      expect(plausibilityFindings(d, tabulated, OPTIONS)).toEqual([]);
    }),
  );
});

describe('one slip is reported once, with its cause', () => {
  test.each<[string, Partial<Record<keyof Tabulated, number>>, string, string, RegExp]>([
    ['I in mm⁴', { iMajor: right('iMajor') * 1e4 }, 'second_moment', 'iMajor', /mm⁴ under a heading of cm⁴/],
    [
      'I in in⁴',
      { iMajor: right('iMajor') / 2.54 ** 4 },
      'second_moment',
      'iMajor',
      /in⁴ under a heading of cm⁴/,
    ],
    [
      'moduli exchanged',
      { wElMajor: right('wPlMajor'), wPlMajor: right('wElMajor') },
      'plastic_below_elastic',
      'wPlMajor',
      /exchanged/,
    ],
    ['axes exchanged', { iMajor: right('iMinor'), iMinor: right('iMajor') }, 'axes', 'iMajor', /exchanged/],
    ['mass in lb/ft', { mass: right('mass') / 1.48816 }, 'mass', 'mass', /lb\/ft/],
    ['I_w in dm⁶', { iw: right('iw') / 1e6 }, 'warping', 'iw', /dm⁶/],
    ['area a tenth', { area: right('area') / 10 }, 'area', 'area', /10\^1 times too small/],
  ])('%s', (_name, change, rule, property, cause) => {
    const found = findings(change);
    expect(found.map((finding) => [finding.rule, finding.severity, finding.property])).toEqual([
      [rule, 'error', property],
    ]);
    expect(found[0]?.cause).toMatch(cause);
  });
});

test.each<[string, number, string, string | null]>([
  ['an I_t that no thin strips have', right('j') * 3, 'warning', null],
  [
    'an I_t in in⁴ under cm⁴',
    right('j') / 2.54 ** 4,
    'error',
    'The value looks like in⁴ under a heading of cm⁴',
  ],
  [
    'an I_t in cm⁴ under in⁴',
    right('j') * 2.54 ** 4,
    'error',
    'The value looks like cm⁴ under a heading of in⁴',
  ],
  [
    'an I_t in mm⁴ under in⁴',
    right('j') * 25.4 ** 4,
    'error',
    'The value looks like mm⁴ under a heading of in⁴',
  ],
])('%s is found', (_name, j, severity, cause) => {
  expect(findings({ j })).toMatchObject([{ rule: 'torsion', severity, property: 'j', cause }]);
});

test('moduli that fit each other badly are a warning', () => {
  const d: IDimensions = { ...OV260, r: 0 };
  const { iMajor, wElMajor } = sectionProperties(d);
  const found = plausibilityFindings(d, { iMajor, wElMajor, wPlMajor: 1.4 * wElMajor }, OPTIONS);
  expect(found.filter(({ rule }) => rule === 'shape_factor')).toMatchObject([
    { severity: 'warning', property: 'wPlMajor', formula: 'W_pl/W_el is 1.40; usual is 1.10 to 1.30' },
  ]);
});

test.each([
  [1.48816, 0, 'The value looks like kg/m under a heading of lb/ft'],
  [1000, 0, 'The value is 10^3 times too large: look at the unit of its heading'],
  [1.07, 4, null],
  [0, 4, null],
  [-1, 2, null],
])('a value %d times its own, length to the power %d: %s', (ratio, power, cause) => {
  expect(slipCause(ratio, power)).toBe(cause);
});

test('axes that differ by less than their values may are in no order', () => {
  const d = tube(0.1, 0.0999, 0.005, 'EN 10210');
  const { iMajor, iMinor } = sectionProperties(d);
  expect(plausibilityFindings(d, { iMajor: iMinor, iMinor: iMajor }, OPTIONS)).toEqual([]);
});

describe('tolerances', () => {
  test.each([
    ['mass', 1.014, []],
    ['mass', 1.016, ['warning']],
    ['mass', 1.06, ['error']],
    ['area', 1.009, []],
    ['area', 1.02, ['warning']],
    ['area', 1.09, ['error']],
    ['iMajor', 1.014, []],
    ['iMajor', 1.06, ['error']],
    ['iMinor', 1.03, ['warning']],
    ['wElMajor', 0.985, ['warning']],
    ['wElMajor', 0.96, ['error']],
    ['rMajor', 1.02, ['warning']],
  ] as const)('%s at %d of its value', (property, factor, severities) => {
    const found = findings({ [property]: right(property) * factor }).filter(
      (one) => one.property === property,
    );
    expect(found.map(({ severity }) => severity)).toEqual(severities);
  });

  test('a printed value may be off by half a unit of its last digit', () => {
    const tabulated = row({ mass: right('mass') * 1.02 });
    const rounding = { mass: 0.5 };
    expect(plausibilityFindings(OV260, tabulated, { ...OPTIONS, rounding })).toEqual([]);
  });

  test('without root radii a table may say up to 7 % more, never less', () => {
    const bare = { ...OV260, r: 0 };
    const area = sectionProperties(bare).area;
    const found = (factor: number) =>
      plausibilityFindings(bare, { area: area * factor }, { density: 7850, rootRadiusKnown: false });
    expect(found(1.06)).toEqual([]);
    expect(found(0.98).map(({ severity }) => severity)).toEqual(['warning']);
  });
});

describe('a tube to ASTM A500', () => {
  // HSS6×4×1/4, AISC Manual: 15.62 lb/ft, t_des 0.233 in, A 4.30 in² (from memory)
  const hss = tube(6 * 0.0254, 4 * 0.0254, 0.25 * 0.0254, 'ASTM A500');
  const POUND_PER_FOOT = 1.488164; // kg/m, NIST SP 811
  const printed = (pounds: number, squareInches: number) =>
    plausibilityFindings(
      hss,
      { mass: pounds * POUND_PER_FOOT, area: squareInches * 0.0254 ** 2 },
      { density: 7850, rootRadiusKnown: true, tubeStandard: 'ASTM A500' },
    ).map(({ rule, severity, property }) => [rule, severity, property]);

  test('as printed is silent: the mass is that of the nominal wall', () => {
    expect(printed(15.62, 4.3)).toEqual([]);
  });
  test('weight over 3.403 A of 1.00 means that the weight is of the design wall', () => {
    expect(printed(3.403 * 4.3, 4.3)).toEqual([['nominal_wall', 'warning', 'mass']]);
  });
  test('an area of the nominal wall', () => {
    expect(printed(15.62, 15.62 / 3.403)).toEqual([['nominal_wall', 'warning', 'area']]);
  });
  test('a mass that is neither', () => {
    expect(printed(13, 4.3)).toEqual([['mass', 'error', 'mass']]);
  });
});

describe('shapes whose table breaks a usual bound', () => {
  const rulesOf = (d: Parameters<typeof plausibilityFindings>[0], tabulated: Tabulated) =>
    plausibilityFindings(d, tabulated, OPTIONS).map(({ rule }) => rule);

  test('a minor shape factor outside 1.50 to 1.62', () => {
    expect(findings({ wPlMinor: right('wElMinor') * 1.75 })).toMatchObject([
      { rule: 'shape_factor_minor', severity: 'warning', property: 'wPlMinor' },
    ]);
  });
  test('minor moduli exchanged', () => {
    const exchanged = { wElMinor: right('wPlMinor'), wPlMinor: right('wElMinor') };
    expect(findings(exchanged)).toMatchObject([{ rule: 'plastic_below_elastic', property: 'wPlMinor' }]);
  });
  test('a modulus in cubic inches is a slip, not an exchange', () => {
    const found = findings({ wPlMajor: right('wPlMajor') / 2.54 ** 3 });
    expect(found).toMatchObject([{ rule: 'plastic_modulus', severity: 'error' }]);
    expect(found[0]?.cause).toMatch(/in³ under a heading of cm³/);
  });
  test('a web thicker than its flanges, and a depth of five widths', () => {
    expect(rulesOf({ ...OV260, tw: 0.013 }, {})).toEqual(['proportions']);
    expect(rulesOf({ ...OV260, b: 0.05 }, {})).toEqual(['proportions']);
  });
  test('a tube that warps', () => {
    const d = tube(0.2, 0.1, 0.005, 'EN 10210');
    expect(rulesOf(d, { iw: 1e-9 })).toEqual(['warping']);
    expect(rulesOf(d, { iw: 0 })).toEqual([]);
  });
  test('a channel, a solid bar and an angle have their own torsion and warping', () => {
    const channel = { shape: 'channel', h: 0.2, b: 0.075, tw: 0.006, tf: 0.0125, r: 0.012 } as const;
    const { iw, j } = sectionProperties(channel);
    expect(rulesOf(channel, { iw, j })).toEqual([]);
    expect(rulesOf(channel, { iw: 1.3 * iw, j: 3 * j })).toEqual(['torsion', 'warping']);
    // A square bar of side a: J = 0.1406 a⁴ (Roark's Formulas, 7th ed., Table 10.1)
    const bar = { shape: 'rectangle', h: 0.05, b: 0.05 } as const;
    expect(rulesOf(bar, { j: 0.1406 * 0.05 ** 4 })).toEqual([]);
    expect(rulesOf(bar, { j: 0.16 * 0.05 ** 4 })).toEqual(['torsion']);
    const angle = { shape: 'angle', h: 0.1, b: 0.1, t: 0.01, r: 0.012, toe: 0.006 } as const;
    expect(rulesOf(angle, { iw: 1e-9 })).toEqual(['warping']);
  });
  test('tapered flanges may differ by twice as much', () => {
    const found = (options: { taperedFlanges?: boolean }) =>
      plausibilityFindings(OV260, row({ iMajor: right('iMajor') * 1.025 }), { ...OPTIONS, ...options });
    expect(found({}).map(({ rule }) => rule)).toContain('second_moment');
    expect(found({ taperedFlanges: true }).map(({ rule }) => rule)).not.toContain('second_moment');
  });
});
