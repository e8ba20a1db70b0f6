import { z } from 'zod';
import type { Fault } from '@/lib/app-error';
import { paths } from '@/paths';
import type {
  Holding,
  MarkName,
  NewStockLine,
  StockCheck,
  StockLine,
  StockListChange,
  StockListView,
} from './stock';

export type Acted<T> =
  | { readonly kind: 'done'; readonly value: T; readonly version: number }
  /** Somebody else changed the list before: as it stands now. */
  | { readonly kind: 'stale'; readonly list: StockListView }
  | { readonly kind: 'refused'; readonly message: string; readonly faults: readonly Fault[] };

const problem = z.object({
  detail: z.string(),
  errors: z.array(z.object({ pointer: z.string(), code: z.string(), message: z.string() })),
  current: z.unknown().optional(),
});

const LOST = 'The server does not answer. Nothing is lost; try again in a moment.';
const ENDED = 'The session has ended. Sign in in another tab, then try again; nothing typed is lost.';

const refused = (message: string, faults: readonly Fault[] = []) =>
  ({ kind: 'refused', message, faults }) as const;

interface Asked {
  readonly method: string;
  readonly url: string;
  readonly version?: number;
  readonly json?: unknown;
  readonly csv?: string;
}

/** The version out of an entity tag; 0 where there is none. */
const versionOf = (response: Response): number =>
  Number(/\d+/.exec(response.headers.get('etag') ?? '')?.[0] ?? 0);

async function ask<T>({ method, url, version, json, csv }: Asked): Promise<Acted<T>> {
  const type = csv === undefined ? 'application/json' : 'text/csv; charset=utf-8';
  const body = csv ?? (json === undefined ? undefined : JSON.stringify(json));
  const response = await fetch(url, {
    method,
    headers: {
      ...(body !== undefined && { 'Content-Type': type }),
      ...(version !== undefined && { 'If-Match': `"${version}"` }),
    },
    ...(body !== undefined && { body }),
  }).catch(() => null);
  if (!response) return refused(LOST);
  const answered: unknown = response.status === 204 ? null : await response.json().catch(() => undefined);
  if (response.ok && answered !== undefined)
    return { kind: 'done', value: answered as T, version: versionOf(response) };
  const reading = problem.safeParse(answered);
  if (!reading.success) return refused(LOST);
  const { detail, errors, current } = reading.data;
  if (response.status === 412 && current !== undefined)
    return { kind: 'stale', list: current as StockListView };
  return response.status === 401 ? refused(ENDED) : refused(detail, errors);
}

export interface LinesPage {
  readonly items: readonly StockLine[];
  readonly next: string | null;
  readonly total: number;
}

/** Lines, and what a comma between two digits is in their lengths. */
export interface MarkedCsv {
  readonly csv: string;
  readonly mark: MarkName;
}

export const stockApi = {
  read: (slug: string) => ask<StockListView>({ method: 'GET', url: paths.api.stockList(slug) }),
  lines: (slug: string, query: Readonly<Record<string, string>>) =>
    ask<LinesPage>({ method: 'GET', url: `${paths.api.stockLines(slug)}?${new URLSearchParams(query)}` }),
  change: (slug: string, version: number, json: StockListChange) =>
    ask<StockListView>({ method: 'PATCH', url: paths.api.stockList(slug), version, json }),
  remove: (slug: string, version: number) =>
    ask<null>({ method: 'DELETE', url: paths.api.stockList(slug), version }),
  addLine: (slug: string, version: number, json: NewStockLine) =>
    ask<StockLine>({ method: 'POST', url: paths.api.stockLines(slug), version, json }),
  changeLine: (slug: string, version: number, { id, ...held }: Holding & { readonly id: string }) =>
    ask<StockLine>({ method: 'PATCH', url: paths.api.stockLine(slug, id), version, json: held }),
  removeLine: (slug: string, version: number, id: string) =>
    ask<null>({ method: 'DELETE', url: paths.api.stockLine(slug, id), version }),
  check: (slug: string, { csv, mark }: MarkedCsv) =>
    ask<StockCheck>({
      method: 'POST',
      url: `${paths.api.checkStock(slug)}?${new URLSearchParams({ mark })}`,
      csv,
    }),
  replace: (slug: string, version: number, { asOf, csv, mark }: MarkedCsv & { readonly asOf: string }) =>
    ask<StockListView>({
      method: 'PUT',
      url: `${paths.api.stockLines(slug)}?${new URLSearchParams({ as_of: asOf, mark })}`,
      version,
      csv,
    }),
};
