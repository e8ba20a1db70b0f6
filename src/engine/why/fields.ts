import {
  type Combination,
  cutLoads,
  factorOf,
  LOAD_GROUP_NAMES,
  LOAD_GROUPS,
  regionsOf,
  supportsMove,
} from '../combination/index';
import { CaseField } from './case-field';
import { CombinedField, type Share } from './combined-field';
import type { Field } from './field';
import { Givens } from './givens';
import { type CaseLoad, LetteredBeam } from './lettered-beam';
import { cited, constant, leaf, sourceOf } from './node';
import { Redundants } from './redundants';
import type { Acting, Source, Subject, Trace } from './types';

type Combined = Extract<Acting, { kind: 'combination' }>;
/** A load case that combinations are made of. */
type Elementary = {
  readonly group: string | null;
  readonly span: number | null;
  readonly loads: readonly CaseLoad[];
};

/** The subject's beam under any loads that act at once; each made when it is first asked for. */
export class Fields {
  readonly givens: Givens;
  private readonly made = new Map<string, Field>();
  private whole: CaseField | null = null;

  constructor(readonly subject: Subject) {
    this.givens = new Givens(subject);
  }

  /** All loads, unfactored, with the supports' own movements. */
  all(): CaseField {
    this.whole ??= this.caseOf(this.loads(), true);
    return this.whole;
  }

  of(acting: Acting): Field {
    if (acting.kind === 'all') return this.all();
    const key = acting.kind === 'group' ? ['group', acting.group] : [acting.combination, acting.pattern];
    return this.once(JSON.stringify(key), () =>
      acting.kind === 'group'
        ? this.caseOf(
            this.loads().filter(({ load }) => load.group === acting.group),
            acting.group === null,
          )
        : this.combined(acting),
    );
  }

  private loads(): CaseLoad[] {
    return this.subject.beam.loads.map((load, index) => ({ load, index }));
  }

  private caseOf(loads: readonly CaseLoad[], moves: boolean): CaseField {
    return new CaseField(new Redundants(new LetteredBeam(this.givens, loads, moves)));
  }

  private combined({ combination, pattern, source }: Combined): CombinedField {
    const printed = source ?? this.printedWith(combination.name);
    const shares = this.elementary().flatMap(({ group, span, loads }): Share[] => {
      const factor = group === null ? 1 : factorOf(combination, group);
      if (factor === 0 || (span !== null && !pattern.includes(span))) return [];
      const field = this.once(JSON.stringify(['elementary', group, span]), () =>
        this.caseOf(loads, group === null),
      );
      return [
        {
          index: this.indexOf(group, span),
          words: this.wordsOf(group, span),
          factor:
            group === null
              ? unfactored()
              : this.factor({ value: factor, group, combination, source: printed }),
          field,
        },
      ];
    });
    return new CombinedField(this.all().beam, combination.name, shares);
  }

  /** The supports’ movements, whole groups, and patterned groups span by span. */
  private elementary(): Elementary[] {
    const { beam, patterned } = this.subject;
    const spans = regionsOf(beam);
    const found = new Map<string, Elementary>();
    for (const { load, index } of this.loads()) {
      const group = load.group ?? '';
      const parts = patterned.includes(group) ? cutLoads([load], spans) : [{ load, span: null }];
      for (const { load: part, span } of parts) {
        const key = JSON.stringify([group, span]);
        const loads = [...(found.get(key)?.loads ?? []), { load: part, index }];
        found.set(key, { group, span, loads });
      }
    }
    const moving: Elementary[] = supportsMove(beam) ? [{ group: null, span: null, loads: [] }] : [];
    return [...moving, ...found.values()];
  }

  private factor({
    value,
    group,
    combination,
    source,
  }: {
    readonly value: number;
    readonly group: string;
    readonly combination: Combination;
    readonly source: Source;
  }): Trace {
    return leaf(
      {
        label: `Factor of ${groupWords(group)}, in ${combination.name}`,
        symbol: `\\gamma_{\\mathrm{${group}}}`,
        value,
        measure: 'ratio',
      },
      { kind: 'criteria', document: this.criteriaName(), source },
    );
  }

  /** Where the criteria have a combination from. */
  private printedWith(name: string): Source {
    const { criteria } = this.subject;
    if (criteria?.strength.some((combination) => combination.name === name)) {
      const { basis, source } = criteria.document.strength;
      return { text: basis, fromMemory: source.from_memory };
    }
    const limit = criteria?.limits.find(({ combination }) => combination.name === name);
    return limit ? sourceOf(limit.source) : cited('');
  }

  criteriaName(): string {
    const { criteria } = this.subject;
    if (!criteria) return '';
    const { reference, name } = criteria.document;
    return `${reference}, ${name}${criteria.revision === null ? '' : `, revision ${criteria.revision}`}`;
  }

  private indexOf(group: string | null, span: number | null): string {
    if (group === null) return 'movements';
    const region = span === null ? undefined : regionsOf(this.subject.beam)[span];
    return region
      ? `${group},${region.name.replace(/^(span|overhang beyond) /, '').replace('–', '')}`
      : group;
  }

  private wordsOf(group: string | null, span: number | null): string {
    const region = span === null ? undefined : regionsOf(this.subject.beam)[span];
    return region ? `${groupWords(group)}, ${region.name}` : groupWords(group);
  }

  private once<T extends Field>(key: string, make: () => T): Field {
    const found = this.made.get(key) ?? make();
    this.made.set(key, found);
    return found;
  }
}

const unfactored = (): Trace =>
  constant(
    {
      label: 'Movements of supports act unfactored',
      symbol: '\\gamma_{\\Delta}',
      value: 1,
      measure: 'ratio',
    },
    'Putlog',
  );

/** "G, permanent". */
export function groupWords(group: string | null): string {
  if (group === null) return 'the supports’ own movements';
  const known = LOAD_GROUPS.find((one) => one === group);
  return known ? `${known}, ${LOAD_GROUP_NAMES[known]}` : group;
}
