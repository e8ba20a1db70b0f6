import { type CheckRow, type DeflectionLimit, deflectionId } from '../check/index';
import { type Combination, type Region, regionsOf } from '../combination/index';
import type { Tree } from '../template/index';
import { placeOf } from './extreme';
import type { Field } from './field';
import type { Fields } from './fields';
import type { Spot } from './lettered-beam';
import { cited, formula, type Head, leaf, sourceOf } from './node';
import type { SectionTraces } from './section';
import type { Acting, Measure, Part, SubjectCriteria, Trace } from './types';

type CombinedActing = Extract<Acting, { kind: 'combination' }>;
type CriteriaSource = DeflectionLimit['source'];

/** What a check compares, down to the loads, the section's row, the material and the clause. */
export class CheckTraces {
  constructor(
    private readonly fields: Fields,
    private readonly section: SectionTraces,
    private readonly criteria: SubjectCriteria,
  ) {}

  ratio(row: CheckRow): Trace {
    const [demand, capacity] = [this.demand(row), this.capacity(row)];
    return formula(
      { label: `Utilisation: ${row.title}`, symbol: '\\eta', value: row.ratio, measure: 'ratio' },
      { method: 'check', tree: ['/', demand.symbol, capacity.symbol], note: 'The check is met up to 1.00.' },
      () => [
        { name: demand.symbol, trace: demand },
        { name: capacity.symbol, trace: capacity },
      ],
    );
  }

  demand(row: CheckRow): Trace {
    if (row.kind === 'deflection') return this.movement(row);
    const isBending = row.kind === 'bending';
    const action = this.governing(row, isBending ? 'moment' : 'shear');
    const property = isBending ? this.section.elasticModulus() : this.section.shearAreaAtAxis();
    return formula(
      {
        label: row.title,
        symbol: isBending ? '\\sigma' : '\\tau',
        value: row.demand,
        measure: 'stress',
      },
      {
        method: 'check',
        tree: ['/', ['abs', action.symbol], property.symbol],
        sources: [cited(isBending ? 'Navier’s formula' : 'Jourawski’s formula')],
      },
      () => [
        { name: action.symbol, trace: action },
        { name: property.symbol, trace: property },
      ],
    );
  }

  capacity(row: CheckRow): Trace {
    if (row.kind === 'deflection') return this.limit(row);
    const { bending, shear, source } = this.criteria.document.strength;
    const isBending = row.kind === 'bending';
    return formula(
      { label: `Limit: ${row.title.toLowerCase()}`, symbol: 'k\\,f', value: row.capacity, measure: 'stress' },
      { method: 'check', tree: ['*', 'k', 'f'] },
      () => [
        {
          name: 'k',
          trace: this.fromCriteria('Share of the strength', 'k', isBending ? bending : shear, source),
        },
        {
          name: 'f',
          trace: isBending ? this.section.bendingStrength() : this.section.shearStrength(),
        },
      ],
    );
  }

  /** The largest of either sign, over all combinations and patterns. */
  private governing(row: CheckRow, quantity: 'moment' | 'shear'): Trace {
    const { strength } = this.criteria;
    const acting = this.acting(row, strength);
    const spot = placeOf(this.fields, quantity, row.at, acting);
    const field = this.fields.of(acting);
    const [left, right] = [field.at(quantity, spot, 'left'), field.at(quantity, spot, 'right')];
    const there = Math.abs(right.value) > Math.abs(left.value) ? right : left;
    const name = quantity === 'moment' ? 'Governing moment' : 'Governing shear';
    return formula(
      { ...headOf(there), label: `${name}, ${row.place}` },
      {
        method: 'extreme',
        tree: there.symbol,
        note: `The largest of either sign over ${strength.length} combinations and their patterns.`,
      },
      () => placed(there, spot),
    );
  }

  private movement(row: CheckRow): Trace {
    const { limit, region } = this.limitOf(row);
    const acting = this.acting(row, [limit.combination], limit.source);
    const field = this.fields.of(acting);
    const chord = chordOf(field, region);
    const spot = placeOf(this.fields, 'deflection', row.at, acting, chord?.slope ?? null);
    const there = field.at('deflection', spot, 'left');
    const relative = chord ? fromChord(there, spot, chord) : there;
    return formula(
      { label: `${row.title}, ${row.place}`, symbol: '|\\delta|', value: row.demand, measure: 'deflection' },
      {
        method: 'check',
        tree: ['abs', relative.symbol],
        note: 'The most of either sign in this part of the beam.',
      },
      () => placed(relative, spot),
    );
  }

