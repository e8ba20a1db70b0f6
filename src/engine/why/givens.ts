import { type Load, letteredSupports } from '../model/index';
import { formatFor } from '../quantity/index';
import { type Expression, evaluateTruth, type Template } from '../template/index';
import { constant, formula, type Head, Once } from './node';
import { type Context, ofGroup, ParameterTraces } from './parameters';
import type { Measure, Subject, Trace } from './types';

type BeamTemplate = Template['beam'];
type SizeKey = 'p' | 'm' | 'w0' | 'w1' | 'kappa';

const SIZES: Readonly<Record<SizeKey, { label: string; measure: Measure }>> = {
  p: { label: 'Point load', measure: 'force' },
  m: { label: 'Couple', measure: 'moment' },
  w0: { label: 'Line load', measure: 'line_load' },
  w1: { label: 'Line load at its right end', measure: 'line_load' },
  kappa: { label: 'Free curvature', measure: 'curvature' },
};

/** Places on the beam nearer than this part of its length are one. */
const SAME_PLACE = 1e-10;

/** What the beam is given: its places, loads, supports and stiffness, as the template writes them. */
export class Givens {
  readonly parameters: ParameterTraces;
  private readonly supports: BeamTemplate['supports'];
  private readonly hinges: NonNullable<BeamTemplate['hinges']>;
  private readonly once = new Once();

  constructor(readonly subject: Subject) {
    this.parameters = new ParameterTraces(subject);
    const { supports, hinges = [] } = subject.template.beam;
    const { scope } = subject.instance;
    const isOn = ({ when }: { when?: Expression | undefined }) => !when || evaluateTruth(when.tree, scope);
    this.supports = supports.filter(isOn);
    this.hinges = hinges.filter(isOn);
  }

  /** "at B", "at 2.700 m". */
  placeWords(x: number): string {
    const { beam, system } = this.subject;
    const found = letteredSupports(beam).find(({ support }) => this.isSame(support.at, x));
    return found ? `at ${found.letter}` : `at ${formatFor(x, 'position', system)}`;
  }

  /** A place that the template gives; null for any other. */
  position(x: number): Trace | null {
    const written = this.writtenAt(x);
    if (!written) return null;
    return this.once.get(`x ${x}`, () =>
      typeof written === 'string'
        ? constant({ label: written, symbol: 'x', value: 0, measure: 'position' }, 'Positions start there')
        : this.parameters.expression(written.expression, written.context, {
            label: `Position ${this.placeWords(x).replace(/^at /, 'of ')}`,
            symbol: 'x',
            measure: 'position',
          }),
    );
  }

  /** The size of a load of the beam, by its place in the beam's list. */
  loadSize(index: number, key: SizeKey): Trace {
    const { instance } = this.subject;
    const share = instance.shares[index];
    if (!share) return this.ownWeight();
    const { template, group, row } = share;
    const context: Context = { scope: share.share, group, row: rowOf(template.repeat, row) };
    const { tex } = instance.loadNames[index]!;
    const { label, measure } = SIZES[key];
    const expression = (template as unknown as Readonly<Record<SizeKey, Expression>>)[key];
    return this.parameters.expression(expression, context, {
      label: `${label}, ${group}`,
      symbol: tex === '' ? '' : ofGroup(tex, group),
      measure,
    });
  }

  /** The stiffness of a support's spring. */
  spring(support: number, component: 'kv' | 'kr'): Trace {
    const letter = this.letterOf(support);
    return this.parameters.expression(this.written(support, component), this.parameters.whole, {
      label: `${component === 'kv' ? 'Spring' : 'Rotational spring'} at ${letter}`,
      symbol: component === 'kv' ? `k_{${letter}}` : `k_{\\theta ${letter}}`,
      measure: component === 'kv' ? 'spring' : 'rotational_spring',
    });
  }

