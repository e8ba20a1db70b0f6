import { createHash, randomUUID } from 'node:crypto';
import { once } from 'node:events';
import { createReadStream, createWriteStream, mkdirSync } from 'node:fs';
import { mkdir, open, rename, rm, stat } from 'node:fs/promises';
import { createServer } from 'node:http';
import { join } from 'node:path';
import { pipeline } from 'node:stream/promises';

const LOOPBACK = '127.0.0.1';
const BUCKET = 'putlog';
const KEY_ID = 'local';
/** It opens nothing: whoever may read an object is decided by the application before it asks for one. */
const SECRET = 'on-loopback-only';

/**
 * An object store on loopback that speaks as much of S3 as our client says: objects are put whole or in parts, read,
 * and removed. What it keeps are files in `folder`. Answers with the settings that web and worker need to reach it.
 */
export async function startObjectStore(folder) {
  mkdirSync(join(folder, 'parts'), { recursive: true });
  const server = createServer((request, response) =>
    answer(folder, request, response).catch((error) => refuse(response, 500, 'InternalError', error.message)),
  );
  server.listen(0, LOOPBACK);
  await once(server, 'listening');
  return {
    env: {
      PUTLOG_S3_ENDPOINT: `http://${LOOPBACK}:${server.address().port}`,
      PUTLOG_S3_BUCKET: BUCKET,
      PUTLOG_S3_ACCESS_KEY_ID: KEY_ID,
      PUTLOG_S3_SECRET_ACCESS_KEY: SECRET,
    },
    stop: async () => {
      server.close();
      server.closeAllConnections();
    },
  };
}

async function answer(folder, request, response) {
  const { pathname, searchParams } = new URL(request.url, 'http://store');
  const [, bucket, ...rest] = pathname.split('/').map(decodeURIComponent);
  const key = rest.join('/');
  if (!request.headers.authorization?.includes(`Credential=${KEY_ID}/`))
    return refuse(response, 403, 'AccessDenied', 'Sign the request.');
  if (bucket !== BUCKET) return refuse(response, 404, 'NoSuchBucket', `There is no bucket ${bucket}.`);
  if (String(request.headers['x-amz-content-sha256']).startsWith('STREAMING'))
    return refuse(response, 501, 'NotImplemented', 'Send the body as it is, not in signed chunks.');
  if (key === '') return done(response, 200);
  const object = join(folder, `${encodeURIComponent(key)}.object`);
  const upload = searchParams.get('uploadId');
  const parts = upload && join(folder, 'parts', encodeURIComponent(upload));
  switch (request.method) {
    case 'HEAD':
    case 'GET':
      return send(object, request, response);
    case 'PUT': {
      const file = parts ? join(parts, String(Number(searchParams.get('partNumber')))) : object;
      return done(response, 200, { ETag: await keep(folder, file, request) });
    }
    case 'POST':
      return parts ? complete(folder, parts, object, request, response) : begin(folder, key, response);
    case 'DELETE':
      await rm(parts ?? object, { recursive: true, force: true });
      return done(response, 204);
    default:
      return refuse(response, 405, 'MethodNotAllowed', `${request.method} is not possible.`);
  }
}

async function send(object, request, response) {
  const found = await stat(object).catch(() => null);
  if (!found) return refuse(response, 404, 'NoSuchKey', 'There is no such object.');
  response.writeHead(200, { 'Content-Length': found.size, 'Last-Modified': found.mtime.toUTCString() });
  if (request.method === 'HEAD') return response.end();
  // Who reads may go away before the end.
  await pipeline(createReadStream(object), response).catch(() => response.destroy());
}

/** Writes a body beside its place and moves it there whole; answers with its tag. */
async function keep(folder, file, body) {
  const hash = createHash('md5');
  const half = join(folder, 'parts', `${randomUUID()}.half`);
  await pipeline(
    body,
    async function* (chunks) {
      for await (const chunk of chunks) {
        hash.update(chunk);
        yield chunk;
      }
    },
    createWriteStream(half),
  );
  await rename(half, file);
  return `"${hash.digest('hex')}"`;
}

async function begin(folder, key, response) {
  const id = randomUUID();
  await mkdir(join(folder, 'parts', id));
  xml(
    response,
    200,
    `<InitiateMultipartUploadResult><Bucket>${BUCKET}</Bucket><Key>${xmlText(key)}</Key><UploadId>${id}</UploadId></InitiateMultipartUploadResult>`,
  );
}

/** Joins the parts in the order in which the client names them. */
async function complete(folder, parts, object, request, response) {
  let text = '';
  for await (const chunk of request) text += chunk;
  const numbers = [...text.matchAll(/<PartNumber>(\d+)<\/PartNumber>/g)].map(([, number]) => number);
  const half = join(folder, 'parts', `${randomUUID()}.half`);
  const file = await open(half, 'w');
  try {
    for (const number of numbers)
      for await (const chunk of createReadStream(join(parts, number))) await file.write(chunk);
  } finally {
    await file.close();
  }
  await rename(half, object);
  await rm(parts, { recursive: true, force: true });
  xml(
    response,
    200,
    `<CompleteMultipartUploadResult><Bucket>${BUCKET}</Bucket><ETag>"${randomUUID()}"</ETag></CompleteMultipartUploadResult>`,
  );
}

const xmlText = (text) => text.replaceAll('&', '&amp;').replaceAll('<', '&lt;');

const done = (response, status, headers = {}) => response.writeHead(status, headers).end();

const xml = (response, status, content) =>
  response.writeHead(status, { 'Content-Type': 'application/xml' }).end(`<?xml version="1.0"?>${content}`);

const refuse = (response, status, code, message) =>
  response.headersSent
    ? response.destroy()
    : xml(response, status, `<Error><Code>${code}</Code><Message>${xmlText(message)}</Message></Error>`);
