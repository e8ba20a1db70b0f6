import { symbolsOf } from '../chart/index';
import {
  causeTex,
  causeWords,
  flexibilityTex,
  gapTex,
  type Movements,
  movementsOf,
  nameForce,
  nameMovement,
  rightSide,
  type Unknown,
} from '../derivation/index';
import { byChart } from './charted';
import type { LetteredBeam } from './lettered-beam';
import { formula, type Head, node, Once } from './node';
import { State } from './state';
import { positive, total, treeOf } from './tree';
import type { Measure, Part, Trace } from './types';
import { byUnitLoad } from './work';

/** The redundants of a beam: its released movements, its flexibility, and the equations that they answer. */
export class Redundants {
  readonly movements: Movements;
  readonly built: State;
  readonly released: State;
  private readonly units: State[];
  private readonly once = new Once();

  constructor(readonly beam: LetteredBeam) {
    const { worked } = beam;
    const own = (index: number) => this.value(index);
    this.movements = movementsOf(worked);
    this.built = new State(beam, 'built', own);
    this.released = new State(beam, 'released', own);
    this.units = worked.unknowns.map((_, i) => new State(beam, i, own));
  }

  unit(i: number): State {
    return this.units[i]!;
  }

  /** A redundant, in its sense. */
  value(i: number): Trace {
    return this.once.get(`X ${i}`, () => (this.units.length === 1 ? this.single() : this.ofMany(i)));
  }

  /** The movement at a redundant of the released beam under the loads: against a reaction, in the sense of a moment. */
  gap(i: number): Trace {
    return this.once.get(`d ${i}`, () => {
      const { unknowns, gaps } = this.beam.worked;
      const at = unknowns[i]!;
      const head: Head = {
        label: `${nameMovement(at)} of the released beam under the loads`,
        symbol: gapTex(at),
        value: gaps[i]!,
        measure: movementMeasure(at),
      };
      const sense = at.kind === 'internal' ? 1 : -1;
      return (
        this.charted(head, this.movements.gap(i), (index) => gapTex(at, index)) ??
        byUnitLoad(head, { own: this.unit(i), other: this.released, isLoaded: true, sense })
      );
    });
  }

  /** The movement at redundant i for a unit value of redundant j, both in their sense. */
  flexibility(i: number, j: number): Trace {
    return this.once.get(`f ${i} ${j}`, () => {
      const { unknowns, flexibility } = this.beam.worked;
      const [at, unit] = [unknowns[i]!, unknowns[j]!];
      const acting = unit.kind === 'reaction' ? 'a unit reaction' : 'a unit moment';
      const head: Head = {
        label: `${nameMovement(at)} for ${acting} at ${unit.letter}`,
        symbol: flexibilityTex(at, unit),
        value: flexibility[i]![j]!,
        measure: complianceMeasure(at, unit),
      };
      return (
        this.charted(head, this.movements.flexibility(i, j), (index) => flexibilityTex(at, unit, index)) ??
        byUnitLoad(head, { own: this.unit(i), other: this.unit(j), isLoaded: false, sense: 1 })
      );
    });
  }

  /** By closed forms, where they give all of it. */
  private charted(
    head: Head,
    parts: ReturnType<Movements['gap']>,
    texOf: (index: string) => string,
  ): Trace | null {
    const charted = parts.flatMap((part) => ('expression' in part ? [part] : []));
    if (charted.length < parts.length) return null;
    const [only] = charted;
    if (only && charted.length === 1) return byChart(head, this.built, only.expression, only.terms);
    const names = charted.map(({ cause }) => texOf(causeTex(cause)));
    return formula(head, { method: 'sum', tree: total(names.map(positive)) }, () =>
      charted.map(({ cause, value, expression, terms }, k): Part => {
        const part = {
          ...head,
          label: `${head.label.replace(' under the loads', '')}, ${causeWords(cause)}`,
          symbol: names[k]!,
          value,
        };
        return { name: names[k]!, trace: byChart(part, this.built, expression, terms) };
      }),
    );
  }

  /** X = (δ − Δ)/f */
  private single(): Trace {
    const [at] = this.beam.worked.unknowns as [Unknown];
    const right = treeOf(rightSide(this.beam.worked, 0), this.beam.rank);
    const f = flexibilityTex(at, at);
    return formula(this.head(0), { method: 'compatibility', tree: ['/', right, f], note: COMPATIBLE }, () => [
      ...this.rightParts(0),
      { name: f, trace: this.flexibility(0, 0) },
    ]);
  }

  private ofMany(i: number): Trace {
    const { worked, rank } = this.beam;
    const { unknowns, flexibility } = worked;
    const matrix = unknowns.map((at, row) =>
      unknowns.map((unit, column) => (flexibility[row]![column] === 0 ? null : flexibilityTex(at, unit))),
    );
    const right = unknowns.map((_, row) => treeOf(rightSide(worked, row), rank));
    const names = unknowns.map(({ tex }) => tex);
    return node(this.head(i), { kind: 'solution', of: i, unknowns: names, matrix, right }, () => [
      ...unknowns.flatMap((_, row) => this.rightParts(row)),
      ...matrix.flatMap((row, r) =>
        row.flatMap((name, c): Part[] => (name === null ? [] : [{ name, trace: this.flexibility(r, c) }])),
      ),
    ]);
  }

  private rightParts(i: number): Part[] {
    const { worked } = this.beam;
    const gap = gapTex(worked.unknowns[i]!);
    return symbolsOf(rightSide(worked, i)).map((name) => ({
      name,
      trace: name === gap ? this.gap(i) : this.beam.given(name),
    }));
  }

  private head(i: number): Head {
    const { unknowns, values } = this.beam.worked;
    const at = unknowns[i]!;
    return {
      label: `${nameForce(at)}, a redundant`,
      symbol: at.tex,
      value: values[i]!,
      measure: at.kind === 'reaction' ? 'reaction' : 'moment',
    };
  }
}

const COMPATIBLE = 'Its movement and the released beam’s must add up to that of its support.';

const movementMeasure = ({ kind }: Unknown): Measure => (kind === 'reaction' ? 'deflection' : 'slope');

const complianceMeasure = (at: Unknown, unit: Unknown): Measure =>
  `${at.kind === 'reaction' ? 'deflection' : 'rotation'}_per_${unit.kind === 'reaction' ? 'force' : 'moment'}`;
