/** Exponents of the SI base units m, kg, s and K. Angle is dimensionless: rad = 1. */
export type Dimension = {
  readonly length: number;
  readonly mass: number;
  readonly time: number;
  readonly temperature: number;
};

const of = (length: number, mass = 0, time = 0, temperature = 0): Dimension => ({
  length,
  mass,
  time,
  temperature,
});

/**
 * The quantities that a beam document, a section and a material speak of, by name. Several names share one
 * dimension (a stress and an area load; a moment and a rotational spring): the name says which units are usual.
 * A temperature is always a difference: 20 °C is 20 K and 36 °F is 20 K.
 */
export const DIMENSIONS = {
  length: of(1),
  force: of(1, 1, -2),
  line_load: of(0, 1, -2),
  moment: of(2, 1, -2),
  stress: of(-1, 1, -2),
  modulus: of(-1, 1, -2),
  area_load: of(-1, 1, -2),
  second_moment: of(4),
  section_modulus: of(3),
  area: of(2),
  warping: of(6),
  bending_stiffness: of(3, 1, -2),
  shear_stiffness: of(1, 1, -2),
  spring: of(0, 1, -2),
  rotational_spring: of(2, 1, -2),
  curvature: of(-1),
  rotation: of(0),
  mass_per_length: of(-1, 1),
  density: of(-3, 1),
  temperature: of(0, 0, 0, 1),
  expansion: of(0, 0, 0, -1),
  ratio: of(0),
} as const satisfies Record<string, Dimension>;

export type DimensionName = keyof typeof DIMENSIONS;
export const DIMENSION_NAMES = Object.keys(DIMENSIONS) as DimensionName[];

/** The name in words, with its article: "a line load", "an area". */
export const DIMENSION_WORDS: Readonly<Record<DimensionName, string>> = {
  length: 'a length',
  force: 'a force',
  line_load: 'a line load',
  moment: 'a moment',
  stress: 'a stress',
  modulus: 'a modulus',
  area_load: 'an area load',
  second_moment: 'a second moment of area',
  section_modulus: 'a section modulus',
  area: 'an area',
  warping: 'a warping constant',
  bending_stiffness: 'a bending stiffness',
  shear_stiffness: 'a shear stiffness',
  spring: 'a spring stiffness',
  rotational_spring: 'a rotational spring stiffness',
  curvature: 'a curvature',
  rotation: 'a rotation',
  mass_per_length: 'a mass per length',
  density: 'a density',
  temperature: 'a temperature difference',
  expansion: 'a coefficient of thermal expansion',
  ratio: 'a number without unit',
};

const combine = (a: Dimension, b: Dimension, sign: 1 | -1): Dimension => ({
  length: a.length + sign * b.length,
  mass: a.mass + sign * b.mass,
  time: a.time + sign * b.time,
  temperature: a.temperature + sign * b.temperature,
});

export const multiplyDimensions = (a: Dimension, b: Dimension): Dimension => combine(a, b, 1);
export const divideDimensions = (a: Dimension, b: Dimension): Dimension => combine(a, b, -1);

/** Dimension of aⁿ; n may be a fraction (√(m⁴) is m²). */
export const raiseDimension = (a: Dimension, n: number): Dimension => ({
  length: a.length * n,
  mass: a.mass * n,
  time: a.time * n,
  temperature: a.temperature * n,
});

/** Exponents reached through a fraction, such as 4·(1/3)·3, are the same within 1e-9. */
const SAME_EXPONENT = 1e-9;

export function equalDimensions(a: Dimension, b: Dimension): boolean {
  const difference = combine(a, b, -1);
  return [difference.length, difference.mass, difference.time, difference.temperature].every(
    (exponent) => Math.abs(exponent) < SAME_EXPONENT,
  );
}

export const isDimensionless = (a: Dimension): boolean => equalDimensions(a, DIMENSIONS.ratio);

/** What each nameless combination of exponents is called in a message. */
const SHARED_WORDS: readonly (readonly [Dimension, string])[] = [
  [DIMENSIONS.ratio, 'a number without unit'],
  [DIMENSIONS.length, 'a length'],
  [DIMENSIONS.area, 'an area'],
  [DIMENSIONS.section_modulus, 'a length cubed'],
  [DIMENSIONS.second_moment, 'a length to the fourth power'],
  [DIMENSIONS.warping, 'a length to the sixth power'],
  [DIMENSIONS.force, 'a force'],
  [DIMENSIONS.line_load, 'a force per length'],
  [DIMENSIONS.moment, 'a moment'],
  [DIMENSIONS.stress, 'a force per area'],
  [DIMENSIONS.bending_stiffness, 'a bending stiffness'],
  [DIMENSIONS.curvature, 'a number per length'],
  [of(0, 1), 'a mass'],
  [DIMENSIONS.mass_per_length, 'a mass per length'],
  [of(-2, 1), 'a mass per area'],
  [DIMENSIONS.density, 'a mass per volume'],
  [of(-2, 1, -2), 'a force per volume'],
  [of(0, 0, 1), 'a time'],
  [DIMENSIONS.temperature, 'a temperature difference'],
  [DIMENSIONS.expansion, 'a number per temperature'],
];

/** A dimension in words for a message: "a length", "a force per length", else its SI base units "kg·m³·s⁻²". */
export function nameDimension(dimension: Dimension): string {
  const known = SHARED_WORDS.find(([candidate]) => equalDimensions(candidate, dimension));
  if (known) return known[1];
  const factors: readonly (readonly [string, number])[] = [
    ['kg', dimension.mass],
    ['m', dimension.length],
    ['s', dimension.time],
    ['K', dimension.temperature],
  ];
  return factors
    .filter(([, exponent]) => exponent !== 0)
    .map(([unit, exponent]) => (exponent === 1 ? unit : `${unit}^${Number(exponent.toFixed(3))}`))
    .join('·');
}
