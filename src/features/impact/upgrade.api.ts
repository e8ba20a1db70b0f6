import { z } from 'zod';
import type { Template } from '@/engine/template';
import { parameterChanges } from '@/features/member/carry';
import { type Moves, TriedView } from '@/features/member/member';
import { paths } from '@/paths';

/** What a member comes to with another revision in place of one that it pins. */
export type Trying =
  | { readonly kind: 'tried'; readonly tried: TriedView }
  | { readonly kind: 'refused'; readonly message: string };

const problem = z.object({ detail: z.string(), errors: z.array(z.object({ message: z.string() })) });
const LOST = 'The server does not answer. Try again in a moment.';

/** Of the member as it is saved. */
export async function tryMoves(job: string, mark: string, moves: Moves): Promise<Trying> {
  const response = await fetch(`${paths.api.member(job, mark)}/evaluate`, {
    method: 'POST',
    headers: { 'Content-Type': 'application/json' },
    body: JSON.stringify(moves),
  }).catch(() => null);
  const json: unknown = await response?.json().catch(() => null);
  if (response?.ok) return { kind: 'tried', tried: TriedView.parse(json) };
  const reading = problem.safeParse(json);
  const [first] = reading.success ? reading.data.errors : [];
  return { kind: 'refused', message: first?.message ?? (reading.success ? reading.data.detail : LOST) };
}

/** Names of the parameters that go and of those that come with another revision of the template. */
export async function readParameterChanges(slug: string, number: number, from: Template) {
  const response = await fetch(paths.api.templateRevision(slug, number)).catch(() => null);
  if (!response?.ok) return { gone: [], taken: [] };
  const { document }: { document: Template } = await response.json();
  return parameterChanges(from, document);
}
