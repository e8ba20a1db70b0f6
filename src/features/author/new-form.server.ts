import { attempt, type Outcome, textOf } from '@/features/desk/form';
import { beginDraft } from '@/features/review/begin.server';
import { NewDraft } from '@/features/review/draft';
import { saveDraft } from '@/features/review/draft.server';
import { LONGEST_SLUG, SLUG } from '@/features/review/review';
import type { Actor } from '@/features/review/rows.server';
import { type Fault, invalid } from '@/lib/app-error';
import { paths } from '@/paths';
import { addressOf, MOST_SPANS, STARTS, type Start, startDocument } from './start';

const at = (pointer: string, message: string): Fault => ({ pointer, code: 'not_allowed', message });

/** Begins a template: a title, and a beam to start from or an issued template to go on from. */
export const takeNewTemplate = (actor: Actor, form: FormData): Promise<Outcome> =>
  attempt(async () => {
    const title = textOf(form, 'title').trim();
    const typed = textOf(form, 'slug').trim();
    const slug = typed === '' ? addressOf(title) : typed;
    const start = textOf(form, 'start');
    const [source = '', revision = ''] = textOf(form, 'from').split(' ');
    const known = (Object.keys(STARTS) as Start[]).find((one) => one === start);
    const spans = Number(textOf(form, 'spans') || '3');
    const faults = [
      ...(title === '' ? [at('/title', 'Give it a title: what stands on what, under which load.')] : []),
      ...(title.length > 120 ? [at('/title', 'Give at most 120 characters.')] : []),
      ...(title !== '' && (!SLUG.test(slug) || slug.length > LONGEST_SLUG)
        ? [at('/slug', 'Give it an address: small letters, digits and hyphens.')]
        : []),
      ...(start === 'issued' && source === ''
        ? [at('/from', 'Choose the template that it goes on from.')]
        : []),
      ...(start !== 'issued' && !known ? [at('/start', 'Choose how it starts.')] : []),
      ...(start === 'spans' && !(Number.isInteger(spans) && spans >= 2 && spans <= MOST_SPANS)
        ? [at('/spans', `Give 2 to ${MOST_SPANS}.`)]
        : []),
    ];
    if (faults.length > 0) throw invalid(faults);
    const key = { kind: 'template', slug } as const;
    const body = known
      ? { document: startDocument(title, known, spans) }
      : { from: { slug: source, revision: Number(revision) } };
    const made = await beginDraft(actor, key, NewDraft.parse(body));
    if (!known) await rename(actor, made, title);
    return paths.libraryDraft(made.kind, made.slug, made.revision);
  });

/** What goes on from another template is called as its author says. */
async function rename(
  actor: Actor,
  made: Awaited<ReturnType<typeof beginDraft>>,
  title: string,
): Promise<void> {
  const { kind, slug, revision, version, document, change_note, change_class, consequence } = made;
  await saveDraft(actor, { kind, slug, number: revision }, version, {
    document: { ...document, name: title },
    change_note,
    change_class,
    consequence,
  });
}
