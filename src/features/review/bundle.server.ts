import { withPractice } from '@/db/tenancy';
import { requirePermission } from '@/features/account/permission';
import { AppError, type Fault, invalid } from '@/lib/app-error';
import { contentHash } from '@/lib/fingerprint';
import { read } from '@/lib/read';
import { BUNDLE_SCHEMA, Bundle } from './bundle';
import { type RevisionKey, unfinishedOf, type Written } from './draft';
import { writtenOf } from './draft.server';
import { type DocumentKind, KIND_NAMES } from './review';
import { type Actor, requireRevision } from './rows.server';
import { scriptFaults } from './written.server';

/** A revision to be taken to another practice. An unfinished draft stays where it is. */
export function exportBundle(actor: Actor, key: RevisionKey): Promise<Bundle> {
  requirePermission(actor, 'library.read');
  return withPractice(actor, async (tx) => {
    const row = await requireRevision(tx, actor.practiceId, key);
    if (row.of.kind === 'section-table')
      throw new AppError('conflict', 'A section table travels as its CSV file, not as a bundle.');
    if (unfinishedOf(row.body))
      throw new AppError('conflict', 'This draft has faults still. Export it when they are put right.');
    const content = {
      format: 'putlog-document' as const,
      schema_version: BUNDLE_SCHEMA,
      kind: row.of.kind,
      slug: row.of.slug,
      reference: row.of.reference,
      name: row.of.name,
      revision: row.number,
      engine_version: row.engineVersion,
      change_note: row.changeNote,
      change_class: row.changeClass,
      consequence: row.consequence,
      document: writtenOf(row.body),
    } satisfies Omit<Bundle, 'sha256'>;
    return { ...content, document: { ...content.document }, sha256: contentHash(content) };
  });
}

/** What a bundle holds, or 422: an unknown version, another kind, a changed file, a script in a note. */
export function readBundle(kind: DocumentKind, given: Written): Bundle {
  const version = given['schema_version'];
  if (typeof version === 'number' && version !== BUNDLE_SCHEMA)
    throw invalid([
      fault(
        '/schema_version',
        'unknown_version',
        `This bundle has schema version ${version}, which is not read here. Export it again as version ${BUNDLE_SCHEMA}.`,
      ),
    ]);
  const reading = read(Bundle, given);
  if (!reading.ok) throw invalid(reading.faults.map((one) => ({ ...one, pointer: `/bundle${one.pointer}` })));
  const { sha256, ...content } = reading.value;
  const faults = [
    ...(content.kind === kind ? [] : [wrongKind(content.kind, kind)]),
    ...(contentHash(content) === sha256
      ? []
      : [
          fault(
            '/sha256',
            'hash_mismatch',
            'The bundle was changed after it was exported: its hash is another one. Export it again.',
          ),
        ]),
    ...scriptFaults(kind, content.document).map((one) =>
      fault(`/document${one.pointer}`, one.code, one.message),
    ),
  ];
  if (faults.length > 0) throw invalid(faults);
  return reading.value;
}

const fault = (at: string, code: string, message: string): Fault => ({
  pointer: `/bundle${at}`,
  code,
  message,
});

const wrongKind = (given: DocumentKind, wanted: DocumentKind): Fault =>
  fault('/kind', 'not_allowed', `This bundle holds a ${KIND_NAMES[given]}, not a ${KIND_NAMES[wanted]}.`);
