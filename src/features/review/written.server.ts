/** From what an author writes to the document that is stored. The server's alone: it loads the expression parser. */
import type { Fault } from '@/lib/app-error';
import type { Written } from './draft';
import { SET_READERS } from './read-set';
import { type DocumentReading, readTemplate, templateNoteFaults } from './read-template';
import type { DocumentKind } from './review';

type Reader = (document: Written) => DocumentReading;

/** How a document of each kind is read. A section table is not among them: its editions are imported, rows and all. */
const READERS: Partial<Record<DocumentKind, Reader>> = {
  template: readTemplate,
  ...SET_READERS,
};

/** By which a document of a kind is written today. */
export const schemaVersionOf = (kind: DocumentKind): number => (kind === 'criteria' ? 2 : 1);

export const readerOf = (kind: DocumentKind): Reader | undefined => READERS[kind];

/** HTML or a script in a document's notes. */
export const scriptFaults = (kind: DocumentKind, document: Written): Fault[] =>
  kind === 'template' ? templateNoteFaults(document) : [];
