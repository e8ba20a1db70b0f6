/** From what an author writes to the set that is stored: by the server when a draft is saved, by the editor meanwhile. */
import type { z } from 'zod';
import { criteriaOfSet } from '@/engine/check';
import { combinationSetDocument } from '@/features/combination/combination';
import { materialSetDocument } from '@/features/material/material';
import { implausible } from '@/features/material/plausible';
import { read } from '@/lib/read';
import type { Written } from './draft';
import type { DocumentReading } from './read-template';
import type { DocumentKind } from './review';

/** Kinds of document that are tables of values. */
const SET_KINDS = ['combination-set', 'material-set', 'criteria'] as const satisfies DocumentKind[];
export type SetKind = (typeof SET_KINDS)[number];

export const isSetKind = (kind: DocumentKind): kind is SetKind => SET_KINDS.some((one) => one === kind);

const bySchema =
  (schema: z.ZodType<object>) =>
  (document: Written): DocumentReading => {
    const reading = read(schema, document);
    return reading.ok ? { ok: true, body: reading.value } : reading;
  };

const readForm = bySchema(materialSetDocument);

/** By its schema, and what it cannot be: of a draft alone, so that what is issued stays readable whatever is asked later. */
function readMaterials(document: Written): DocumentReading {
  const reading = readForm(document);
  const slips = implausible(document);
  if (slips.length === 0) return reading;
  return { ok: false, faults: [...(reading.ok ? [] : reading.faults), ...slips] };
}

export const SET_READERS: Readonly<Record<SetKind, (document: Written) => DocumentReading>> = {
  criteria: bySchema(criteriaOfSet),
  'combination-set': bySchema(combinationSetDocument),
  'material-set': readMaterials,
};
