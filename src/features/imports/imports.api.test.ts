import { afterEach, expect, test, vi } from 'vitest';
import { uploadSource } from './imports.api';

afterEach(() => vi.unstubAllGlobals());

/** The file that goes out as the form's, where the server does not answer. */
async function sent(file: File): Promise<File> {
  let form: FormData | undefined;
  class Silent {
    readonly upload = {};
    onerror: (() => void) | undefined;
    readonly open = () => undefined;
    readonly setRequestHeader = () => undefined;
    send(body: FormData) {
      form = body;
      this.onerror?.();
    }
  }
  vi.stubGlobal('XMLHttpRequest', Silent);
  const watch = { onProgress: () => undefined, signal: new AbortController().signal };
  expect(await uploadSource('an-import', 1, file, watch)).toMatchObject({ kind: 'refused' });
  return form?.get('file') as File;
}

test.each([
  ['Issue 7.PDF', '', 'application/pdf'],
  ['table.csv', '', 'text/csv'],
  ['page.png', 'image/png', 'image/png'],
])('%s of type “%s” is sent as %s', async (name, type, expected) => {
  const file = await sent(new File(['%PDF-1.7'], name, { type }));
  expect([file.name, file.type, await file.text()]).toEqual([name, expected, '%PDF-1.7']);
});
