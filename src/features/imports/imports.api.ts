import { z } from 'zod';
import type { Fault } from '@/lib/app-error';
import { paths } from '@/paths';
import type { Accept, Commit, Fixes, ImportProgress, ImportView, SaveMapping } from './imports';

export type Acted =
  | { readonly kind: 'done'; readonly view: ImportView }
  /** Somebody else acted before: the import as it stands now. */
  | { readonly kind: 'stale'; readonly view: ImportView }
  | Refused;

interface Refused {
  readonly kind: 'refused';
  readonly message: string;
  readonly faults: readonly Fault[];
  /** The import as it stands though this was refused, where an earlier step was kept. */
  readonly view?: ImportView;
}

const problem = z.object({
  detail: z.string(),
  errors: z.array(z.object({ pointer: z.string(), code: z.string(), message: z.string() })),
  current: z.unknown().optional(),
});

const LOST = 'The server does not answer. Nothing is lost; try again in a moment.';
const ENDED = 'The session has ended. Sign in in another tab, then try again; nothing typed is lost.';

const refused = (message: string, faults: readonly Fault[] = []): Refused => ({
  kind: 'refused',
  message,
  faults,
});

function toActed(status: number, json: unknown): Acted {
  if (status >= 200 && status < 300) return { kind: 'done', view: json as ImportView };
  const reading = problem.safeParse(json);
  if (!reading.success) return refused(LOST);
  const { detail, errors, current } = reading.data;
  if (status === 412 && current !== undefined) return { kind: 'stale', view: current as ImportView };
  return status === 401 ? refused(ENDED) : refused(detail, errors);
}

async function ask(method: string, url: string, version: number | null, body?: unknown): Promise<Acted> {
  const response = await fetch(url, {
    method,
    headers: {
      ...(body !== undefined && { 'Content-Type': 'application/json' }),
      ...(version !== null && { 'If-Match': `"${version}"` }),
    },
    ...(body !== undefined && { body: JSON.stringify(body) }),
  }).catch(() => null);
  if (!response) return refused(LOST);
  return toActed(response.status, await response.json().catch(() => null));
}

export const importApi = {
  read: (id: string) => ask('GET', paths.api.import(id), null),
  map: (id: string, version: number, body: SaveMapping) =>
    ask('PUT', `${paths.api.import(id)}/mapping`, version, body),
  check: (id: string, version: number) => ask('POST', `${paths.api.import(id)}/check`, version),
  fix: (id: string, version: number, body: Partial<Fixes>) =>
    ask('POST', `${paths.api.import(id)}/fixes`, version, body),
  accept: (id: string, version: number, body: Accept) =>
    ask('POST', `${paths.api.import(id)}/accept`, version, body),
  commit: (id: string, version: number, body: Commit) =>
    ask('POST', `${paths.api.import(id)}/commit`, version, body),
  cancel: (id: string, version: number) => ask('POST', `${paths.api.import(id)}/cancel`, version),
};

/** Null where the server does not answer now. */
export async function readProgress(id: string): Promise<ImportProgress | null> {
  const response = await fetch(`${paths.api.import(id)}/progress`).catch(() => null);
  return response?.ok ? response.json() : null;
}

/** A file's type as browsers say it; some know none for a CSV file or a PDF. */
const typeOf = ({ type, name }: File): string =>
  type || (/\.pdf$/i.test(name) ? 'application/pdf' : 'text/csv');

interface Sending {
  readonly method: 'POST' | 'PUT';
  readonly url: string;
  /** Of the import that it belongs to; none of a new one. */
  readonly version?: number;
  readonly onProgress: (share: number) => void;
  readonly signal: AbortSignal;
}

/** Sends a file as a form. Only this older interface of browsers tells how much has gone. */
function sendFile(file: File, { method, url, version, onProgress, signal }: Sending): Promise<Acted> {
  return new Promise((resolve) => {
    const request = new XMLHttpRequest();
    request.open(method, url);
    if (version !== undefined) request.setRequestHeader('If-Match', `"${version}"`);
    request.responseType = 'json';
    request.upload.onprogress = ({ loaded, total }) => onProgress(total > 0 ? loaded / total : 1);
    request.onload = () => resolve(toActed(request.status, request.response));
    request.onerror = () => resolve(refused('The file did not get through. Try again.'));
    request.onabort = () => resolve(refused('The upload was stopped. Nothing was kept.'));
    signal.addEventListener('abort', () => request.abort());
    const form = new FormData();
    form.set('file', new File([file], file.name, { type: typeOf(file) }));
    request.send(form);
  });
}

type Watch = Pick<Sending, 'onProgress' | 'signal'>;

export const uploadTable = (file: File, watch: Watch) =>
  sendFile(file, { method: 'POST', url: paths.api.imports, ...watch });

export const uploadSource = (id: string, version: number, file: File, watch: Watch) =>
  sendFile(file, { method: 'PUT', url: `${paths.api.import(id)}/source`, version, ...watch });
