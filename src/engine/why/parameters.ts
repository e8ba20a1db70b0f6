import { DIMENSIONS, type Dimension, equalDimensions } from '../quantity/index';
import {
  dimensionOf,
  type Expression,
  evaluateNumber,
  evaluateTruth,
  isRows,
  type Parameter,
  type QuantityParameter,
  rowsOf,
  ruleKinds,
  type Scope,
  symbolsOf,
  type Tree,
  within,
} from '../template/index';
import { constant, formula, type Head, leaf, Once, renamed } from './node';
import { SectionTraces } from './section';
import { positive, total, withNames } from './tree';
import type { Measure, Part, Subject, Trace } from './types';

/** The values in force for an expression: of all loads or of one group's share, in a row of a list or in none. */
export type Context = {
  readonly scope: Scope;
  readonly group: string | null;
  readonly row: { readonly parameter: string; readonly index: number } | null;
};

const MEASURES = {
  position: DIMENSIONS.length,
  force: DIMENSIONS.force,
  moment: DIMENSIONS.moment,
  line_load: DIMENSIONS.line_load,
  area_load: DIMENSIONS.area_load,
  bending_stiffness: DIMENSIONS.bending_stiffness,
  curvature: DIMENSIONS.curvature,
} as const satisfies Partial<Record<Measure, Dimension>>;

/** What was typed, and what the template derives from it. */
export class ParameterTraces {
  readonly whole: Context;
  readonly section: SectionTraces | null;
  private readonly once = new Once();

  constructor(readonly subject: Subject) {
    this.whole = { scope: subject.instance.scope, group: null, row: null };
    this.section = subject.section && new SectionTraces(subject.section);
  }

  /** A parameter, a column of a row, a derived value or EI. */
  symbol(symbol: string, context: Context): Trace {
    if (symbol === 'EI') return this.once.get(symbol, () => this.stiffness());
    const { group, row } = context;
    return this.once.get(JSON.stringify([symbol, group, row]), () => this.makeSymbol(symbol, context));
  }

  /** What an expression of the template comes to; of a bare symbol, that itself. */
  expression(
    { text, tree: written }: Expression,
    context: Context,
    head: Omit<Head, 'value' | 'measure'> & { readonly measure?: Measure },
  ): Trace {
    const { tree, chosen, rows } = this.settled(written, context);
    if (typeof tree === 'string') return this.symbol(tree, context);
    const measure = head.measure ?? this.measureOf(written);
    const value = evaluateNumber(written, context.scope);
    const traceOf = (name: string) => this.named(name, context, rows);
    const nameOf = (name: string) => traceOf(name).symbol;
    if (typeof tree === 'number') return constant({ ...head, measure, value }, this.templateName());
    return formula(
      { ...head, measure, value },
      {
        method: 'expression',
        tree: withNames(tree, nameOf),
        sources: [{ text: this.templateName(), fromMemory: false }],
        note: [`In the template: ${text}.`, ...chosen].join(' '),
      },
      () => [...symbolsOf(tree)].map((name): Part => ({ name: nameOf(name), trace: traceOf(name) })),
    );
  }

  /** EI of the member: typed, the template's own, or the section's. */
  stiffness(): Trace {
    if (this.section) return this.section.stiffness();
    const { typedEi, instance, template } = this.subject;
    return leaf(
      { label: 'Bending stiffness', symbol: 'EI', value: instance.ei, measure: 'bending_stiffness' },
      inputOf('EI', { typed: typedEi ?? template.stiffness.default_ei, isDefault: typedEi === null }),
    );
  }

  shearStiffness(value: number): Trace {
    return leaf(
      { label: 'Shear stiffness', symbol: 'GA', value, measure: 'shear_stiffness' },
      inputOf('GA', { typed: null, isDefault: false }),
    );
  }

  templateName(): string {
    const { template, revision } = this.subject;
    return `${template.reference}, ${template.name}, revision ${revision}`;
  }

  private makeSymbol(symbol: string, context: Context): Trace {
    const { parameters, derived } = this.subject.template;
    if (context.row) {
      const { parameter: list, index } = context.row;
      const column = this.columnOf(list, symbol);
      if (column) return this.cell(list, column, index);
    }
    const parameter = parameters.find((one) => one.symbol === symbol);
    if (parameter?.kind === 'quantity') return this.quantity(parameter, context.group);
    const found = derived.find((one) => one.symbol === symbol);
    if (!found) throw new RangeError(`${symbol} is no number of the template`);
    return this.expression(found.expression, context, { label: found.name, symbol: found.tex });
  }

  private quantity(parameter: QuantityParameter, group: string | null): Trace {
    const { symbol, name, tex, dimension, group: own } = parameter;
    const given = this.subject.values[symbol];
    if (own === undefined || given === undefined || isRows(given))
      return this.typed(parameter, Number(given), null);
    const parts = typeof given === 'object' ? given : { [own]: Number(given) };
    const groups = Object.keys(parts);
    const [only] = groups;
    if (only !== undefined && groups.length === 1 && (group ?? only) === only)
      return renamed(this.typed(parameter, parts[only]!, only), { symbol: tex });
    if (group !== null) return this.typed(parameter, parts[group] ?? 0, group);
    const value = groups.reduce((sum, one) => sum + parts[one]!, 0);
    return formula(
      { label: `${name}, all groups`, symbol: tex, value, measure: dimension },
      { method: 'sum', tree: total(groups.map((one) => positive(ofGroup(tex, one)))) },
      () =>
        groups.map((one) => ({ name: ofGroup(tex, one), trace: this.typed(parameter, parts[one]!, one) })),
    );
  }

