import { dimensionFaults } from './dimension-faults';
import { cornerRadii, nominalWall, type SectionDimensions, type TubeStandard } from './dimensions';
import { type SectionProperties, sectionProperties } from './properties';
import { slipCause } from './slip';

/** What a table can say of a section, SI: kg/m, m², m³, m⁴, m⁶. */
export const TABULATED = {
  mass: { power: 0, words: 'mass' },
  area: { power: 2, words: 'area' },
  iMajor: { power: 4, words: 'major second moment' },
  iMinor: { power: 4, words: 'minor second moment' },
  wElMajor: { power: 3, words: 'major elastic modulus' },
  wElMinor: { power: 3, words: 'minor elastic modulus' },
  wPlMajor: { power: 3, words: 'major plastic modulus' },
  wPlMinor: { power: 3, words: 'minor plastic modulus' },
  rMajor: { power: 1, words: 'major radius of gyration' },
  rMinor: { power: 1, words: 'minor radius of gyration' },
  j: { power: 4, words: 'torsion constant' },
  iw: { power: 6, words: 'warping constant' },
} as const;
export type TabulatedName = keyof typeof TABULATED;
export type Tabulated = { readonly [Name in TabulatedName]?: number | undefined };

export type Severity = 'error' | 'warning' | 'note';

/** A value that cannot be right, or is worth a look. `expected` is SI, like the value itself. */
export type Finding = {
  rule: string;
  severity: Severity;
  property: TabulatedName;
  expected: number | null;
  formula: string;
  /** The likely cause in words, where the size of the error tells it. */
  cause: string | null;
};

export type PlausibilityOptions = {
  /** kg/m³ that the masses stand for. */
  density: number;
  /** Half a unit of the last printed digit, SI: 26 lb/ft may be 25.5 to 26.5. */
  rounding?: Tabulated;
  /** Without root radii a tabulated area may lie up to 7 % above the computed one. */
  rootRadiusKnown: boolean;
  /** Flanges whose thickness is a mean: the second moments may differ by twice as much. */
  taperedFlanges?: boolean;
  /** Of a tube: masses to ASTM A500 are those of the nominal wall, areas those of the design wall. */
  tubeStandard?: TubeStandard;
  /** Properties of the dimensions, where the caller has them. */
  computed?: SectionProperties;
};

type Limits = { warning: number; error: number; above?: number };

const AREA: Limits = { warning: 0.01, error: 0.08 };
const I_MAJOR: Limits = { warning: 0.015, error: 0.05 };
const I_MINOR: Limits = { warning: 0.02, error: 0.06 };
const TAPERED: Limits = { warning: 0.03, error: 0.06 };
const MASS: Limits = { warning: 0.015, error: 0.05 };
const ELASTIC: Limits = { warning: 0.01, error: 0.03 };
const PLASTIC: Limits = { warning: 0.015, error: Number.POSITIVE_INFINITY };
const GYRATION: Limits = { warning: 0.01, error: 0.03 };
const TIMBER_I: Limits = { warning: 0.002, error: 0.002 };
const WARPING: Limits = { warning: 0.03, error: Number.POSITIVE_INFINITY };
const CHANNEL_WARPING: Limits = { warning: 0.12, error: Number.POSITIVE_INFINITY };
const A500_MASS = 1.07;
const OPEN_TORSION: Limits = { warning: 0.15, error: Number.POSITIVE_INFINITY }; // tapered, tees, angles
const TUBE_TORSION: Limits = { warning: 0.08, error: Number.POSITIVE_INFINITY };
const WITHOUT_ROOTS = 0.07; // fillets are left out of the computed value

