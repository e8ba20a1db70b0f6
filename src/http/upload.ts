import type { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import { Busboy } from '@fastify/busboy';
import type { APIContext } from 'astro';
import { AppError, invalid } from '@/lib/app-error';
import { pointer } from '@/lib/pointer';

/** A file as it comes. Its body ends well only where the form does, with nothing else in it. */
interface ArrivingFile {
  readonly name: string;
  readonly type: string;
  readonly body: AsyncIterable<Uint8Array>;
}

/** The one part that a form of ours has. */
const FIELD = 'file';
/** Bytes of a form, chunked or announced: the largest file, and what may stand around it. */
const MOST = 51 * 1024 * 1024;
const LIMITS = { parts: 1, headerPairs: 20, headerSize: 16 * 1024 };

/** Hands on the file of a form while it comes: never whole in memory, and read no further once it is refused. */
export async function takeFile<T>(
  { request }: Pick<APIContext, 'request'>,
  take: (file: ArrivingFile) => Promise<T>,
): Promise<T> {
  if (Number(request.headers.get('content-length')) > MOST) throw tooLarge();
  const form = openForm(request.headers.get('content-type') ?? '');
  const whole = pipeline(counted(request.body ?? []), form).catch((error: unknown) => {
    throw asRefusal(error);
  });
  try {
    const noFile = whole.then(() => {
      throw refused(FIELD, 'required', `The form has no file. ${ASKED}`);
    });
    return await take(await Promise.race([firstFile(form, whole), noFile]));
  } finally {
    form.destroy();
  }
}

const tooLarge = () => new AppError('too_large', 'The file is larger than 50 MB, the most that is taken.');

const ASKED = `Send one, as the part “${FIELD}”, with its name.`;

function openForm(type: string) {
  if (/^multipart\/form-data\b/i.test(type)) {
    try {
      return new Busboy({ headers: { 'content-type': type }, limits: LIMITS, isPartAFile: () => true });
    } catch (error) {
      throw asRefusal(error);
    }
  }
  throw new AppError(
    'unsupported_media_type',
    `The content type is “${type.slice(0, 100)}”. Send multipart/form-data. ${ASKED}`,
    { headers: { Accept: 'multipart/form-data' } },
  );
}

async function* counted(chunks: AsyncIterable<Uint8Array> | readonly []) {
  let bytes = 0;
  for await (const chunk of chunks) {
    bytes += chunk.byteLength;
    if (bytes > MOST) throw tooLarge();
    yield chunk;
  }
}

function firstFile(form: ReturnType<typeof openForm>, whole: Promise<void>): Promise<ArrivingFile> {
  form.on('partsLimit', () => {
    form.destroy(refused('', 'unknown_field', `The form has more than the file. ${ASKED}`));
  });
  return new Promise((resolve) => {
    form.on('file', (field: string | undefined, content, name: string | undefined, _, type) => {
      // Said to whoever reads the file, when it breaks off; nobody may be reading yet.
      content.on('error', () => undefined);
      whole.catch((error: Error) => content.destroy(error));
      const fault = faultOf(field ?? '', name ?? '');
      if (fault) form.destroy(fault);
      else resolve({ name: name ?? '', type, body: untilEnd(content, whole) });
    });
  });
}

function faultOf(field: string, name: string): AppError | null {
  if (field !== FIELD)
    return refused(field, 'unknown_field', `“${field.slice(0, 100)}” is not a field here. ${ASKED}`);
  return name.trim() === '' ? refused(FIELD, 'required', `No file was chosen. ${ASKED}`) : null;
}

async function* untilEnd(content: Readable, whole: Promise<void>) {
  try {
    yield* content as AsyncIterable<Uint8Array>;
  } catch (error) {
    throw asRefusal(error);
  }
  await whole;
}

const refused = (field: string, code: string, message: string): AppError =>
  invalid([{ pointer: field === '' ? '' : pointer([field]), code, message }]);

const asRefusal = (error: unknown): AppError =>
  error instanceof AppError
    ? error
    : new AppError('invalid', 'The form broke off, or cannot be read as one. Send it again.', {
        cause: error,
      });

interface Stored {
  readonly name: string;
  readonly bytes: number | null;
  readonly content: ReadableStream;
}

/** A file as it was brought. It is saved and never shown: what is in it is somebody else's. */
export const download = ({ name, bytes, content }: Stored): Response =>
  new Response(content, {
    headers: {
      'Content-Type': 'application/octet-stream',
      'Content-Disposition': `attachment; filename*=UTF-8''${encodeURIComponent(name)}`,
      'Cache-Control': 'private, no-store',
      ...(bytes !== null && { 'Content-Length': String(bytes) }),
    },
  });
