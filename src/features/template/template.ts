/** What the catalogue and a template's page show of a template document and the revision it stands in. */
import { solveBeam } from '@/engine/beam';
import { type Beam, readBeam } from '@/engine/model';
import type { Piecewise } from '@/engine/polynomial';
import { formatQuantity, type UnitSystemName } from '@/engine/quantity';
import {
  type Arrangement,
  type Dimensioned,
  instantiate,
  type LoadKind,
  limitsOf,
  type Parameter,
  type QuantityParameter,
  readParameters,
  type Template,
  unitOf,
} from '@/engine/template';
import type { RevisionState } from '@/features/review/review';

export const ARRANGEMENT_NAMES: Record<Arrangement, string> = {
  'simple-span': 'Simple span',
  cantilever: 'Cantilever',
  'propped-cantilever': 'Propped cantilever',
  'fixed-ends': 'Fixed ends',
  overhang: 'Overhang',
  'multi-span': 'Multi-span',
};

export const LOAD_KIND_NAMES: Record<LoadKind, string> = {
  uniform: 'Uniform',
  point: 'Point',
  triangular: 'Triangular',
  couple: 'Couple',
  settlement: 'Settlement',
  temperature: 'Temperature',
};

/** A template as it is drawn small: the beam at its defaults with its moment. */
export type SchematicView = {
  beam: Beam;
  moment: Piecewise;
  loadNames: readonly string[];
  lengths: readonly Dimensioned[];
};

/** One row of the catalogue. */
export type TemplateRow = {
  slug: string;
  reference: string;
  name: string;
  arrangement: Arrangement;
  loadKinds: readonly LoadKind[];
  tags: readonly string[];
  summary: string;
  youGive: string;
  youGet: string;
  revision: number;
  state: RevisionState;
  /** ISO 8601: when the revision came to be what it is. */
  date: string;
  author: string;
  reviewer: string | null;
  uses: { members: number; jobs: number };
};

export type RevisionOfRow = Pick<TemplateRow, 'state' | 'author' | 'reviewer'> & {
  number: number;
  date: Date;
};

export const toTemplateRow = (
  template: Template,
  { number, state, date, author, reviewer }: RevisionOfRow,
  uses: TemplateRow['uses'],
): TemplateRow => ({
  slug: template.slug,
  reference: template.reference,
  name: template.name,
  arrangement: template.arrangement,
  loadKinds: template.load_kinds,
  tags: template.tags,
  summary: template.summary,
  youGive: template.you_give,
  youGet: template.you_get,
  revision: number,
  state,
  date: date.toISOString(),
  author,
  reviewer,
  uses,
});

/** What a search looks through: names before tags and arrangement, these before the parameters. */
export const searchTexts = (row: TemplateRow, { parameters }: Pick<Template, 'parameters'>): string[] => [
  row.name,
  row.reference,
  ...row.tags,
  ARRANGEMENT_NAMES[row.arrangement],
  ...row.loadKinds.map((kind) => LOAD_KIND_NAMES[kind]),
  row.summary,
  ...parameters.map(({ symbol, name }) => `${symbol} ${name}`),
];

/** A template that was checked has a beam at its defaults; one that was not is our mistake. */
class UndrawableTemplate extends Error {
  constructor(slug: string, why: string) {
    super(`${slug} has no beam at its defaults: ${why}`);
    this.name = 'UndrawableTemplate';
  }
}

export function toSchematic(template: Template): SchematicView {
  const values = readParameters(template, {});
  const made = values.ok ? instantiate(template, values.values) : values;
  if (!made.ok) throw new UndrawableTemplate(template.slug, made.faults[0]?.message ?? '');
  const { beam, dimensions, loadNames } = made.instance;
  const reading = readBeam(beam);
  if (!reading.ok) throw new UndrawableTemplate(template.slug, reading.faults[0]?.message ?? '');
  const { moment } = solveBeam(reading.value, beam.redundants).diagrams;
  return { beam: reading.value, moment, loadNames: loadNames.map(({ tex }) => tex), lengths: dimensions };
}

/** A field of the parameter schedule: its numbers in SI, its texts in the unit that it shows. */
type QuantityFieldView = {
  kind: 'quantity';
  symbol: string;
  tex: string;
  name: string;
  help: string;
  unit: string;
  min: number;
  max: number;
  step: number;
  default: number;
  /** As a person would type them: "7.2 m". */
  texts: { default: string; min: string; max: string };
  group: string | null;
};
export type ParameterFieldView =
  | QuantityFieldView
  | Exclude<Parameter, { kind: 'quantity' | 'rows' }>
  | (Omit<Extract<Parameter, { kind: 'rows' }>, 'columns'> & { columns: RowColumnView[] });
type RowColumnView =
  | QuantityFieldView
  | Exclude<Extract<Parameter, { kind: 'rows' }>['columns'][number], { kind: 'quantity' }>;

function toQuantityField(parameter: QuantityParameter, system: UnitSystemName): QuantityFieldView {
  const { symbol, tex, name, help, group = null } = parameter;
  const unit = unitOf(parameter, system);
  const limits = limitsOf(parameter);
  const text = (value: number) => formatQuantity(value, unit);
  const texts = { default: text(limits.default), min: text(limits.min), max: text(limits.max) };
  return { kind: 'quantity', symbol, tex, name, help, unit, ...limits, texts, group };
}

/** The template's parameters as fields in a unit system. */
export const toParameterFields = (template: Template, system: UnitSystemName): ParameterFieldView[] =>
  template.parameters.map((parameter): ParameterFieldView => {
    if (parameter.kind === 'quantity') return toQuantityField(parameter, system);
    if (parameter.kind === 'choice') return parameter;
    const columns = parameter.columns.map((column) =>
      column.kind === 'quantity' ? toQuantityField(column, system) : column,
    );
    return { ...parameter, columns };
  });
