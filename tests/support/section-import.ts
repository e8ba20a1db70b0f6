import {
  addFindings,
  answer,
  openQuestions,
  RowCheck,
  recognise,
  reportOf,
  Survey,
} from '@/features/section/import';
import type {
  Axes,
  CheckBatch,
  Edit,
  FileFacts,
  Finding,
  Mapping,
  Question,
  Refusal,
  Report,
} from '@/features/section/import/contract';
import type { SectionRow } from '@/features/section/section';

export type ImportOptions = {
  axes?: Axes;
  change?: Partial<Mapping>;
  edits?: readonly Edit[];
  /** Bytes that are given at once. */
  piece?: number;
};

/** An import to its end, or to where a person is needed. */
export type Imported = {
  refusal: Refusal | null;
  questions: Question[];
  mapping: Mapping | null;
  facts: FileFacts | null;
  findings: Finding[];
  report: Report | null;
  rows: SectionRow[];
};

const NOTHING: Imported = {
  refusal: null,
  questions: [],
  mapping: null,
  facts: null,
  findings: [],
  report: null,
  rows: [],
};
const HEAD = 65_536;

function* pieces(bytes: Uint8Array, size: number) {
  for (let at = 0; at < bytes.length; at += size) yield bytes.subarray(at, at + size);
}

/** A whole file through recognition, both readings and the report, in pieces as a worker would give them. */
export function importBytes(bytes: Uint8Array, options: ImportOptions = {}): Imported {
  const recognition = recognise(bytes.subarray(0, HEAD), { name: 'sections.csv', size: bytes.length });
  if (!recognition.ok) return { ...NOTHING, refusal: recognition.refusal };
  const asked = { ...recognition.mapping, ...options.change };
  const isOpen = openQuestions(asked).includes('axes');
  const mapping = isOpen && options.axes ? answer(asked, { kind: 'axes', value: options.axes }) : asked;
  const { questions } = recognition;
  if (openQuestions(mapping).length > 0) return { ...NOTHING, questions, mapping };
  return { ...readThrough(bytes, mapping, options), questions };
}

function readThrough(
  bytes: Uint8Array,
  mapping: Mapping,
  { edits = [], piece = HEAD }: ImportOptions,
): Imported {
  const survey = new Survey(mapping, edits);
  for (const part of pieces(bytes, piece)) survey.push(part);
  const surveyed = survey.finish();
  if (!surveyed.ok) return { ...NOTHING, mapping, refusal: surveyed.refusal };
  const { facts } = surveyed;
  const check = new RowCheck(mapping, edits, facts);
  const batches: CheckBatch[] = [];
  for (const part of pieces(bytes, piece)) batches.push(check.push(part));
  batches.push(check.finish());
  const findings = [...facts.findings, ...batches.flatMap((batch) => batch.findings)];
  const report = batches.reduce((sum, batch) => addFindings(sum, batch.findings), reportOf(facts));
  const rows = batches.flatMap((batch) => batch.rows.map(({ row }) => row));
  return { ...NOTHING, mapping, facts, findings, report, rows };
}

export const importText = (text: string, options: ImportOptions = {}): Imported =>
  importBytes(new TextEncoder().encode(text), options);

/** What is to be resolved: notes are not. */
export const alarms = ({ findings }: Pick<Imported, 'findings'>): Finding[] =>
  findings.filter(({ severity }) => severity !== 'note');
