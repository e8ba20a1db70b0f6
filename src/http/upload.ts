import type { APIContext } from 'astro';

/** The body of a request as the file that it is, to be read as it comes. */
export function uploadOf({ request }: Pick<APIContext, 'request'>, name: string) {
  const length = Number(request.headers.get('content-length') ?? Number.NaN);
  return {
    name,
    type: request.headers.get('content-type') ?? '',
    length: Number.isFinite(length) ? length : null,
    body: request.body,
  };
}

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
