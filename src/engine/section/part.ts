/**
 * A rectangle or a root fillet of a section. y is up from mid-depth, z to the right; `own…` are about its own centroid,
 * `plastic…` the plastic modulus where the axis passes through its centroid. A hole has a negative area.
 */
export type Part = {
  area: number;
  y: number;
  z: number;
  ownMajor: number;
  ownMinor: number;
  /** ∫yz dA about its own centroid: 0 where an axis of symmetry is upright. */
  ownProduct: number;
  plasticMajor: number;
  plasticMinor: number;
};

export function rectangle(b: number, h: number, y = 0, z = 0, sign: 1 | -1 = 1): Part {
  return {
    area: sign * b * h,
    y,
    z,
    ownMajor: (sign * b * h ** 3) / 12,
    ownMinor: (sign * h * b ** 3) / 12,
    ownProduct: 0,
    plasticMajor: (sign * b * h ** 2) / 4,
    plasticMinor: (sign * h * b ** 2) / 4,
  };
}

// A square of side r less a quarter circle. EN 10210-2:2006 Annex B.3 (A_g, h_g, I_gg), here per r = 1.
const FILLET_AREA = 1 - Math.PI / 4;
const FILLET_CENTROID = (10 - 3 * Math.PI) / (12 - 3 * Math.PI); // from the corner
const FILLET_OWN = 1 / 3 - Math.PI / 16 - 1 / (3 * (12 - 3 * Math.PI));
const FILLET_PRODUCT = 19 / 24 - Math.PI / 4 - FILLET_AREA * FILLET_CENTROID ** 2; // about the corner it is 19/24 − π/4

/** The fillet of radius r in the corner (y, z), lying towards `up` and `right`; it never straddles an axis. */
export function fillet(
  r: number,
  corner: { y: number; z: number },
  up: 1 | -1,
  right: 1 | -1,
  sign: 1 | -1,
): Part {
  const own = sign * FILLET_OWN * r ** 4;
  return {
    area: sign * FILLET_AREA * r ** 2,
    y: corner.y + up * FILLET_CENTROID * r,
    z: corner.z + right * FILLET_CENTROID * r,
    ownMajor: own,
    ownMinor: own,
    ownProduct: sign * up * right * FILLET_PRODUCT * r ** 4,
    plasticMajor: 0,
    plasticMinor: 0,
  };
}

/** Four fillets in the corners at (±y, ±z): each towards the middle (-1) or away from it (1). */
export function fourFillets(
  r: number,
  y: number,
  z: number,
  ways: { up: 1 | -1; right: 1 | -1 },
  sign: 1 | -1,
): Part[] {
  const outwards = (side: 1 | -1, way: 1 | -1) => (side === way ? 1 : -1);
  return ([1, -1] as const).flatMap((up) =>
    ([1, -1] as const).map((right) =>
      fillet(r, { y: up * y, z: right * z }, outwards(up, ways.up), outwards(right, ways.right), sign),
    ),
  );
}

export const sumOf = (parts: readonly Part[], of: (part: Part) => number): number =>
  parts.reduce((sum, part) => sum + of(part), 0);

/** Plastic modulus about an axis of symmetry: Σ A |y|, with a part on the axis cut in its middle. */
export const plasticModulus = (parts: readonly Part[], axis: 'major' | 'minor'): number =>
  sumOf(parts, (part) => {
    const distance = axis === 'major' ? part.y : part.z;
    const own = axis === 'major' ? part.plasticMajor : part.plasticMinor;
    return distance === 0 ? own : part.area * Math.abs(distance);
  });
