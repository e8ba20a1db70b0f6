import { depthOf, type SectionDimensions, widthOf } from './dimensions';
import { sectionProperties } from './properties';
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
};

type Limits = { warning: number; error: number; above?: number };

const AREA: Limits = { warning: 0.01, error: 0.08 };
const I_MAJOR: Limits = { warning: 0.015, error: 0.05 };
const I_MINOR: Limits = { warning: 0.02, error: 0.06 };
const MASS: Limits = { warning: 0.015, error: 0.05 };
const ELASTIC: Limits = { warning: 0.01, error: 0.03 };
const PLASTIC: Limits = { warning: 0.015, error: 0.05 };
const GYRATION: Limits = { warning: 0.01, error: 0.03 };
const TIMBER_I: Limits = { warning: 0.002, error: 0.002 };
const WARPING: Limits = { warning: 0.03, error: Number.POSITIVE_INFINITY };
const TUBE_TORSION: Limits = { warning: 0.08, error: Number.POSITIVE_INFINITY };
const WITHOUT_ROOTS = 0.07; // fillets are left out of the computed value

/** Plastic over elastic modulus about the major axis, by shape. */
const SHAPE_FACTORS: Readonly<Record<SectionDimensions['shape'], readonly [number, number]>> = {
  i: [1.08, 1.3],
  channel: [1.15, 1.25],
  rhs: [1.13, 1.4],
  shs: [1.13, 1.4],
  chs: [1.27, 1.5],
  rectangle: [1.4925, 1.5075],
  round: [1.69, 1.706],
};

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

  /** Reports a value that is off its expected one by more than the limits; true where it may be built upon. */
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
    return severity !== 'error';
  }
}

const EXCHANGED = 0.1; // both axes fit the other one's value: no slip of units does that

/**
 * False where the axes look exchanged. A major value below the minor one for another reason fails its own rule; of a
 * nearly square section, whose axes differ by less than its values may, the order of the two says nothing.
 */
function checkAxes(
  comparison: Comparison,
  d: SectionDimensions,
  computed: { iMajor: number; iMinor: number },
  allowed: number,
): boolean {
  const major = comparison.get('iMajor');
  const minor = comparison.get('iMinor');
  if (major === undefined || minor === undefined || major >= minor || depthOf(d) <= widthOf(d)) return true;
  const agree = (limit: number, forMajor: number, forMinor: number) =>
    Math.abs(major / forMajor - 1) <= limit && Math.abs(minor / forMinor - 1) <= limit;
  if (agree(allowed, computed.iMajor, computed.iMinor)) return true;
  if (!agree(EXCHANGED, computed.iMinor, computed.iMajor)) return true;
  comparison.report('axes', 'error', 'iMajor', 'I major is below I minor', 'The two axes look exchanged');
  return false;
}

function checkModuli(comparison: Comparison, d: SectionDimensions, elastic: number): void {
  const wEl = comparison.get('wElMajor');
  const wPl = comparison.get('wPlMajor');
  if (wEl !== undefined && wPl !== undefined && wPl < wEl) {
    comparison.report(
      'plastic_below_elastic',
      'error',
      'wPlMajor',
      'W_pl is below W_el',
      'The elastic and the plastic column look exchanged',
    );
    return;
  }
  const isElasticRight = comparison.check('elastic_modulus', 'wElMajor', elastic, 'W_el = I/(h/2)', ELASTIC);
  if (!isElasticRight || wEl === undefined || wPl === undefined) return;
  const [least, most] = SHAPE_FACTORS[d.shape];
  const factor = wPl / wEl;
  if (factor < least || factor > most) {
    comparison.report(
      'shape_factor',
      'warning',
      'wPlMajor',
      `W_pl/W_el is ${factor.toFixed(2)}; usual is ${least.toFixed(2)} to ${most.toFixed(2)}`,
    );
  }
}

function checkTorsion(comparison: Comparison, d: SectionDimensions, j: number): void {
  const value = comparison.get('j');
  if (value === undefined) return;
  if (d.shape === 'rhs' || d.shape === 'shs' || d.shape === 'chs') {
    comparison.check('torsion', 'j', j, 'I_t = 4 A² t/p + p t³/3', TUBE_TORSION);
  } else if (d.shape === 'i') {
    const strips = (2 * d.b * d.tf ** 3 + (d.h - 2 * d.tf) * d.tw ** 3) / 3;
    if (value < 0.97 * strips || value > 1.8 * strips) {
      const cause = slipCause(value / j, TABULATED.j.power);
      comparison.findings.push({
        rule: 'torsion',
        severity: cause === null ? 'warning' : 'error',
        property: 'j',
        expected: j,
        formula: 'I_t from the dimensions',
        cause,
      });
    }
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
  const computed = sectionProperties(d);
  const comparison = new Comparison(tabulated, options.rounding ?? {});
  const above = options.rootRadiusKnown ? 0 : WITHOUT_ROOTS;
  const pick = (name: 'area' | 'iMajor' | 'iMinor', isRight: boolean) =>
    (isRight ? comparison.get(name) : undefined) ?? computed[name];

  const isAreaRight = comparison.check('area', 'area', computed.area, 'A from the dimensions', {
    ...AREA,
    above,
  });
  const area = pick('area', isAreaRight);
  comparison.check('mass', 'mass', options.density * area, `m = ${options.density} kg/m³ · A`, MASS);

  const isTimber = d.shape === 'rectangle';
  const majorLimits = isTimber ? TIMBER_I : { ...I_MAJOR, above };
  const minorLimits = isTimber ? TIMBER_I : { ...I_MINOR, above };
  const areAxesRight = checkAxes(comparison, d, computed, majorLimits.warning);
  const isMajorRight =
    areAxesRight &&
    comparison.check('second_moment', 'iMajor', computed.iMajor, 'I from the dimensions', majorLimits);
  const isMinorRight =
    areAxesRight &&
    comparison.check('second_moment', 'iMinor', computed.iMinor, 'I from the dimensions', minorLimits);
  const iMajor = pick('iMajor', isMajorRight);
  const iMinor = pick('iMinor', isMinorRight);

  checkModuli(comparison, d, iMajor / (depthOf(d) / 2));
  const isExchanged = comparison.findings.some(({ rule }) => rule === 'plastic_below_elastic');
  if (!isExchanged) {
    comparison.check('plastic_modulus', 'wPlMajor', computed.wPlMajor, 'W_pl from the dimensions', {
      ...PLASTIC,
      above,
    });
  }
  if (d.shape !== 'channel') {
    comparison.check('elastic_modulus', 'wElMinor', iMinor / (widthOf(d) / 2), 'W_el = I/(b/2)', ELASTIC);
  }
  comparison.check('gyration', 'rMajor', Math.sqrt(iMajor / area), 'i = √(I/A)', GYRATION);
  comparison.check('gyration', 'rMinor', Math.sqrt(iMinor / area), 'i = √(I/A)', GYRATION);
  checkTorsion(comparison, d, computed.j);
  if (d.shape === 'i' && areAxesRight) {
    comparison.check(
      'warping',
      'iw',
      (iMinor * (d.h - d.tf) ** 2) / 4,
      'I_w = I minor (h − t_f)²/4',
      WARPING,
    );
  }
  return comparison.findings;
}
