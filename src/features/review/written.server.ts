/** From what an author writes to the document that is stored. The server's alone: it loads the expression parser. */
import type { z } from 'zod';
import { criteriaDocument } from '@/engine/check';
import { checkTemplate, writtenTemplate } from '@/engine/template/author';
import type { Fault } from '@/lib/app-error';
import { pointer } from '@/lib/pointer';
import { read } from '@/lib/read';
import type { Written } from './draft';
import { noteFaults } from './note';
import type { DocumentKind } from './review';

/** The document, or every fault of it with a JSON Pointer into what was written. */
type DocumentReading = { ok: true; body: object } | { ok: false; faults: Fault[] };

type Reader = (document: Written) => DocumentReading;

/** How a document of each kind is read. A section table is not among them: its editions are imported, rows and all. */
const READERS: Partial<Record<DocumentKind, Reader>> = {
  template: readTemplate,
  criteria: (document) => bySchema(criteriaDocument, document),
};

export const readerOf = (kind: DocumentKind): Reader | undefined => READERS[kind];

function bySchema(schema: z.ZodType<object>, document: Written): DocumentReading {
  const reading = read(schema, document);
  return reading.ok ? { ok: true, body: reading.value } : reading;
}

/** HTML or a script in a document's notes. */
export const scriptFaults = (kind: DocumentKind, document: Written): Fault[] =>
  kind === 'template' ? noteFaults(notesOf(document)) : [];

function readTemplate(document: Written): DocumentReading {
  const notes = scriptFaults('template', document);
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
