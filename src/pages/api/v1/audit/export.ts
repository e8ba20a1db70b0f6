import { z } from 'zod';
import { recordQuery } from '@/features/audit/record';
import { EXPORT_FORMATS, exportRecord } from '@/features/audit/record.server';
import { endpoint } from '@/http/endpoint';

const TYPES = { csv: 'text/csv; charset=utf-8', jsonl: 'application/jsonl; charset=utf-8' } as const;

export const GET = endpoint(
  {
    summary: 'The record of events as a file, oldest first',
    description:
      'csv is a table to read. jsonl holds every row whole, each with its hash and the hash before it: SHA-256 of the row without its hash, as canonical JSON (RFC 8785).',
    query: z.strictObject({ ...recordQuery, format: z.enum(EXPORT_FORMATS).default('csv') }),
  },
  async (_, { user, query: { format, ...query } }) => {
    const pieces = await exportRecord(user, query, format);
    return new Response(bytesOf(pieces), {
      headers: {
        'Content-Type': TYPES[format],
        'Content-Disposition': `attachment; filename="record-of-events.${format}"`,
        'Cache-Control': 'no-store',
      },
    });
  },
);

/** Asks for the next piece when whoever reads has taken the one before. */
function bytesOf(pieces: AsyncGenerator<string>): ReadableStream<Uint8Array> {
  const encoder = new TextEncoder();
  return new ReadableStream({
    async pull(controller) {
      const { done, value } = await pieces.next();
      if (done) controller.close();
      else controller.enqueue(encoder.encode(value));
    },
    async cancel() {
      await pieces.return(undefined);
    },
  });
}
