import type { SectionRow, SectionTableMeta } from '../section';
import { type Finding, type Mapping, type Question, RECOGNISED_BYTES, type Refusal } from './contract';
import { findingOf, isError } from './finding';
import { answer, openQuestions } from './mapping';
import { recognise } from './recognise';
import { RowCheck } from './row-check';
import { Survey } from './survey';

/** `rows` are those without an error. `faults` of a table that is read are warnings and notes. */
type SectionTableReading = { ok: boolean; rows: SectionRow[]; faults: Finding[] };

const failed = (faults: Finding[]): SectionTableReading => ({ ok: false, rows: [], faults });
const unreadable = ({ message }: Refusal) =>
  failed([findingOf({ rule: 31, severity: 'error', cause: 'unreadable', message })]);

const RULE_OF: Readonly<Record<Question['kind'], number>> = {
  encoding: 30,
  decimal_mark: 28,
  axes: 25,
  column: 25,
  shape: 25,
  unit: 26,
};

/** The mapping that a table's own sidecar answers for. */
function answered(mapping: Mapping, meta: SectionTableMeta): Mapping {
  const given = {
    ...mapping,
    shape: meta.shape ?? mapping.shape,
    density: meta.density_kg_m3,
    tubeStandard: meta.tube_standard,
  };
  return meta.axes ? answer(given, { kind: 'axes', value: meta.axes }) : given;
}

/**
 * Reads a whole section table whose sidecar says what a person is asked of an upload. Gives every fault of every row;
 * never a part of a faulty row.
 */
export function readSectionTable(csv: string, meta: SectionTableMeta): SectionTableReading {
  const bytes = new TextEncoder().encode(csv);
  const head = bytes.subarray(0, RECOGNISED_BYTES);
  const recognition = recognise(head, { name: `${meta.slug}.csv`, size: bytes.length });
  if (!recognition.ok) return unreadable(recognition.refusal);
  const mapping = answered(recognition.mapping, meta);
  const open = new Set(openQuestions(mapping));
  if (open.size > 0) {
    const asked = recognition.questions.filter(({ kind }) => open.has(kind));
    return failed(
      asked.map(({ kind, message }) =>
        findingOf({
          rule: RULE_OF[kind],
          severity: 'error',
          cause: 'unanswered',
          line: mapping.headingLine,
          message,
        }),
      ),
    );
  }
  const survey = new Survey(mapping, []);
  survey.push(bytes);
  const surveyed = survey.finish();
  if (!surveyed.ok) return unreadable(surveyed.refusal);
  const check = new RowCheck(mapping, [], surveyed.facts);
  const batches = [check.push(bytes), check.finish()];
  const faults = [...surveyed.facts.findings, ...batches.flatMap(({ findings }) => findings)];
  const rows = batches.flatMap((batch) => batch.rows.map(({ row }) => row));
  faults.sort((a, b) => (a.line ?? 0) - (b.line ?? 0));
  return { ok: !faults.some(isError), rows, faults };
}
