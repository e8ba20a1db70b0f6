import { and, eq, like, ne } from 'drizzle-orm';
import type { Tx } from '@/db/client';
import { document } from '@/db/schema/library';
import { ARRANGEMENTS, type Arrangement } from '@/engine/template/document';
import type { Fault } from '@/lib/app-error';
import type { Written } from './draft';
import type { DocumentKey } from './rows.server';

const WORDS: Record<Arrangement, string> = {
  'simple-span': 'Span',
  cantilever: 'Cantilever',
  'propped-cantilever': 'Prop',
  'fixed-ends': 'Fixed',
  overhang: 'Overhang',
  'multi-span': 'Continuous',
};

/** The next free reference for a template: "Overhang 7". Its author may choose another. */
export async function nextReference(tx: Tx, practiceId: string, { arrangement }: Written): Promise<string> {
  const known = ARRANGEMENTS.find((one) => one === arrangement);
  const word = known ? WORDS[known] : 'Beam';
  const taken = await tx
    .select({ reference: document.reference })
    .from(document)
    .where(and(eq(document.practiceId, practiceId), like(document.reference, `${word} %`)));
  const numbers = taken.map(({ reference }) => Number(reference.slice(word.length + 1)) || 0);
  return `${word} ${Math.max(0, ...numbers) + 1}`;
}

export async function isReferenceTaken(
  tx: Tx,
  practiceId: string,
  reference: string,
  but: { readonly id: string },
): Promise<boolean> {
  const [other] = await tx
    .select({ id: document.id })
    .from(document)
    .where(
      and(eq(document.practiceId, practiceId), eq(document.reference, reference), ne(document.id, but.id)),
    );
  return other !== undefined;
}

export const referenceTaken = (reference: string): Fault => ({
  pointer: '/reference',
  code: 'duplicate',
  message: `The reference ${reference} belongs to another document. Choose another.`,
});

const LONGEST_NAME = 120;

/** What a document is called: as it says itself, or by its address until it does. */
export const nameIn = ({ name }: Written, { slug }: Pick<DocumentKey, 'slug'>): string => {
  const given = typeof name === 'string' ? name.trim() : '';
  return given !== '' && given.length <= LONGEST_NAME ? given : slug;
};

const LONGEST_REFERENCE = 40;

/** The reference that a document gives itself; null where it gives none that could be one. */
export const referenceIn = ({ reference }: Written): string | null =>
  typeof reference === 'string' && /^\S/.test(reference) && reference.length <= LONGEST_REFERENCE
    ? reference
    : null;
