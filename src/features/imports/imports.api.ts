import { type Answer, ask, type Refused, refused, toAnswer } from '@/http/ask';
import { paths } from '@/paths';
import type { Accept, Commit, Fixes, ImportProgress, ImportView, SaveMapping } from './imports';

export type Acted =
  | { readonly kind: 'done'; readonly view: ImportView }
  /** Somebody else acted before: the import as it stands now. */
  | { readonly kind: 'stale'; readonly view: ImportView }
  /** With the import as it stands though this was refused, where an earlier step was kept. */
  | (Refused & { readonly view?: ImportView });

function toActed(answer: Answer): Acted {
  if (answer.kind === 'done') return { kind: 'done', view: answer.json as ImportView };
  return answer.kind === 'stale' ? { kind: 'stale', view: answer.current as ImportView } : answer;
}

const act = async (method: string, url: string, version?: number, json?: unknown): Promise<Acted> =>
  toActed(await ask(method, url, { version, json }));

export const importApi = {
  read: (id: string) => act('GET', paths.api.import(id)),
  map: (id: string, version: number, body: SaveMapping) =>
    act('PUT', `${paths.api.import(id)}/mapping`, version, body),
  check: (id: string, version: number) => act('POST', `${paths.api.import(id)}/check`, version),
  fix: (id: string, version: number, body: Partial<Fixes>) =>
    act('POST', `${paths.api.import(id)}/fixes`, version, body),
  accept: (id: string, version: number, body: Accept) =>
    act('POST', `${paths.api.import(id)}/accept`, version, body),
  commit: (id: string, version: number, body: Commit) =>
    act('POST', `${paths.api.import(id)}/commit`, version, body),
  cancel: (id: string, version: number) => act('POST', `${paths.api.import(id)}/cancel`, version),
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
    request.onload = () => resolve(toActed(toAnswer(request.status, request.response)));
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
