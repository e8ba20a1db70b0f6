import { z } from 'zod';
import { paths } from '@/paths';
import { sectionView } from './edition';
import { type SectionItem, sectionItemSchema } from './section';
import { type Spread, spreadSchema } from './spread';

const page = z.object({
  items: z.array(sectionItemSchema),
  next: z.string().nullable(),
  total: z.number(),
});
export type SectionPage = z.output<typeof page>;

/** The sections could not be read: said to the person, with what to do. */
class SectionsUnread extends Error {
  constructor(
    readonly status?: number,
    options?: ErrorOptions,
  ) {
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
  return page.parse(await readJson(`${paths.api.sections}?${new URLSearchParams(query)}`, signal));
}

async function readJson(address: string, signal?: AbortSignal): Promise<unknown> {
  const response = await fetch(address, { signal: signal ?? null }).catch((cause: unknown) => {
    if (signal?.aborted) throw cause;
    throw new SectionsUnread(undefined, { cause });
  });
  if (!response.ok) throw new SectionsUnread(response.status);
  return response.json();
}

/** How the depth and mass of what answers a query are spread, in bins round in a unit system. */
export async function fetchSpread(
  query: Readonly<Record<string, string>>,
  signal: AbortSignal,
): Promise<Spread> {
  return spreadSchema.parse(
    await readJson(`${paths.api.sectionSpread}?${new URLSearchParams(query)}`, signal),
  );
}

/** One section of its issued edition; null where there is none. */
export async function fetchSection(
  table: string,
  designation: string,
  signal: AbortSignal,
): Promise<SectionItem | null> {
  try {
    const { source: _, ...item } = sectionView.parse(
      await readJson(paths.api.section(table, designation), signal),
    );
    return item;
  } catch (error) {
    if (error instanceof SectionsUnread && error.status === 404) return null;
    throw error;
  }
}

/** Rows of a page. */
export const MOST = '200';

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