  /** A support's settlement, down, or its turn, anticlockwise. */
  supportMovement(support: number, component: 'rise' | 'rotation'): Trace {
    const letter = this.letterOf(support);
    const { tree, text } = this.written(support, component);
    const isTurn = component === 'rotation';
    const down = typeof tree === 'object' && tree[0] === 'neg' ? (tree[1] ?? 0) : (['neg', tree] as const);
    return this.parameters.expression({ text, tree: isTurn ? tree : down }, this.parameters.whole, {
      label: isTurn ? `Turn of the support at ${letter}` : `Settlement at ${letter}`,
      symbol: isTurn ? `\\varphi_{${letter}}` : `\\Delta_{${letter}}`,
      measure: isTurn ? 'slope' : 'deflection',
    });
  }

  /** EI of a segment: the member's, or a share of it. */
  stiffness(segment: number, symbol: string): Trace {
    const ei = this.parameters.symbol('EI', this.parameters.whole);
    const share = this.subject.template.beam.segments?.[segment]?.ei;
    if (!share) return ei;
    const part = this.parameters.expression(share, this.parameters.whole, {
      label: 'Share of EI',
      symbol: '\\eta',
      measure: 'ratio',
    });
    const head: Head = {
      label: 'Bending stiffness of the segment',
      symbol,
      value: ei.value * part.value,
      measure: 'bending_stiffness',
    };
    return formula(head, { method: 'definition', tree: ['*', '\\eta', 'EI'] }, () => [
      { name: '\\eta', trace: part },
      { name: 'EI', trace: ei },
    ]);
  }

  isSame(a: number, b: number): boolean {
    return Math.abs(a - b) <= SAME_PLACE * this.subject.beam.length;
  }

  /** The section's own weight across the beam. */
  private ownWeight(): Trace {
    const weight = this.parameters.section?.weight();
    if (!weight) throw new RangeError('an own weight comes from a section');
    const across = this.subject.template.beam.own_weight;
    if (!across) return weight;
    const part = this.parameters.expression(across, this.parameters.whole, {
      label: 'Share that acts across the beam',
      symbol: '\\eta',
      measure: 'ratio',
    });
    const head: Head = { ...weight, label: 'Own weight across the beam', value: weight.value * part.value };
    return formula(head, { method: 'definition', tree: ['*', 'w', '\\eta'] }, () => [
      { name: 'w', trace: weight },
      { name: '\\eta', trace: part },
    ]);
  }

  /** What the template writes at a place, or what the place is called. */
  private writtenAt(x: number): string | { expression: Expression; context: Context } | null {
    const { whole } = this.parameters;
    const { beam, template, instance } = this.subject;
    if (this.isSame(0, x)) return 'The left end';
    const support = beam.supports.findIndex(({ at }) => this.isSame(at, x));
    if (support >= 0) return { expression: this.supports[support]!.at, context: whole };
    if (this.isSame(beam.length, x)) return { expression: template.beam.length, context: whole };
    const hinge = beam.hinges.findIndex((at) => this.isSame(at, x));
    const at = this.hinges[hinge]?.at;
    if (at) return { expression: at, context: whole };
    const segment = beam.segments.findIndex(({ to }) => this.isSame(to, x));
    const to = template.beam.segments?.[segment]?.to;
    if (to) return { expression: to, context: whole };
    for (const [index, share] of instance.shares.entries()) {
      const key = placesOf(beam.loads[index]!).find(([, place]) => this.isSame(place, x))?.[0];
      if (!key) continue;
      const expression = (share.template as unknown as Readonly<Record<string, Expression>>)[key]!;
      return {
        expression,
        context: { scope: share.place, group: null, row: rowOf(share.template.repeat, share.row) },
      };
    }
    return null;
  }

  private written(support: number, key: 'kv' | 'kr' | 'rise' | 'rotation'): Expression {
    const expression = this.supports[support]?.[key];
    if (!expression) throw new RangeError(`support ${support} has no ${key}`);
    return expression;
  }

  private letterOf(support: number): string {
    return letteredSupports(this.subject.beam).find(({ index }) => index === support)?.letter ?? '';
  }
}

const rowOf = (parameter: string | undefined, row: number | undefined): Context['row'] =>
  parameter === undefined || row === undefined ? null : { parameter, index: row - 1 };

const placesOf = (load: Load): [string, number][] =>
  'at' in load
    ? [['at', load.at]]
    : [
        ['from', load.from],
        ['to', load.to],
      ];
