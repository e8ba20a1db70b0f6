import type { z } from 'zod';
import { AppError, type Fault, invalid } from '@/lib/app-error';
import { pointer } from '@/lib/pointer';
import { read } from '@/lib/read';

/** Bytes in a body. No document of ours comes near it. */
const BODY_LIMIT = 1_000_000;
/** Objects and lists inside one another. A template's deepest expression has less than half of it. */
const DEPTH_LIMIT = 64;

interface Holder {
  readonly request: Request;
}

/** The body by its schema, or the refusal: 415, 413, 400, 422, in the order in which they are found. */
export async function readJson<S extends z.ZodType>(holder: Holder, schema: S): Promise<z.output<S>> {
  const reading = read(schema, await readBody(holder));
  if (!reading.ok) throw invalid(reading.faults);
  return reading.value;
}

/** The body as JSON, also where its type is not said: neither too deep nor with what cannot be kept. */
async function readBody({ request }: Holder): Promise<unknown> {
  const type = request.headers.get('content-type')?.split(';', 1)[0]?.trim().toLowerCase() ?? '';
  if (type !== '' && type !== 'application/json' && !/^application\/[\w.-]+\+json$/.test(type))
    throw new AppError('unsupported_media_type', `The content type is “${type}”. Send application/json.`, {
      headers: { Accept: 'application/json' },
    });
  const text = decode(await readBytes(request));
  if (isTooDeep(text)) throw invalid([TOO_DEEP]);
  const value = parse(text);
  const fault = unkeepable(value);
  if (fault) throw invalid([fault]);
  return value;
}

const FORM_TYPES = ['application/x-www-form-urlencoded', 'multipart/form-data'];

/** A page's form. */
export async function readForm({ request }: Holder): Promise<FormData> {
  const type = request.headers.get('content-type') ?? '';
  if (!FORM_TYPES.some((form) => type.toLowerCase().startsWith(form)))
    throw new AppError('unsupported_media_type', 'This is not a form. Use the page.');
  const body = await readBytes(request);
  try {
    return await new Response(body, { headers: { 'Content-Type': type } }).formData();
  } catch (error) {
    throw new AppError('invalid', 'The form cannot be read. Send it again from the page.', { cause: error });
  }
}

/** The body as it is, refused (413) where it is longer than it may be. */
export async function readBytes(request: Request, most = BODY_LIMIT): Promise<Uint8Array<ArrayBuffer>> {
  if (Number(request.headers.get('content-length') ?? 0) > most) throw tooLarge(most);
  const chunks: Uint8Array[] = [];
  let size = 0;
  // Leaving the loop cancels the stream: what is too long is not read to its end.
  for await (const chunk of request.body ?? []) {
    size += chunk.byteLength;
    if (size > most) throw tooLarge(most);
    chunks.push(chunk);
  }
  const whole = new Uint8Array(size);
  chunks.reduce((at, chunk) => {
    whole.set(chunk, at);
    return at + chunk.byteLength;
  }, 0);
  return whole;
}

function decode(bytes: Uint8Array): string {
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(bytes);
  } catch (error) {
    throw new AppError('bad_json', 'The body is not UTF-8 text.', { cause: error });
  }
}

const tooLarge = (most: number) =>
  new AppError('too_large', `The body is larger than ${most / 1e6} MB. Send less in one request.`);

function parse(text: string): unknown {
  if (text.trim() === '') throw new AppError('bad_json', 'The body is empty. Send a JSON document.');
  try {
    return JSON.parse(text);
  } catch (error) {
    throw new AppError(
      'bad_json',
      `The body is not JSON: ${error instanceof Error ? error.message : 'unreadable'}.`,
      {
        cause: error,
      },
    );
  }
}

const TOO_DEEP: Fault = {
  pointer: '',
  code: 'too_deep',
  message: `The body has more than ${DEPTH_LIMIT} levels inside one another. Flatten it.`,
};

/** Counted in the text: parsing what is deep without end is what takes the time. */
function isTooDeep(text: string): boolean {
  let depth = 0;
  let inString = false;
  for (let at = 0; at < text.length; at++) {
    const char = text[at];
    if (inString) {
      if (char === '\\') at++;
      else if (char === '"') inString = false;
    } else if (char === '"') inString = true;
    else if (char === '[' || char === '{') {
      if (++depth > DEPTH_LIMIT) return true;
    } else if (char === ']' || char === '}') depth--;
  }
  return false;
}

/**
 * The first place where a key would mean an object's prototype to whoever copies it, or where a text cannot be kept:
 * PostgreSQL takes no NUL and no half of a surrogate pair. Null when there is none.
 */
function unkeepable(value: unknown, path: readonly string[] = []): Fault | null {
  if (typeof value === 'string') return isKept(value) ? null : badText(path);
  if (typeof value !== 'object' || value === null) return null;
  for (const [key, inner] of Object.entries(value)) {
    const here = [...path, key];
    if (key === '__proto__') return prototypeFault(here);
    const fault = isKept(key) ? unkeepable(inner, here) : badText(here);
    if (fault) return fault;
  }
  return null;
}

const isKept = (text: string): boolean => !text.includes('\0') && !/\p{Surrogate}/u.test(text);

const badText = (path: readonly string[]): Fault => ({
  pointer: pointer(path),
  code: 'bad_text',
  message: 'This holds a character that is no text: a NUL, or half of a surrogate pair. Remove it.',
});

const prototypeFault = (path: readonly string[]): Fault => ({
  pointer: pointer(path),
  code: 'unknown_field',
  message: '“__proto__” is not a field here. Remove it.',
});
