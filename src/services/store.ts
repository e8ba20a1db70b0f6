import type { Readable } from 'node:stream';
import {
  DeleteObjectCommand,
  GetObjectCommand,
  HeadBucketCommand,
  NoSuchKey,
  S3Client,
  type S3ClientConfig,
} from '@aws-sdk/client-s3';
import { Upload } from '@aws-sdk/lib-storage';
import { AppError } from '@/lib/app-error';

/**
 * Files that people bring, in a store that speaks S3. It holds everybody's and decides nothing: a key starts with the
 * practice that it belongs to, and a use case asks who may read before it asks for an object.
 */
export interface ObjectStore {
  /** Keeps what the stream brings, never more than a few parts of it in memory; nothing is kept of one that breaks. */
  readonly put: (key: string, content: Readable, type: string) => Promise<void>;
  /** Null where there is no such object. */
  readonly read: (key: string) => Promise<Readable | null>;
  readonly remove: (key: string) => Promise<void>;
  /** Null when it answers, else what is wrong. */
  readonly fault: () => Promise<string | null>;
}

/** Bytes of a part; the least that S3 takes. */
const PART = 5 * 1024 * 1024;
const AT_ONCE = 2;

function openStore(bucket: string, config: S3ClientConfig): ObjectStore {
  const client = new S3Client(config);
  return {
    put: async (key, content, type) => {
      const params = { Bucket: bucket, Key: key, Body: content, ContentType: type };
      await new Upload({ client, params, partSize: PART, queueSize: AT_ONCE }).done();
    },
    read: async (key) => {
      try {
        const { Body } = await client.send(new GetObjectCommand({ Bucket: bucket, Key: key }));
        return Body ? (Body as Readable) : null; // in Node the body is its stream
      } catch (error) {
        if (error instanceof NoSuchKey) return null;
        throw error;
      }
    },
    remove: async (key) => {
      await client.send(new DeleteObjectCommand({ Bucket: bucket, Key: key }));
    },
    fault: async () => {
      try {
        await client.send(new HeadBucketCommand({ Bucket: bucket }), {
          abortSignal: AbortSignal.timeout(2000),
        });
        return null;
      } catch (error) {
        return error instanceof Error ? error.message || error.name : 'unknown';
      }
    },
  };
}

/** What the environment says of the store: PUTLOG_S3_BUCKET and how to reach it; null where it names none. */
function readSettings(env: NodeJS.ProcessEnv): { bucket: string; config: S3ClientConfig } | null {
  const bucket = env['PUTLOG_S3_BUCKET'];
  if (!bucket) return null;
  const endpoint = env['PUTLOG_S3_ENDPOINT'];
  const accessKeyId = env['PUTLOG_S3_ACCESS_KEY_ID'];
  const secretAccessKey = env['PUTLOG_S3_SECRET_ACCESS_KEY'];
  return {
    bucket,
    config: {
      region: env['PUTLOG_S3_REGION'] || 'us-east-1',
      // A store of one's own is reached by its address, not by a name for each bucket.
      ...(endpoint && { endpoint, forcePathStyle: true }),
      ...(accessKeyId && secretAccessKey && { credentials: { accessKeyId, secretAccessKey } }),
      // Checksums in trailers are not understood by every store that speaks S3.
      requestChecksumCalculation: 'WHEN_REQUIRED',
      responseChecksumValidation: 'WHEN_REQUIRED',
      maxAttempts: 3,
    },
  };
}

// The client says at every start that it will want a newer Node one day.
process.env['AWS_SDK_JS_NODE_VERSION_SUPPORT_WARNING_DISABLED'] = 'true';

let shared: ObjectStore | null | undefined;

/** The process's own store; null where none is set. */
export function store(): ObjectStore | null {
  if (shared === undefined) {
    const settings = readSettings(process.env);
    shared = settings && openStore(settings.bucket, settings.config);
  }
  return shared;
}

/** The same, or a refusal in words. */
export function requireStore(): ObjectStore {
  const found = store();
  if (found) return found;
  throw new AppError(
    'unavailable',
    'No place for files is set up here. An administrator sets PUTLOG_S3_BUCKET and the rest.',
  );
}