/** Plastic over elastic modulus about the major axis, by shape. Thick walls approach the solid section. */
const SHAPE_FACTORS: Readonly<Record<SectionDimensions['shape'], readonly [number, number]>> = {
  i: [1.1, 1.3],
  tapered_i: [1.1, 1.3],
  channel: [1.15, 1.25],
  tapered_channel: [1.15, 1.25],
  tee: [1.5, 1.85],
  angle: [1.5, 1.85],
  rhs: [1.13, 1.4],
  shs: [1.13, 1.4],
  chs: [1.27, 1.5],
  rectangle: [1.4925, 1.5075],
  round: [1.69, 1.706],
  outline: [1, 2],
  values: [1, 2],
};
/** The same about the minor axis of an I: two flanges and what the web and the roots add or take. */
const MINOR_SHAPE_FACTOR = [1.5, 1.62] as const;

/** Compares tabulated values with each other and with what the dimensions give, one rule at a time. */
class Comparison {
  readonly findings: Finding[] = [];
  constructor(
    private readonly tabulated: Tabulated,
    private readonly rounding: Tabulated,
  ) {}

  get(name: TabulatedName): number | undefined {
    return this.tabulated[name];
  }

  report(
    rule: string,
    severity: Severity,
    property: TabulatedName,
    formula: string,
    cause: string | null = null,
  ) {
    this.findings.push({ rule, severity, property, expected: null, formula, cause });
  }

  /** Reports a value that is off its expected one by more than the limits; true where it may be built upon: it is not. */
  check(rule: string, property: TabulatedName, expected: number, formula: string, limits: Limits): boolean {
    const value = this.get(property);
    if (value === undefined) return false;
    const room = this.rounding[property] ?? 0;
    const excess = Math.abs(value - expected) - room;
    const allowed = (limit: number) => (value > expected ? limit + (limits.above ?? 0) : limit) * expected;
    if (excess <= allowed(limits.warning)) return true;
    const cause = slipCause(value / expected, TABULATED[property].power);
    const severity = cause !== null || excess > allowed(limits.error) ? 'error' : 'warning';
    this.findings.push({ rule, severity, property, expected, formula, cause });
    return false;
  }
}

const EXCHANGED = 0.1; // both axes fit the other one's value: no slip of units does that

/**
 * False where the axes look exchanged. A major value below the minor one for another reason fails its own rule; of a
 * nearly square section, whose axes differ by less than its values may, the order of the two says nothing.
 */
function checkAxes(
  comparison: Comparison,
  computed: { iMajor: number; iMinor: number },
  allowed: number,
): boolean {
  const major = comparison.get('iMajor');
  const minor = comparison.get('iMinor');
  if (major === undefined || minor === undefined || major >= minor) return true;
  const agree = (limit: number, forMajor: number, forMinor: number) =>
    Math.abs(major / forMajor - 1) <= limit && Math.abs(minor / forMinor - 1) <= limit;
  if (agree(allowed, computed.iMajor, computed.iMinor)) return true;
  const isNearlySquare = Math.abs(computed.iMajor / computed.iMinor - 1) < EXCHANGED;
  if (!agree(isNearlySquare ? allowed : EXCHANGED, computed.iMinor, computed.iMajor)) return true;
  comparison.report('axes', 'error', 'iMajor', 'I major is below I minor', 'The two axes look exchanged');
  return false;
}

/** False where elastic and plastic modulus of the axis look exchanged; a slip of units of one fails its own rule. */
function checkOrder(comparison: Comparison, axis: 'Major' | 'Minor', computed: SectionProperties): boolean {
  const wEl = comparison.get(`wEl${axis}`);
  const wPl = comparison.get(`wPl${axis}`);
  if (wEl === undefined || wPl === undefined || wPl >= wEl) return true;
  const isSlip = (value: number, expected: number) =>
    slipCause(value / expected, TABULATED.wElMajor.power) !== null;
  if (isSlip(wEl, computed[`wEl${axis}`]) || isSlip(wPl, computed[`wPl${axis}`])) return true;
  const cause = 'The elastic and the plastic column look exchanged';
  comparison.report('plastic_below_elastic', 'error', `wPl${axis}`, 'W_pl is below W_el', cause);
  return false;
}

