/** From what an author writes to the document that is stored. The server's alone: it loads the expression parser. */
import type { z } from 'zod';
import { criteriaOfSet } from '@/engine/check';
import { combinationSetDocument } from '@/features/combination/combination';
import { materialSetDocument } from '@/features/material/material';
import type { Fault } from '@/lib/app-error';
import { read } from '@/lib/read';
import type { Written } from './draft';
import { type DocumentReading, readTemplate, templateNoteFaults } from './read-template';
import type { DocumentKind } from './review';

type Reader = (document: Written) => DocumentReading;

/** How a document of each kind is read. A section table is not among them: its editions are imported, rows and all. */
const READERS: Partial<Record<DocumentKind, Reader>> = {
  template: readTemplate,
  criteria: (document) => bySchema(criteriaOfSet, document),
  'combination-set': (document) => bySchema(combinationSetDocument, document),
  'material-set': (document) => bySchema(materialSetDocument, document),
};

/** By which a document of a kind is written today. */
export const schemaVersionOf = (kind: DocumentKind): number => (kind === 'criteria' ? 2 : 1);

export const readerOf = (kind: DocumentKind): Reader | undefined => READERS[kind];

function bySchema(schema: z.ZodType<object>, document: Written): DocumentReading {
  const reading = read(schema, document);
  return reading.ok ? { ok: true, body: reading.value } : reading;
}

/** HTML or a script in a document's notes. */
export const scriptFaults = (kind: DocumentKind, document: Written): Fault[] =>
  kind === 'template' ? templateNoteFaults(document) : [];
