import type { Extremes, Reaction, Solution } from '../beam/index';
import type { CheckRow, Finding, Pattern } from '../check/index';
import type { Combination, GroupLetters } from '../combination/index';
import type { DerivationStep } from '../derivation/index';
import type { CombinationEnvelope, EnvelopeReaction, GroupReaction } from '../envelope/index';
import type { Beam } from '../model/index';
import type { UnitSystemName } from '../quantity/index';
import type { Dimensioned, NamedLoad, RuleOutcome, Template } from '../template/index';

/** What a sheet is made from: what was stored with a member, and the documents that it pins. SI, the engine's signs. */
export type SheetInput = {
  readonly system: UnitSystemName;
  readonly purpose: string;
  /** Codes, loads and limits of the job, in words. */
  readonly basis: string;
  readonly template: {
    readonly reference: string;
    readonly name: string;
    readonly revision: number;
    readonly parameters: Template['parameters'];
  };
  /** By symbol, as typed. */
  readonly parameters: Readonly<Record<string, unknown>>;
  readonly ownWeight: { readonly acts: boolean; readonly reason: string };
  /** Whether groups that the criteria say so act only where adverse; why not, where that is switched off. */
  readonly patterns: { readonly act: boolean; readonly reason: string };
  readonly section: SheetSection | null;
  readonly criteria: {
    readonly name: string;
    readonly revision: number;
    /** What the factors of the strength combinations stand for. */
    readonly basis: string;
    readonly combinations: readonly Combination[];
    readonly letters: GroupLetters;
    readonly patterns: readonly Pattern[];
  } | null;
  readonly result: SheetResult;
  readonly cautions: readonly SheetCaution[];
};

type SheetSection = {
  readonly designation: string;
  readonly table: string;
  readonly edition: number;
  readonly material: { readonly name: string; readonly e: number; readonly source: string };
  /** Columns of the row that were computed from its dimensions, not supplied. */
  readonly computed: readonly string[];
  /** What the checks take for granted of such a section. */
  readonly cautions: readonly string[];
};

export type SheetCaution = { readonly title: string; readonly text: string; readonly version: number };

type Found = { readonly reactions: readonly Reaction[]; readonly extremes: Extremes };
/** A combination over all its patterns. */
type Combined = Pick<CombinationEnvelope, 'combination' | 'extremes'> & {
  readonly reactions: readonly Omit<EnvelopeReaction, 'groups'>[];
};

/** The part of a stored result that is printed. */
type SheetResult = {
  readonly beam: Beam;
  readonly ei: number;
  readonly section: {
    readonly selfWeight: number;
    readonly depth: number;
    readonly elastic: {
      readonly elasticModulus: number;
      readonly shearAreaAtAxis: number;
      readonly bendingStrength: number;
      readonly shearStrength: number;
    };
  } | null;
  readonly lengths: readonly Dimensioned[];
  readonly load_names: readonly NamedLoad[];
  readonly total: Solution;
  readonly groups: readonly { readonly group: string; readonly solution: Found }[];
  readonly group_reactions: readonly Readonly<Record<string, GroupReaction>>[];
  readonly strength: readonly Combined[];
  readonly service: readonly (Combined & { readonly limit: { readonly name: string } })[];
  readonly patterning: { readonly groups: readonly string[]; readonly arrangements: number };
  readonly checks: {
    readonly rows: readonly CheckRow[];
    readonly findings: readonly Finding[];
    readonly not_checked: readonly string[];
  } | null;
  readonly rules: readonly RuleOutcome[];
  readonly proof: {
    readonly equilibrium: number;
    readonly compatibility: number;
    readonly agreement: number;
    readonly arrangements: number;
  };
  readonly derivation?: readonly DerivationStep[];
};

/** Text, or a letter as TeX. */
export type Cell = string | { readonly tex: string };

/** A figure of the result column: its letter as TeX, its value, and the unit that it is never parted from. */
export type SheetFigure = { readonly letter?: string; readonly value: string; readonly unit: string };

export type SheetColumn = {
  readonly title: Cell;
  readonly unit?: string;
  /** A column of figures stands to the right. */
  readonly figures?: boolean;
};

export type SheetRow = { readonly cells: readonly Cell[]; readonly strong?: boolean };

/** What stands beside a block: where it comes from, and what it comes to. */
type Beside = { readonly source?: string; readonly results?: readonly SheetFigure[] };

/** A part of the working that is not divided between pages; a table is divided between its rows. */
export type SheetBlock = Beside &
  (
    | { readonly kind: 'heading'; readonly number: number; readonly title: string }
    | {
        readonly kind: 'text' /** An index is written as f_{y}. */;
        readonly text: string;
        readonly tone?: 'note' | 'warning';
      }
    | {
        readonly kind: 'table';
        readonly name: string;
        readonly columns: readonly SheetColumn[];
        readonly rows: readonly SheetRow[];
      }
    | {
        readonly kind: 'drawing';
        readonly beam: Beam;
        readonly solution: Solution;
        readonly lengths: readonly Dimensioned[];
        readonly loads: readonly NamedLoad[];
        readonly depth?: number;
      }
    | {
        readonly kind: 'formula';
        readonly title: string;
        /** The published closed forms that it uses. */
        readonly origin?: string;
        readonly symbols: string;
        readonly numbers: string;
        readonly note?: string;
      }
    | { readonly kind: 'checks'; readonly rows: readonly JudgedRow[] }
    | { readonly kind: 'list'; readonly items: readonly string[] }
    | { readonly kind: 'caution'; readonly text: string; readonly version: number }
  );

export type JudgedRow = {
  readonly title: string;
  readonly place: string;
  readonly clause: string;
  readonly demand: string;
  readonly capacity: string;
  readonly ratio: number;
};