/** Shape factor against its usual range; where it is within, W_pl against the dimensions. */
function checkPlastic(
  comparison: Comparison,
  axis: 'Major' | 'Minor',
  computed: SectionProperties,
  range: readonly [number, number] | null,
  limits: Limits,
): void {
  const property = `wPl${axis}` as const;
  const wEl = comparison.get(`wEl${axis}`);
  const wPl = comparison.get(property);
  if (wPl === undefined) return;
  const factor = wPl / (wEl ?? computed[`wEl${axis}`]);
  const [least, most] = range ?? [0, Number.POSITIVE_INFINITY];
  const isUsual = factor >= least && factor <= most;
  const isElasticRight = wEl !== undefined && Math.abs(wEl / computed[`wEl${axis}`] - 1) <= ELASTIC.error;
  if (isUsual || !isElasticRight || slipCause(wPl / computed[property], TABULATED[property].power) !== null) {
    comparison.check('plastic_modulus', property, computed[property], 'W_pl from the dimensions', limits);
  } else if (Math.abs(wPl / computed[property] - 1) > limits.warning + (limits.above ?? 0)) {
    const rule = axis === 'Major' ? 'shape_factor' : 'shape_factor_minor';
    const formula = `W_pl/W_el is ${factor.toFixed(2)}; usual is ${least.toFixed(2)} to ${most.toFixed(2)}`;
    const expected = computed[property];
    comparison.findings.push({ rule, severity: 'warning', property, expected, formula, cause: null });
  }
}

/** Rolled shapes: between the strips alone and 1.6 times them, which roots and junctions add. */
const STRIPS_LEAST = 1;
const STRIPS_MOST = 1.6;

function checkTorsion(comparison: Comparison, d: SectionDimensions, j: number): void {
  const value = comparison.get('j');
  if (value === undefined) return;
  if (d.shape === 'rhs' || d.shape === 'shs' || d.shape === 'chs') {
    comparison.check('torsion', 'j', j, 'I_t = 4 A² t/p + p t³/3', TUBE_TORSION);
  } else if (d.shape === 'i' || d.shape === 'channel') {
    const strips = (2 * d.b * d.tf ** 3 + (d.h - 2 * d.tf) * d.tw ** 3) / 3;
    const [least, most] = [STRIPS_LEAST * strips, STRIPS_MOST * strips];
    if (value >= Math.min(least, 0.95 * j) && value <= Math.max(most, 1.05 * j)) return;
    const cause = slipCause(value / j, TABULATED.j.power);
    const severity = cause === null ? 'warning' : 'error';
    const formula = 'I_t from 1 to 1.6 times Σ b t³/3';
    comparison.findings.push({ rule: 'torsion', severity, property: 'j', expected: j, formula, cause });
  } else {
    const isOpen = 'tf' in d || d.shape === 'angle';
    comparison.check('torsion', 'j', j, 'I_t from the dimensions', isOpen ? OPEN_TORSION : TUBE_TORSION);
  }
}

function checkWarping(comparison: Comparison, d: SectionDimensions, iMinor: number, computed: number): void {
  const value = comparison.get('iw');
  if (value === undefined) return;
  if (d.shape === 'i') {
    const expected = (iMinor * (d.h - d.tf) ** 2) / 4;
    comparison.check('warping', 'iw', expected, 'I_w = I minor (h − t_f)²/4', WARPING);
  } else if (computed > 0) {
    comparison.check('warping', 'iw', computed, 'I_w of the mid-lines', CHANNEL_WARPING);
  } else if (value > 0 && d.shape !== 'tee') {
    const formula = 'I_w of a tube, an angle or a solid section is 0';
    comparison.findings.push({
      rule: 'warping',
      severity: 'warning',
      property: 'iw',
      expected: 0,
      formula,
      cause: null,
    });
  }
}