  private limit(row: CheckRow): Trace {
    const { limit, region } = this.limitOf(row);
    const { span_ratio, overhang_factor, overhang_ratio, cap, source } = limit;
    const isSpan = region.kind === 'span';
    const ratio = this.fromCriteria('Ratio of the limit', 'n', isSpan ? span_ratio : overhang_ratio, source);
    const factor =
      isSpan || overhang_factor === 1
        ? null
        : this.fromCriteria('Factor of an overhang’s length', 'c', overhang_factor, source);
    const most =
      cap === undefined
        ? null
        : this.fromCriteria('Largest movement in any case', 'c_{max}', cap, source, 'deflection');
    const byRatio = ['/', factor ? (['*', 'c', 'L'] as const) : 'L', 'n'] as const;
    return formula(
      { label: `Limit: ${limit.name}`, symbol: '\\delta_{lim}', value: row.capacity, measure: 'deflection' },
      { method: 'check', tree: most ? ['min', byRatio, most.symbol] : byRatio },
      () => [
        { name: 'L', trace: this.fields.all().beam.distance(region.from, region.to) },
        { name: 'n', trace: ratio },
        ...(factor ? [{ name: 'c', trace: factor }] : []),
        ...(most ? [{ name: most.symbol, trace: most }] : []),
      ],
    );
  }

  private acting(
    { combination: name, pattern = [] }: CheckRow,
    combinations: readonly Combination[],
    source?: CriteriaSource,
  ): CombinedActing {
    const combination = combinations.find((one) => one.name === name) ?? { name, factors: {} };
    return { kind: 'combination', combination, pattern, ...(source && { source: sourceOf(source) }) };
  }

  private limitOf(row: CheckRow): { limit: DeflectionLimit; region: Region } {
    const { subject } = this.fields;
    for (const [index, limit] of this.criteria.limits.entries())
      for (const region of regionsOf(subject.beam))
        if (deflectionId(index, region) === row.id) return { limit, region };
    throw new RangeError(`no limit has the check ${row.id}`);
  }

  private fromCriteria(
    label: string,
    symbol: string,
    value: number,
    source: CriteriaSource,
    measure: Measure = 'ratio',
  ): Trace {
    return leaf(
      { label, symbol, value, measure },
      { kind: 'criteria', document: this.fields.criteriaName(), source: sourceOf(source) },
    );
  }
}

const headOf = ({ symbol, value, measure }: Trace): Omit<Head, 'label'> => ({ symbol, value, measure });

const placed = (there: Trace, { trace }: Spot): Part[] => [
  { name: there.symbol, trace: there },
  { name: 'x', trace },
];

type Chord = {
  readonly left: Trace | null;
  readonly right: Trace | null;
  readonly slope: Trace | null;
  readonly from: Spot;
  readonly to: Spot;
};

/** What deflections of a region are measured from; null where its supports stay where they were. */
function chordOf(field: Field, { from, to, held }: Region): Chord | null {
  const [start, end] = [field.beam.spot(from), field.beam.spot(to)];
  const read = (spot: Spot) => {
    const trace = field.at('deflection', spot, 'left');
    return trace.value === 0 ? null : trace;
  };
  const left = held === 'right' ? null : read(start);
  const right = held === 'left' ? null : read(end);
  if (!left && !right) return null;
  const chord = { left, right, slope: null, from: start, to: end };
  return held === 'both' ? { ...chord, slope: chordSlope(chord) } : chord;
}

function chordSlope({ left, right, from, to }: Chord): Trace {
  const rise: Tree = left && right ? ['-', AT_RIGHT, AT_LEFT] : right ? AT_RIGHT : ['neg', AT_LEFT];
  return formula(
    {
      label: 'Slope of the chord between the supports',
      symbol: '\\psi',
      value: ((right?.value ?? 0) - (left?.value ?? 0)) / (to.x - from.x),
      measure: 'slope',
    },
    { method: 'definition', tree: ['/', rise, ['-', 'x_1', 'x_0']] },
    () => [...ends({ left, right }), { name: 'x_1', trace: to.trace }, { name: 'x_0', trace: from.trace }],
  );
}

const AT_LEFT = '\\delta_0';
const AT_RIGHT = '\\delta_1';

const ends = ({ left, right }: Pick<Chord, 'left' | 'right'>): Part[] => [
  ...(left ? [{ name: AT_LEFT, trace: left }] : []),
  ...(right ? [{ name: AT_RIGHT, trace: right }] : []),
];

/** A deflection less that of the chord, or of the one support of an overhang, at its place. */
function fromChord(there: Trace, spot: Spot, chord: Chord): Trace {
  const { left, right, slope, from } = chord;
  const datum = (left?.value ?? 0) + (slope ? slope.value * (spot.x - from.x) : 0);
  const support = slope ? datum : (left ?? right)!.value;
  const along: Tree = ['*', '\\psi', ['-', 'x', 'x_0']];
  const fromLeft: Tree = left ? ['-', there.symbol, AT_LEFT] : there.symbol;
  const tree: Tree = slope ? ['-', fromLeft, along] : ['-', there.symbol, left ? AT_LEFT : AT_RIGHT];
  return formula(
    {
      label: `${there.label}, from ${slope ? 'the chord' : 'its support'}`,
      symbol: '\\delta_{rel}',
      value: there.value - support,
      measure: 'deflection',
    },
    { method: 'definition', tree },
    () => [
      { name: there.symbol, trace: there },
      ...ends(slope ? { left, right: null } : chord),
      ...(slope
        ? [
            { name: '\\psi', trace: slope },
            { name: 'x', trace: spot.trace },
            { name: 'x_0', trace: from.trace },
          ]
        : []),
    ],
  );
}
