import { z } from 'zod';
import { paths } from '@/paths';
import { type SectionItem, sectionItemSchema } from './section';

const page = z.object({
  items: z.array(sectionItemSchema),
  next: z.string().nullable(),
  total: z.number(),
});
export type SectionPage = z.output<typeof page>;

/** The sections could not be read: said to the person, with what to do. */
class SectionsUnread extends Error {
  constructor(status?: number, options?: ErrorOptions) {
    super(
      status === 401
        ? 'The session has ended. Sign in again; nothing typed here is lost.'
        : 'The sections could not be read. Try again in a moment.',
      options,
    );
    this.name = 'SectionsUnread';
  }
}

/** One page of GET /api/v1/sections; ranges in mm and kg/m whatever the person reads. */
export async function fetchSections(
  query: Readonly<Record<string, string>>,
  signal?: AbortSignal,
): Promise<SectionPage> {
  const response = await fetch(`${paths.api.sections}?${new URLSearchParams(query)}`, {
    signal: signal ?? null,
  }).catch((cause: unknown) => {
    if (signal?.aborted) throw cause;
    throw new SectionsUnread(undefined, { cause });
  });
  if (!response.ok) throw new SectionsUnread(response.status);
  return page.parse(await response.json());
}

const MOST = '200';

/** Every section, in parts as they come. */
export async function fetchAllSections(
  signal: AbortSignal,
  onPart: (items: readonly SectionItem[], total: number) => void,
): Promise<void> {
  let cursor: string | null = null;
  do {
    const part: SectionPage = await fetchSections({ limit: MOST, ...(cursor && { cursor }) }, signal);
    onPart(part.items, part.total);
    cursor = part.next;
  } while (cursor !== null);
}
