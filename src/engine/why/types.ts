import type { CheckRow, Criteria, DeflectionLimit } from '../check/index';
import type { Combination } from '../combination/index';
import type { Beam } from '../model/index';
import type { Purpose, UnitSystemName } from '../quantity/index';
import type { Material, MeasuredShape, SectionDimensions } from '../section/index';
import type { Instance, Template, Tree, Values } from '../template/index';

/** A movement of the released beam for a unit value of a redundant: m/N, m/(N·m), rad/N, rad/(N·m). */
export type Compliance =
  | 'deflection_per_force'
  | 'deflection_per_moment'
  | 'rotation_per_force'
  | 'rotation_per_moment';

/** What a value measures: decides the unit and the rounding in which it is shown. */
export type Measure = Purpose | Compliance | 'acceleration';

/** Where something is printed. `fromMemory`: not yet compared with the print. */
export type Source = { readonly text: string; readonly fromMemory: boolean };

/**
 * Where a number comes from. `value` is SI, in the sense that the label names: deflections are positive down and slopes
 * clockwise, reactions up. `parts` are made when they are first read, and shared where a number is used twice.
 */
export type Trace = {
  readonly label: string;
  /** TeX; "" where it has no letter of its own. */
  readonly symbol: string;
  readonly value: number;
  readonly measure: Measure;
  readonly how: How;
  readonly parts: readonly Part[];
};

/** What a number is made of, by the letter that it has there: TeX, and a name in the formula's tree. */
export type Part = { readonly name: string; readonly trace: Trace };

export type How = Leaf | Formula | Solution | Root | SectionProperty;

/** Where a chain ends. */
export type Leaf =
  | {
      readonly kind: 'input';
      /** The parameter's symbol; EI and GA of a page without a section are inputs too. */
      readonly parameter: string;
      readonly group: string | null;
      /** Of a list, from 0. */
      readonly row: number | null;
      /** As it was typed; null for a number that came in SI. */
      readonly typed: string | null;
      readonly isDefault: boolean;
    }
  | { readonly kind: 'station' }
  | ({ readonly kind: 'row'; readonly column: string; readonly isComputed: boolean } & SectionPlace)
  | { readonly kind: 'material'; readonly material: string; readonly source: Source }
  | { readonly kind: 'criteria'; readonly document: string; readonly source: Source }
  | { readonly kind: 'constant'; readonly source: Source };

export type Method =
  | 'expression'
  | 'closed form'
  | 'definition'
  | 'sum'
  | 'equilibrium'
  | 'compatibility'
  | 'superposition'
  | 'unit load'
  | 'combination'
  | 'extreme'
  | 'check';

/** The value of `tree`, in which the parts stand by their names. */
export type Formula = {
  readonly kind: 'formula';
  readonly method: Method;
  readonly tree: Tree;
  readonly sources: readonly Source[];
  /** Printed under the formula. */
  readonly note: string;
};

/** Unknown number `of` of the equations Σ matrix[i][j]·X_j = right[i]; null for nothing. */
export type Solution = {
  readonly kind: 'solution';
  readonly of: number;
  readonly unknowns: readonly string[];
  readonly matrix: readonly (readonly (string | null)[])[];
  readonly right: readonly Tree[];
};

/** from + s, where Σ polynomial[k]·sᵏ = 0. */
export type Root = { readonly kind: 'root'; readonly from: Tree; readonly polynomial: readonly Tree[] };

/** A property of a shape, computed from its dimensions, which are the parts. */
export type SectionProperty = {
  readonly kind: 'section';
  readonly shape: MeasuredShape;
  readonly property: 'area' | 'iMajor' | 'firstMoment' | 'webThickness';
};

type SectionPlace = {
  readonly designation: string;
  /** The table's slug and its name. */
  readonly table: string;
  readonly tableName: string;
  readonly edition: number | null;
};

/** A section of a table and what it is made of. */
export type SubjectSection = SectionPlace & {
  readonly dimensions: SectionDimensions;
  readonly massKgM: number;
  readonly iMajorCm4: number;
  readonly wElCm3: number;
  /** Columns that were computed from the dimensions, not supplied. */
  readonly computed: readonly string[];
  readonly material: Material;
};

/** What a member is judged by, with what acts of its combinations on this member's loads. */
export type SubjectCriteria = {
  readonly document: Criteria;
  readonly revision: number | null;
  readonly strength: readonly Combination[];
  /** In the order of the checks' ids. */
  readonly limits: readonly DeflectionLimit[];
};

/** What numbers can be asked about: a solved template, or a member with what it is judged by. */
export type Subject = {
  readonly template: Template;
  readonly revision: number;
  readonly instance: Instance;
  readonly beam: Beam;
  /** As they were typed, by symbol; a parameter without is at its default. */
  readonly typed: Readonly<Record<string, unknown>>;
  /** As read. */
  readonly values: Values;
  readonly system: UnitSystemName;
  /** Null where EI was typed, or is the template's own. */
  readonly section: SubjectSection | null;
  readonly typedEi: string | null;
  /** Groups that act only where adverse, span by span. */
  readonly patterned: readonly string[];
  readonly criteria: SubjectCriteria | null;
};

/** Which loads act: all of them, unfactored; a group alone; or a combination with the spans of its pattern. */
export type Acting =
  | { readonly kind: 'all' }
  /** Null for what the supports do by themselves. */
  | { readonly kind: 'group'; readonly group: string | null }
  | {
      readonly kind: 'combination';
      readonly combination: Combination;
      readonly pattern: readonly number[];
      /** Where its factors are printed, if not where the criteria have a combination of this name. */
      readonly source?: Source;
    };

export type Quantity = 'shear' | 'moment' | 'slope' | 'deflection';
export type Side = 'left' | 'right';

/** A number that can be asked about. Supports by their place in the beam's list; x in m from the left end. */
export type Key =
  | {
      readonly kind: 'reaction';
      readonly support: number;
      readonly component: 'vertical' | 'moment';
      readonly acting: Acting;
    }
  | {
      readonly kind: 'value';
      readonly quantity: Quantity;
      readonly x: number;
      readonly side: Side;
      readonly acting: Acting;
    }
  /** The largest or the smallest value by the engine's signs, or one that is so near its x alone; and x itself. */
  | {
      readonly kind: 'extreme' | 'place';
      readonly quantity: Quantity;
      readonly sense: 'max' | 'min' | 'local';
      readonly x: number;
      readonly acting: Acting;
    }
  | { readonly kind: 'contraflexure'; readonly x: number; readonly acting: Acting }
  | { readonly kind: 'redundant' | 'gap'; readonly index: number }
  /** What a step of the derivation comes to, by the step's id. */
  | { readonly kind: 'step'; readonly id: string }
  | { readonly kind: 'flexibility'; readonly row: number; readonly column: number }
  | { readonly kind: 'parameter'; readonly symbol: string }
  | { readonly kind: 'load'; readonly index: number }
  | { readonly kind: 'closed form'; readonly id: string }
  | { readonly kind: 'section'; readonly property: 'ei' | 'weight' | 'elastic_modulus' | 'shear_area' }
  | { readonly kind: 'check'; readonly row: CheckRow; readonly figure: 'demand' | 'capacity' | 'ratio' };
