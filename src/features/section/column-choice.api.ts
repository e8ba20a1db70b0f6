import { paths } from '@/paths';
import type { ColumnChoice } from './column-choice';

/** Keeps the choice with the person; answers with why it is not kept, or null. */
export async function putColumnChoice(choice: ColumnChoice): Promise<string | null> {
  const response = await fetch(paths.api.sectionColumns, {
    method: 'PUT',
    headers: { 'Content-Type': 'application/json' },
    body: JSON.stringify(choice),
  }).catch(() => null);
  if (response?.ok) return null;
  return response?.status === 401
    ? 'The session has ended: the columns are in this page’s address, but not kept. Sign in in another tab.'
    : 'The columns are in this page’s address, but not kept for your next visit.';
}
