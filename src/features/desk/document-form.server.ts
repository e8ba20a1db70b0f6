import { beginDraft } from '@/features/review/begin.server';
import { confirmRevision, setReviewBy, setWatching } from '@/features/review/care.server';
import { Confirm, ReviewBy } from '@/features/review/document';
import type { Actor, DocumentKey } from '@/features/review/rows.server';
import { numberParam } from '@/http/params';
import { invalid } from '@/lib/app-error';
import { read } from '@/lib/read';
import { paths } from '@/paths';
import { attempt, type Outcome, textOf, unknownAct } from './form';

/** Takes a form of a document's page: watching, review date, confirmation, the next draft. */
export const takeDocumentForm = (actor: Actor, key: DocumentKey, form: FormData): Promise<Outcome> =>
  attempt(async () => {
    const here = paths.libraryDocument(key.kind, key.slug);
    switch (textOf(form, 'act')) {
      case 'watch':
        await setWatching(actor, key, textOf(form, 'on') === 'yes');
        return `${here}?done=watch`;
      case 'review-by':
        await saveReviewBy(actor, key, form);
        return `${here}?done=review-by`;
      case 'confirm':
        await confirm(actor, key, form);
        return `${here}?done=confirm`;
      case 'begin':
        return begin(actor, key, form);
      default:
        throw unknownAct();
    }
  });

const numberOf = (form: FormData): number => numberParam({ id: textOf(form, 'id') }, 'id', 'This revision');

async function saveReviewBy(actor: Actor, key: DocumentKey, form: FormData): Promise<void> {
  const grace = textOf(form, 'grace_days').trim();
  const reading = read(ReviewBy, {
    review_by: textOf(form, 'review_by') || null,
    grace_days: /^\d+$/.test(grace) ? Number(grace) : grace || undefined,
  });
  if (!reading.ok) throw invalid(reading.faults);
  await setReviewBy(actor, key, reading.value);
}

async function confirm(actor: Actor, key: DocumentKey, form: FormData): Promise<void> {
  const reading = read(Confirm, { note: textOf(form, 'note') });
  if (!reading.ok) throw invalid(reading.faults);
  await confirmRevision(actor, { ...key, number: numberOf(form) }, reading.value.note);
}

async function begin(actor: Actor, key: DocumentKey, form: FormData): Promise<string> {
  const made = await beginDraft(actor, key, {
    from: numberOf(form),
    change_note: '',
    change_class: null,
    consequence: null,
  });
  return paths.libraryDraft(made.kind, made.slug, made.revision);
}