const NOMINAL_OVER_DESIGN = [1.05, 1.09] as const; // mass over ρA of a tube to ASTM A500
const SAME = 0.01;

/** Area with the nominal wall of a tube whose design wall is given, m²; NaN where it does not fit. */
function nominalArea(d: SectionDimensions & { t: number }): number {
  const t = nominalWall(d.t, 'ASTM A500');
  const nominal = d.shape === 'chs' ? { ...d, t } : { ...d, t, ...cornerRadii(t, 'ASTM A500') };
  return dimensionFaults(nominal).length === 0 ? sectionProperties(nominal).area : Number.NaN;
}

/** A tube to ASTM A500: its mass is that of the nominal wall, its area that of the design wall. False ends the row. */
function checkDesignWall(
  comparison: Comparison,
  d: SectionDimensions & { t: number },
  computed: SectionProperties,
  density: number,
): boolean {
  const area = comparison.get('area');
  const mass = comparison.get('mass');
  const nominal = nominalArea(d);
  const isNear = (value: number, expected: number, by: number) => Math.abs(value / expected - 1) <= by;
  const report = (property: 'area' | 'mass', expected: number, formula: string, cause: string) =>
    comparison.findings.push({
      rule: 'nominal_wall',
      severity: 'warning',
      property,
      expected,
      formula,
      cause,
    });
  if (area !== undefined && !isNear(area, computed.area, SAME) && isNear(area, nominal, SAME)) {
    const cause = 'The properties look computed with the nominal wall, not with 0.93 of it';
    report('area', computed.area, 'A with the design wall of 0.93 t', cause);
    return false;
  }
  if (mass === undefined) return true;
  const ratio = mass / (density * computed.area);
  const [least, most] = NOMINAL_OVER_DESIGN;
  if ((ratio >= least && ratio <= most) || isNear(mass, density * nominal, MASS.warning)) return true;
  const expected = density * (Number.isNaN(nominal) ? computed.area * A500_MASS : nominal);
  if (isNear(ratio, 1, SAME)) {
    const formula = `m/(ρA) is ${ratio.toFixed(2)}; 1.05 to 1.09 where A is of the design wall`;
    report('mass', expected, formula, 'The mass looks like that of the design wall');
  } else {
    comparison.check('mass', 'mass', expected, `m = ${density} kg/m³ · A of the nominal wall`, MASS);
  }
  return true;
}

const THIN_FLANGE = { i: 0.8, tapered_i: 0.7 } as const; // of the web; American S are rolled down to 0.74
const SLENDER = [0.9, 4.5] as const; // depth over width of an I

function checkProportions(comparison: Comparison, d: SectionDimensions): void {
  if (d.shape !== 'i' && d.shape !== 'tapered_i') return;
  const ratio = d.h / d.b;
  const least = THIN_FLANGE[d.shape];
  if (d.tf < least * d.tw) {
    const formula = `t_f/t_w is ${(d.tf / d.tw).toFixed(2)}; usual is ${least.toFixed(2)} or more`;
    comparison.report('proportions', 'warning', 'area', formula, 'Flange and web look exchanged');
  }
  if (ratio < SLENDER[0] || ratio > SLENDER[1]) {
    const formula = `h/b is ${ratio.toFixed(2)}; usual is 0.90 to 4.50`;
    comparison.report('proportions', 'warning', 'area', formula, 'Look at the depth and the width');
  }
}

/**
 * Findings on a row whose dimensions are possible (dimensionFaults is empty). Each value is compared with what the
 * dimensions give, or with another tabulated value that is itself plausible, so that one slip is reported once.
 */
