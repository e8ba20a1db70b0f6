import { AnswerRequest, NewRequest } from '@/features/review/request';
import { answerRequest, raiseRequest } from '@/features/review/request.server';
import { readScreen } from '@/features/review/request-screen.server';
import { DOCUMENT_KINDS } from '@/features/review/review';
import type { Actor } from '@/features/review/rows.server';
import { invalid } from '@/lib/app-error';
import { read } from '@/lib/read';
import { localPath, paths } from '@/paths';
import { attempt, type Outcome, textOf } from './form';

/** A document as a form's choice names it: "template propped-cantilever"; null for none. */
const documentOf = (form: FormData) => {
  const [kind, slug] = textOf(form, 'document').split(' ');
  return kind && slug ? { kind, slug } : null;
};

export const documentValue = (document: { readonly kind: string; readonly slug: string } | null): string =>
  document ? `${document.kind} ${document.slug}` : '';

/** The document that a screen shows, by its address; none where it shows none. */
export function documentOfScreen(from: string): string {
  const [, area, second, third] = from.split(/[?#]/)[0]?.split('/') ?? [];
  if (area === 'templates' && second) return documentValue({ kind: 'template', slug: second });
  if (area === 'sections' && second) return documentValue({ kind: 'section-table', slug: second });
  const isDocument = area === 'library' && third && DOCUMENT_KINDS.some((kind) => kind === second);
  return isDocument && second ? documentValue({ kind: second, slug: third }) : '';
}

/** Takes the form of a new request, with the screen that it was raised from. */
export const takeNewRequest = (actor: Actor, form: FormData): Promise<Outcome> =>
  attempt(async () => {
    const from = textOf(form, 'from');
    const reading = read(NewRequest, {
      kind: textOf(form, 'kind'),
      title: textOf(form, 'title'),
      body: textOf(form, 'body'),
      context: from ? await readScreen(actor, localPath(from)) : {},
      document: documentOf(form),
    });
    if (!reading.ok) throw invalid(reading.faults);
    const made = await raiseRequest(actor, reading.value);
    return `${paths.request(made.number)}?done=raised`;
  });

/** Takes the librarian's answer over the version that was read. */
export const takeAnswer = (actor: Actor, number: number, form: FormData): Promise<Outcome> =>
  attempt(async () => {
    const reading = read(AnswerRequest, {
      state: textOf(form, 'state'),
      answer: textOf(form, 'answer'),
      document: documentOf(form),
    });
    if (!reading.ok) throw invalid(reading.faults);
    await answerRequest(actor, number, Number(textOf(form, 'version')), reading.value);
    return `${paths.request(number)}?done=answered`;
  });
