/**
 * From what an author writes to the template that is stored: read by the server when a draft is saved, and by the
 * editor's worker while it is written. It loads the expression parser.
 */
import type { z } from 'zod';
import { checkTemplate, writtenTemplate } from '@/engine/template/author';
import type { Fault } from '@/lib/app-error';
import { pointer } from '@/lib/pointer';
import { read } from '@/lib/read';
import type { Written } from './draft';
import { noteFaults } from './note';

/** The document, or every fault of it with a JSON Pointer into what was written. */
export type DocumentReading = { ok: true; body: object } | { ok: false; faults: Fault[] };

/** HTML or a script in a template's notes. */
export const templateNoteFaults = (document: Written): Fault[] => noteFaults(notesOf(document));

/** The whole template, or every fault of it: of the parts that can be read, also those of meaning. */
export function readTemplate(document: Written): DocumentReading {
  const notes = templateNoteFaults(document);
  const reading = read(writtenTemplate, document);
  const faults = reading.ok
    ? [...notes, ...meaningFaults(reading.value)]
    : [...reading.faults, ...notes, ...partialFaults(document, reading.faults)];
  return reading.ok && faults.length === 0 ? { ok: true, body: reading.value } : { ok: false, faults };
}

function notesOf({ method, sources }: Written): [PropertyKey[], unknown][] {
  const derivations = Array.isArray(sources)
    ? sources.map((source, index): [PropertyKey[], unknown] => [
        ['sources', index, 'derivation'],
        Object(source).derivation,
      ])
    : [];
  return [[['method'], method], ...derivations];
}

const meaningFaults = (template: z.output<typeof writtenTemplate>): Fault[] =>
  checkTemplate(template).map(({ path, code, message }) => ({ pointer: pointer(path), code, message }));

/** Stands in for a part that is missing or faulty, so that the others can be checked for their meaning already. */
const STAND_IN: Written = {
  schema_version: 1,
  slug: 'draft',
  reference: 'Beam 1',
  name: '-',
  arrangement: 'simple-span',
  load_kinds: ['uniform'],
  tags: [],
  summary: '-',
  you_give: '-',
  you_get: '-',
  use: ['-'],
  do_not_use: ['-'],
  method: '-',
  stiffness: { default_ei: '10000 kNm2', affects: ['deflection'] },
  rules: [],
  results: [],
  sources: [{ id: 'draft', publication: '-', table: '-', from_memory: true }],
};

/** Proof cases that hold for any beam; they cite a source of the document, or the one that stands in. */
function standInCases({ sources }: Written) {
  const source = (Array.isArray(sources) && Object(sources[0]).id) || 'draft';
  const held = { name: '-', parameters: {}, source, expect: [{ quantity: { moment: '0' }, exact: '0' }] };
  return [held, held, held];
}

/** Faults of meaning in the parts whose form is right, where the parameters and the beam are among them. */
function partialFaults(document: Written, formFaults: readonly Fault[]): Fault[] {
  const faulty = new Set(formFaults.map((fault) => fault.pointer.split('/')[1] ?? ''));
  const sound = Object.fromEntries(Object.entries(document).filter(([key]) => !faulty.has(key)));
  const reading = writtenTemplate.safeParse({ ...STAND_IN, proof_cases: standInCases(sound), ...sound });
  if (!reading.success) return [];
  return meaningFaults(reading.data).filter(({ pointer: at }) => {
    const part = at.split('/')[1] ?? '';
    const isAboutSource = faulty.has('sources') && at.endsWith('/source');
    const isAboutResult = faulty.has('results') && part === 'proof_cases';
    return !faulty.has(part) && !isAboutSource && !isAboutResult;
  });
}
