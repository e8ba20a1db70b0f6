import { beginDraft } from '@/features/review/begin.server';
import { NewDraft } from '@/features/review/draft';
import { isSetKind } from '@/features/review/read-set';
import { DOCUMENT_KINDS, type DocumentKind } from '@/features/review/review';
import type { Actor } from '@/features/review/rows.server';
import { emptySet } from '@/features/sets-editor/start';
import { type Fault, invalid } from '@/lib/app-error';
import { read } from '@/lib/read';
import { paths } from '@/paths';
import { attempt, type Outcome, textOf } from './form';
import { parseJson } from './json';

/** Kinds that are written here; an edition of a section table is imported. */
export const WRITTEN_KINDS: readonly DocumentKind[] = DOCUMENT_KINDS.filter(
  (kind) => kind !== 'section-table',
);

const at = (pointer: string, message: string): Fault => ({ pointer, code: 'not_allowed', message });

/** Begins a document from nothing, from a revision of another one, or from a bundle out of another practice. */
export const takeNewDocument = (actor: Actor, form: FormData): Promise<Outcome> =>
  attempt(async () => {
    const bundle = await bundleOf(form);
    const given = bundle ?? {};
    const kind = WRITTEN_KINDS.find((one) => one === (given['kind'] ?? textOf(form, 'kind')));
    if (!kind) throw invalid([at('/kind', 'Choose what kind of document it is.')]);
    const typed = textOf(form, 'slug').trim();
    const slug = typed === '' && typeof given['slug'] === 'string' ? given['slug'] : typed;
    if (slug === '') throw invalid([at('/slug', 'Give it an address: small letters, digits and hyphens.')]);
    const reading = read(NewDraft, bundle ? { bundle } : startOf(form, kind));
    if (!reading.ok) throw invalid(reading.faults);
    const made = await beginDraft(actor, { kind, slug }, reading.value).catch((error: unknown) => {
      throw placed(error);
    });
    return paths.libraryDraft(made.kind, made.slug, made.revision);
  });

/** "propped-cantilever 3": the revision that another document begins from; a set begins with its tables empty. */
function startOf(form: FormData, kind: DocumentKind) {
  const [slug, revision] = textOf(form, 'from').split(' ');
  if (slug && revision) return { from: { slug, revision: Number(revision) } };
  return isSetKind(kind) ? { document: emptySet(kind) } : {};
}

async function bundleOf(form: FormData): Promise<Record<string, unknown> | null> {
  const file = form.get('bundle');
  if (!(file instanceof File) || file.size === 0) return null;
  const reading = parseJson(await file.text());
  if (!reading.ok) throw invalid([at('/bundle', `${file.name} is no bundle: ${reading.message}`)]);
  return reading.value;
}

/** Faults of an address and of a bundle stand at the fields that they came from. */
function placed(error: unknown): unknown {
  if (!(error instanceof Error && 'faults' in error) || !Array.isArray(error.faults)) return error;
  const faults: Fault[] = error.faults;
  if (!('code' in error) || error.code !== 'invalid') return error;
  return invalid(
    faults.map((fault) => {
      if (fault.pointer === '') return { ...fault, pointer: '/slug' };
      return fault.pointer.startsWith('/bundle')
        ? {
            ...fault,
            pointer: '/bundle',
            message: `${fault.pointer.slice('/bundle'.length)} ${fault.message}`.trim(),
          }
        : fault;
    }),
  );
}
