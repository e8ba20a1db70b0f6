import { Decide } from '@/features/review/recall';
import { closeRecall, decideUse } from '@/features/review/recall.server';
import type { Actor } from '@/features/review/rows.server';
import { idParam } from '@/http/params';
import { invalid } from '@/lib/app-error';
import { read } from '@/lib/read';
import { paths } from '@/paths';
import { attempt, type Outcome, textOf, unknownAct } from './form';

/** Takes a form of the recall's page: a decision about one use, or the close. */
export const takeRecallForm = (actor: Actor, recallId: string, form: FormData): Promise<Outcome> =>
  attempt(async () => {
    switch (textOf(form, 'act')) {
      case 'decide':
        return decide(actor, recallId, form);
      case 'close':
        await closeRecall(actor, recallId);
        return `${paths.recall(recallId)}?done=closed`;
      default:
        throw unknownAct();
    }
  });

async function decide(actor: Actor, recallId: string, form: FormData): Promise<string> {
  const memberId = idParam({ id: textOf(form, 'id') }, 'id', 'This use of the recalled revision');
  const reading = read(Decide, { decision: textOf(form, 'decision'), note: textOf(form, 'note') });
  if (!reading.ok) throw invalid(reading.faults.map(unchosen));
  await decideUse(actor, recallId, memberId, reading.value);
  return `${paths.recall(recallId)}?done=decided#use-${memberId}`;
}

const unchosen = (fault: { pointer: string; code: string; message: string }) =>
  fault.pointer === '/decision' ? { ...fault, message: 'Choose what becomes of this member.' } : fault;
