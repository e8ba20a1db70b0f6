import { z } from 'zod';

const values = z.record(z.string(), z.unknown());

/** What stood on the screen that a request was raised from; what else a caller of the interface attaches stands beside it. */
export const RequestScreen = z.object({
  address: z.string().optional(),
  template: z.object({ slug: z.string(), reference: z.string(), revision: z.int() }).optional(),
  member: z
    .object({
      job: z.string(),
      mark: z.string(),
      version: z.int(),
      section: z.string().nullable(),
      criteria: z.string().nullable(),
      /** Of its results; null where it was not evaluated. */
      fingerprint: z.string().nullable(),
      engine_version: z.string().nullable(),
    })
    .optional(),
  /** The values of the parameters by symbol, or the filters of a list by name. */
  values: values.optional(),
});
export type RequestScreen = z.output<typeof RequestScreen>;

/** A page by its address: which template or member it shows. */
type Screen =
  | { readonly kind: 'template'; readonly slug: string; readonly number: number | undefined }
  | { readonly kind: 'member'; readonly job: string; readonly mark: string }
  | { readonly kind: 'other' };

const TEMPLATE = /^\/templates\/([^/]+)(?:\/revisions\/(\d+))?$/;
const MEMBER = /^\/jobs\/([^/]+)\/members\/([^/]+)(?:\/sheet)?$/;

export function screenOf(address: string): Screen {
  const path = address.split(/[?#]/)[0] ?? '';
  try {
    const [, slug, number] = TEMPLATE.exec(path) ?? [];
    if (slug)
      return {
        kind: 'template',
        slug: decodeURIComponent(slug),
        number: number ? Number(number) : undefined,
      };
    const [, job, mark] = MEMBER.exec(path) ?? [];
    if (job && mark && mark !== 'new')
      return { kind: 'member', job: decodeURIComponent(job), mark: decodeURIComponent(mark) };
  } catch {
    // an address that is not well written leads nowhere
  }
  return { kind: 'other' };
}

const LONGEST_VALUE = 4000; // characters

/** The query of an address, by name. */
export function queryOf(address: string): Record<string, string> {
  const at = address.indexOf('?');
  const query = new URLSearchParams(at < 0 ? '' : (address.slice(at).split('#')[0] ?? ''));
  return Object.fromEntries([...query].filter(([, value]) => value.length <= LONGEST_VALUE));
}

/** A value as a line: loads by their groups, rows one after the other. */
export function valueWords(value: unknown): string {
  if (Array.isArray(value)) return value.map(valueWords).join('; ');
  if (typeof value !== 'object' || value === null) return String(value);
  return Object.entries(value)
    .map(([name, part]) => `${name} ${valueWords(part)}`)
    .join(', ');
}