  private typed(parameter: QuantityParameter, value: number, group: string | null): Trace {
    const { symbol, name, tex, dimension } = parameter;
    const given = this.subject.typed[symbol];
    const text = textIn(given ?? parameter.default, group);
    return leaf(
      {
        label: group === null ? name : `${name}, ${group}`,
        symbol: group === null ? tex : ofGroup(tex, group),
        value,
        measure: dimension,
      },
      inputOf(symbol, { group, typed: text, isDefault: given === undefined || text === parameter.default }),
    );
  }

  private columnOf(list: string, symbol: string): QuantityParameter | undefined {
    const parameter = this.subject.template.parameters.find((one) => one.symbol === list);
    const columns = parameter?.kind === 'rows' ? parameter.columns : [];
    return columns.find(
      (column): column is QuantityParameter => column.kind === 'quantity' && column.symbol === symbol,
    );
  }

  private cell(list: string, column: QuantityParameter, index: number): Trace {
    const { symbol, name, tex, dimension } = column;
    const values = this.subject.values[list];
    const value = values !== undefined && isRows(values) ? Number(values[index]?.[symbol]) : Number.NaN;
    const given = this.subject.typed[list];
    const rows = Array.isArray(given) ? given : this.defaultRows(list);
    return leaf(
      {
        label: `${name}, row ${index + 1}`,
        symbol: `{${tex}}_{${index + 1}}`,
        value,
        measure: dimension,
      },
      inputOf(list, { row: index, typed: textIn(rows[index], symbol), isDefault: !Array.isArray(given) }),
    );
  }

  private defaultRows(list: string): readonly unknown[] {
    const parameter = this.subject.template.parameters.find((one) => one.symbol === list);
    return parameter?.kind === 'rows' ? parameter.default : [];
  }

  private named(name: string, context: Context, rows: ReadonlyMap<string, Context>): Trace {
    const [symbol = name] = name.split('#');
    return this.symbol(symbol, rows.get(name) ?? context);
  }

  /** The tree without its conditions, each decided, and without lists, each written out row by row. */
  private settled(tree: Tree, context: Context) {
    const chosen: string[] = [];
    const rows = new Map<string, Context>();
    const settle = (part: Tree): Tree => {
      if (typeof part !== 'object') return part;
      const [operation, ...parts] = part;
      const [first = 0, second = 0, third = 0] = parts;
      if (operation === 'if') {
        chosen.push(...this.choicesIn(first, context));
        return settle(evaluateTruth(first, context.scope) ? second : third);
      }
      if (operation === 'count') return rowsOf(first, context.scope).length;
      if (operation === 'sum') return this.rowByRow(String(first), second, context, rows);
      return [operation, ...parts.map(settle)];
    };
    return { tree: settle(tree), chosen: [...new Set(chosen)], rows };
  }

  private rowByRow(list: string, tree: Tree, context: Context, into: Map<string, Context>): Tree {
    const columns = [...symbolsOf(tree)].filter((name) => this.columnOf(list, name));
    return total(
      rowsOf(list, context.scope).map((row, index) => {
        const inRow = { ...context, scope: within(row, context.scope), row: { parameter: list, index } };
        for (const column of columns) into.set(`${column}#${index + 1}`, inRow);
        return positive(withNames(tree, (name) => (columns.includes(name) ? `${name}#${index + 1}` : name)));
      }),
    );
  }

  /** "Loading is uniform load": what was chosen that a condition asks for. */
  private choicesIn(condition: Tree, { scope }: Context): string[] {
    return [...symbolsOf(condition)].flatMap((name) => {
      const parameter = this.subject.template.parameters.find((one): one is Choice => isChoice(one, name));
      const option = parameter?.options.find(({ value }) => value === scope.get(name));
      return parameter && option ? [`${parameter.name}: ${option.name}.`] : [];
    });
  }

  private measureOf(tree: Tree): Measure {
    const reading = dimensionOf(tree, ruleKinds(this.subject.template));
    const kind = reading.ok ? reading.kind : null;
    if (kind?.is !== 'number') return 'ratio';
    const found = Object.entries(MEASURES).find(([, dimension]) =>
      equalDimensions(dimension, kind.dimension),
    );
    return (found?.[0] as Measure | undefined) ?? 'ratio';
  }
}

/** A load's letter with its group: w^G. */
export const ofGroup = (tex: string, group: string): string => `{${tex}}^{\\mathrm{${group}}}`;

type Choice = Extract<Parameter, { kind: 'choice' }>;
const isChoice = (parameter: Parameter, symbol: string): parameter is Choice =>
  parameter.kind === 'choice' && parameter.symbol === symbol;

type InputParts = { group?: string | null; row?: number; typed: string | null; isDefault: boolean };

const inputOf = (parameter: string, { group = null, row, typed, isDefault }: InputParts) =>
  ({ kind: 'input', parameter, group, row: row ?? null, typed, isDefault }) as const;

/** The text itself, or the one at a key of an object. */
function textIn(given: unknown, key: string | null): string | null {
  const found = typeof given === 'object' && given !== null && key !== null ? Object(given)[key] : given;
  return typeof found === 'string' ? found : null;
}