export function plausibilityFindings(
  d: SectionDimensions,
  tabulated: Tabulated,
  options: PlausibilityOptions,
): Finding[] {
  const computed = options.computed ?? sectionProperties(d);
  const comparison = new Comparison(tabulated, options.rounding ?? {});
  const above = roomForRoots(d, options.rootRadiusKnown);
  const pick = (name: 'area' | 'iMajor' | 'iMinor', isRight: boolean) =>
    (isRight ? comparison.get(name) : undefined) ?? computed[name];

  const isDesignWall = options.tubeStandard === 'ASTM A500' && 't' in d;
  if (isDesignWall && !checkDesignWall(comparison, d, computed, options.density)) return comparison.findings;
  const fromSizes = 'A from the dimensions';
  const isAreaRight = comparison.check('area', 'area', computed.area, fromSizes, { ...AREA, above });
  const area = pick('area', isAreaRight);
  if (!isDesignWall) {
    comparison.check('mass', 'mass', options.density * area, `m = ${options.density} kg/m³ · A`, MASS);
  }
  const { iMajor, iMinor, areAxesRight } = checkSecondMoments(comparison, d, computed, options, pick);
  const isMajorOrdered = checkOrder(comparison, 'Major', computed);
  const isMinorOrdered = checkOrder(comparison, 'Minor', computed);
  const isTapered = options.taperedFlanges || 'slope' in d;
  const limits = { ...PLASTIC, warning: isTapered ? TAPERED.warning : PLASTIC.warning, above };
  if (isMajorOrdered) {
    const farthest = computed.iMajor / computed.wElMajor;
    comparison.check('elastic_modulus', 'wElMajor', iMajor / farthest, 'W_el = I/c', ELASTIC);
    checkPlastic(comparison, 'Major', computed, SHAPE_FACTORS[d.shape], limits);
  }
  if (isMinorOrdered) {
    const farthest = computed.iMinor / computed.wElMinor;
    comparison.check('elastic_modulus', 'wElMinor', iMinor / farthest, 'W_el = I/c', ELASTIC);
    checkPlastic(
      comparison,
      'Minor',
      computed,
      d.shape === 'i' || d.shape === 'tapered_i' ? MINOR_SHAPE_FACTOR : null,
      limits,
    );
  }
  comparison.check('gyration', 'rMajor', Math.sqrt(iMajor / area), 'i = √(I/A)', GYRATION);
  comparison.check('gyration', 'rMinor', Math.sqrt(iMinor / area), 'i = √(I/A)', GYRATION);
  checkTorsion(comparison, d, computed.j);
  if (areAxesRight) checkWarping(comparison, d, iMinor, computed.iw);
  checkProportions(comparison, d);
  return comparison.findings;
}

/** Only rolled shapes have roots that a table may leave out. */
const roomForRoots = (d: SectionDimensions, isKnown: boolean): number =>
  isKnown || !('r' in d) ? 0 : WITHOUT_ROOTS;

/** Both second moments, each as tabulated where it is plausible, else as computed. */
function checkSecondMoments(
  comparison: Comparison,
  d: SectionDimensions,
  computed: SectionProperties,
  { rootRadiusKnown, taperedFlanges = false }: PlausibilityOptions,
  pick: (name: 'iMajor' | 'iMinor', isRight: boolean) => number,
) {
  const above = roomForRoots(d, rootRadiusKnown);
  const limitsOf = (rolled: Limits) =>
    d.shape === 'rectangle' ? TIMBER_I : { ...(taperedFlanges || 'slope' in d ? TAPERED : rolled), above };
  const major = limitsOf(I_MAJOR);
  const areAxesRight = checkAxes(comparison, computed, major.warning);
  const check = (property: 'iMajor' | 'iMinor', limits: Limits) =>
    areAxesRight &&
    comparison.check('second_moment', property, computed[property], 'I from the dimensions', limits);
  const iMajor = pick('iMajor', check('iMajor', major));
  const iMinor = pick('iMinor', check('iMinor', limitsOf(I_MINOR)));
  return { iMajor, iMinor, areAxesRight };
}
