import type { DimensionName } from '../quantity/index';

/** What the elastic checks ask of a section and its material. SI: m³, m², Pa. */
export type ElasticSection = {
  readonly designation: string;
  /** The smaller elastic modulus about the major axis. */
  readonly elasticModulus: number;
  /** I·t/Q where the shear stress is greatest: 2/3 A of a rectangle. */
  readonly shearAreaAtAxis: number;
  /** Yield strength of steel, f_m,k or F_b of timber. */
  readonly bendingStrength: number;
  /** Yield strength of steel in shear, f_y/√3; f_v,k or F_v of timber. */
  readonly shearStrength: number;
};

export type CheckKind = 'bending' | 'shear' | 'deflection';

/** One judged figure. `ratio` = demand/capacity, unrounded; it passes at ratio ≤ 1. `at`: m from the left end. */
export type CheckRow = {
  readonly id: string;
  readonly kind: CheckKind;
  readonly title: string;
  /** Where and under what: "at A, 1.35 G + 1.5 Q, span A–B loaded". */
  readonly place: string;
  readonly clause: string;
  readonly demand: number;
  readonly capacity: number;
  readonly dimension: DimensionName;
  readonly ratio: number;
  readonly combination: string;
  /** Indices of the loaded pattern spans; in results of engine 1.0.0 all loads act everywhere, and it is not given. */
  readonly pattern?: readonly number[];
  readonly at: number;
  readonly symbols: string;
  readonly numbers: string;
};

/** Something that no ratio judges and that must not be missed, such as a support that is pulled up. */
export type Finding = {
  readonly id: string;
  readonly title: string;
  readonly detail: string;
  readonly at: number;
  /** The loads under which it is so; not given in results of engine 1.0.0. */
  readonly combination?: string;
  readonly pattern?: readonly number[];
};

export type MemberChecks = {
  /** Governing first. */
  readonly rows: readonly CheckRow[];
  readonly findings: readonly Finding[];
  readonly notChecked: readonly string[];
};
