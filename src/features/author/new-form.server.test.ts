import { beforeAll, describe, expect, test } from 'vitest';
import type { Outcome } from '@/features/desk/form';
import { readDraft } from '@/features/review/draft.server';
import { AppError } from '@/lib/app-error';
import { paths } from '@/paths';
import { issueTemplate } from '../../../tests/support/library';
import { foundPractice, type Member } from '../../../tests/support/practice';
import { takeNewTemplate } from './new-form.server';

const ISSUED = 'simple-span-uniform';

let librarian: Member;
let reader: Member;

beforeAll(async () => {
  const [author, reviewer, other] = await foundPractice(['librarian'], ['checker'], ['reader']);
  if (!author || !reviewer || !other) throw new Error('three people were founded');
  [librarian, reader] = [author, other];
  await issueTemplate({ author, reviewer }, ISSUED);
});

const take = (fields: Readonly<Record<string, string>>, by: Member = librarian): Promise<Outcome> => {
  const form = new FormData();
  for (const [name, value] of Object.entries(fields)) form.set(name, value);
  return takeNewTemplate(by, form);
};
const draftAt = (slug: string) => readDraft(librarian, { kind: 'template', slug, number: 1 });
const faultsOf = (outcome: Outcome): string[] =>
  outcome.kind === 'done' ? [] : outcome.faults.map(({ pointer }) => pointer);

describe('a new template', () => {
  test('begins at an address made from its title, and lacks only what its author must say', async () => {
    const outcome = await take({ title: 'Two spans, tip load', start: 'two-spans-overhang' });
    expect(outcome).toEqual({ kind: 'done', to: paths.libraryDraft('template', 'two-spans-tip-load', 1) });
    const { document, faults } = await draftAt('two-spans-tip-load');
    expect(document).toMatchObject({ name: 'Two spans, tip load', arrangement: 'multi-span' });
    expect(document['reference']).toMatch(/^Continuous \d+$/);
    expect([...new Set(faults.map(({ pointer }) => pointer.split('/')[1]))].sort()).toEqual([
      'do_not_use',
      'method',
      'proof_cases',
      'sources',
      'use',
    ]);
  });

  test('goes on from an issued one under its own title, with its lineage', async () => {
    await take({ title: 'Our span', start: 'issued', from: `${ISSUED} 1`, slug: 'our-span' });
    const draft = await draftAt('our-span');
    expect(draft.document['name']).toBe('Our span');
    expect(draft.derived_from).toMatchObject({ slug: ISSUED, revision: 1, state: 'issued' });
    expect(draft.faults).toEqual([]);
  });

  test.each([
    [{ title: '', start: 'simple-span' }, ['/title']],
    [{ title: '???', start: 'simple-span' }, ['/slug']],
    [{ title: 'A', start: 'no such start', slug: 'Not One' }, ['/slug', '/start']],
    [{ title: 'A', start: 'spans', spans: '7' }, ['/spans']],
    [{ title: 'A', start: 'issued' }, ['/from']],
  ])('from %j is refused at %j', async (fields, pointers) => {
    expect(faultsOf(await take(fields))).toEqual(pointers);
  });

  test('at an address that is taken is refused in words, and by who may not propose at all', async () => {
    await take({ title: 'Taken', start: 'cantilever' });
    const again = await take({ title: 'Taken', start: 'cantilever' });
    expect(again).toMatchObject({ kind: 'refused', status: 409 });
    const refused = await take({ title: 'Mine', start: 'cantilever' }, reader);
    expect(refused).toMatchObject({ kind: 'refused', status: 403 });
    await expect(draftAt('mine')).rejects.toThrow(AppError);
  });
});
