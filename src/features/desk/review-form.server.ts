import { askImpact } from '@/features/impact/impact.server';
import { askProof } from '@/features/proof/proof.server';
import { NewComment, ReturnStep } from '@/features/review/comment';
import { addComment, resolveComment } from '@/features/review/comment.server';
import type { RevisionKey } from '@/features/review/draft';
import { WithdrawStep } from '@/features/review/recall';
import { type StepRequest, takeStepAt } from '@/features/review/review.server';
import type { Actor } from '@/features/review/rows.server';
import { Restore } from '@/features/section/edition';
import { restoreEdition } from '@/features/section/restore.server';
import { idParam } from '@/http/params';
import { invalid } from '@/lib/app-error';
import { type Reading, read } from '@/lib/read';
import { paths } from '@/paths';
import { attempt, type Outcome, textOf, unknownAct } from './form';

/** Takes a form of the review page: a comment, a reply, a proof, an impact, or a step. */
export const takeReviewForm = (actor: Actor, key: RevisionKey, form: FormData): Promise<Outcome> =>
  attempt(async () => {
    const here = paths.review(key.kind, key.slug, key.number);
    const act = textOf(form, 'act');
    switch (act) {
      case 'comment':
        await addComment(
          actor,
          key,
          given(read(NewComment, { body: textOf(form, 'body'), pointer: textOf(form, 'pointer').trim() })),
        );
        return `${here}?done=comment#comments`;
      case 'reply':
        await addComment(
          actor,
          key,
          given(read(NewComment, { body: textOf(form, 'body'), reply_to: textOf(form, 'id') })),
        );
        return `${here}?done=comment#comment-${textOf(form, 'id')}`;
      case 'resolve': {
        const id = idParam({ id: textOf(form, 'id') }, 'id', 'This comment');
        await resolveComment(actor, key, id, textOf(form, 'on') === 'yes');
        return `${here}?done=comment#comment-${id}`;
      }
      case 'prove':
        await askProof(actor, key);
        return `${here}?done=prove#proof`;
      case 'weigh':
        await askImpact(actor, key, { from: 0, limit: 1, outcome: undefined });
        return `${here}?done=weigh#impact`;
      case 'restore': {
        const said = { reason: textOf(form, 'reason'), consequence: textOf(form, 'consequence') };
        const { number } = await restoreEdition(actor, key, given(read(Restore, said)));
        return `${paths.review(key.kind, key.slug, number)}?done=submit`;
      }
      case 'submit':
      case 'return':
      case 'issue':
        await takeStepAt(actor, key, stepOf(act, form), Number(textOf(form, 'version')));
        return `${here}?done=${act}`;
      default:
        throw unknownAct();
    }
  });

function stepOf(act: 'submit' | 'return' | 'issue', form: FormData): StepRequest {
  if (act !== 'return') return { step: act };
  const said = { comment: textOf(form, 'comment'), pointer: textOf(form, 'pointer').trim() };
  return { step: 'return', ...given(read(ReturnStep, said)) };
}

function given<T>(reading: Reading<T>): T {
  if (!reading.ok) throw invalid(reading.faults);
  return reading.value;
}

/** Takes the form of a withdrawal. Where nothing used the revision there is no recall to go on to. */
export const takeWithdrawal = (actor: Actor, key: RevisionKey, form: FormData): Promise<Outcome> =>
  attempt(async () => {
    const said = { reason: textOf(form, 'reason'), severity: textOf(form, 'severity') };
    const reading = read(WithdrawStep, said);
    if (!reading.ok)
      throw invalid(
        reading.faults.map((fault) =>
          fault.pointer === '/severity'
            ? { ...fault, message: 'Say what is at stake for the members that use it.' }
            : fault,
        ),
      );
    const moved = await takeStepAt(
      actor,
      key,
      { step: 'withdraw', ...reading.value },
      Number(textOf(form, 'version')),
    );
    return moved.recallId
      ? paths.recall(moved.recallId)
      : `${paths.review(key.kind, key.slug, key.number)}?done=withdraw`;
  });
