/** As much of a draft as can be drawn: its parameters and its beam, whatever else is missing still. */
import { z } from 'zod';
import {
  type Instance,
  instantiate,
  limitsOf,
  type ParameterFault,
  readParameters,
  type Template,
  type Values,
} from '@/engine/template';
import { writtenTemplate } from '@/engine/template/author';
import { BrokenExpression } from '@/engine/template/evaluate';
import type { Written } from '@/features/review/draft';
import type { StatedValues } from '../edit';

const { shape } = writtenTemplate;
const written = z.object({
  parameters: shape.parameters.min(0),
  derived: shape.derived,
  beam: shape.beam.extend({
    supports: z.array(shape.beam.shape.supports.element).max(20),
    dimensions: z.array(shape.beam.shape.dimensions.element).max(12),
  }),
});

/** What a drawing has no use for. */
const REST: Omit<Template, 'parameters' | 'derived' | 'beam'> = {
  schema_version: 1,
  slug: 'draft',
  reference: 'Draft 1',
  name: 'Draft',
  arrangement: 'simple-span',
  load_kinds: ['uniform'],
  tags: [],
  summary: '',
  you_give: '',
  you_get: '',
  use: [],
  do_not_use: [],
  method: '',
  stiffness: { default_ei: '10000 kNm2', affects: ['deflection'] },
  rules: [],
  results: [],
  sources: [],
  proof_cases: [],
};

const isObject = (value: unknown): value is Readonly<Record<string, unknown>> =>
  typeof value === 'object' && value !== null && !Array.isArray(value);

/** A parameter is drawn by its symbol; what it is called may be written later. */
const named = (parameter: unknown): unknown => {
  if (!isObject(parameter)) return parameter;
  const { symbol, tex, name, help } = parameter;
  return { ...parameter, tex: tex || symbol, name: name || symbol, help: help || symbol };
};

const listOf = (value: unknown): readonly unknown[] => (Array.isArray(value) ? value : []);

/**
 * The draft as a template that can be drawn and, where nothing is wrong with them, judged by its rules and compared
 * with its closed forms; null where its parameters or its beam cannot be read.
 */
export function drawableTemplate(document: Written): Template | null {
  const { beam, derived, stiffness, rules, results } = document;
  const reading = written.safeParse({
    parameters: listOf(document['parameters']).map(named),
    derived: listOf(derived),
    beam: isObject(beam)
      ? {
          ...beam,
          supports: listOf(beam['supports']),
          loads: listOf(beam['loads']),
          redundants: listOf(beam['redundants']),
          dimensions: listOf(beam['dimensions']),
        }
      : beam,
  });
  if (!reading.success) return null;
  const drawn = reading.data;
  const isRanged = drawn.parameters.every(
    (one) => one.kind !== 'quantity' || Object.values(limitsOf(one)).every(Number.isFinite),
  );
  if (!isRanged) return null;
  return {
    ...REST,
    ...drawn,
    stiffness: shape.stiffness.safeParse(stiffness).data ?? REST.stiffness,
    rules: shape.rules.safeParse(rules).data ?? [],
    results: shape.results.safeParse(results).data ?? [],
  };
}

export interface Sketch {
  readonly template: Template;
  readonly values: Values;
  readonly instance: Instance;
}

export type Sketching =
  | { readonly ok: true; readonly sketch: Sketch }
  /** Without faults: the beam has no length yet, or an expression speaks of what is not there. */
  | { readonly ok: false; readonly faults: readonly ParameterFault[] };

/** The draft at these values. Rules are left out: what breaks one is drawn all the same. */
export function sketchAt(template: Template, stated: StatedValues): Sketching {
  const known = template.parameters.map(({ symbol }) => symbol);
  const given = Object.fromEntries(Object.entries(stated).filter(([symbol]) => known.includes(symbol)));
  const reading = readParameters(template, given);
  if (!reading.ok) return reading;
  try {
    const made = instantiate({ ...template, rules: [] }, reading.values);
    if (!made.ok) return made;
    const { instance } = made;
    if (!(instance.beam.length > 0)) return { ok: false, faults: [] };
    return { ok: true, sketch: { template, values: reading.values, instance } };
  } catch (error) {
    if (error instanceof BrokenExpression) return { ok: false, faults: [] };
    throw error;
  }
}

/** The draft at its defaults, or at the values given; null where it cannot be drawn. */
export function sketchOf(document: Written, stated: StatedValues = {}): Sketch | null {
  const template = drawableTemplate(document);
  const reading = template && sketchAt(template, stated);
  return reading?.ok ? reading.sketch : null;
}
