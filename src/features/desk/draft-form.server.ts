import { requirePermission } from '@/features/account/permission';
import { type RevisionKey, SaveDraft } from '@/features/review/draft';
import { abandonDraft, saveDraft } from '@/features/review/draft.server';
import { takeStepAt } from '@/features/review/review.server';
import type { Actor } from '@/features/review/rows.server';
import { AppError, type Fault, invalid } from '@/lib/app-error';
import { read } from '@/lib/read';
import { paths } from '@/paths';
import { attempt, choiceOf, type Outcome, textOf, unknownAct } from './form';
import { parseJson } from './json';

/** Takes the draft's form: saves it, saves it and sends it to review, or lays it aside. */
export const takeDraftForm = (actor: Actor, key: RevisionKey, form: FormData): Promise<Outcome> =>
  attempt(async () => {
    switch (textOf(form, 'step')) {
      case 'save':
        await save(actor, key, form);
        return `${paths.libraryDraftText(key.kind, key.slug, key.number)}&done=saved`;
      case 'submit':
        await submit(actor, key, await save(actor, key, form));
        return `${paths.review(key.kind, key.slug, key.number)}?done=submit`;
      case 'abandon':
        await abandonDraft(actor, key);
        return paths.libraryDocument(key.kind, key.slug);
      default:
        throw unknownAct();
    }
  });

/** What is refused here was saved all the same: the refusal says as which version. */
async function submit(actor: Actor, key: RevisionKey, version: number): Promise<void> {
  try {
    await takeStepAt(actor, key, { step: 'submit' }, version);
  } catch (error) {
    if (!(error instanceof AppError)) throw error;
    const { code, message, faults } = error;
    throw new AppError(code, message, { faults, current: version, cause: error });
  }
}

/** Returns the version that was written. */
async function save(actor: Actor, key: RevisionKey, form: FormData): Promise<number> {
  requirePermission(actor, 'library.read');
  const document = parseJson(textOf(form, 'document'));
  const reading = read(SaveDraft, {
    document: document.ok ? document.value : {},
    change_note: textOf(form, 'change_note'),
    change_class: choiceOf(form, 'change_class'),
    consequence: choiceOf(form, 'consequence'),
  });
  const faults: Fault[] = [
    ...(document.ok
      ? []
      : [
          {
            pointer: '/document',
            code: 'bad_json',
            message: `Not saved. This is not JSON: ${document.message}`,
          },
        ]),
    ...(reading.ok ? [] : reading.faults),
  ];
  if (!reading.ok || faults.length > 0) throw invalid(faults);
  const saved = await saveDraft(actor, key, Number(textOf(form, 'version')), reading.value);
  return saved.version;
}
