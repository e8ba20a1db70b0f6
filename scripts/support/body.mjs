/** The most that a request may bring: 1 MB. */
const MOST = 1024 * 1024;
/** The same of a file that is uploaded; the application says so in words, and stops where the file goes beyond. */
const MOST_OF_FILE = 51 * MOST;
/** A body of the usual size that is not here by then does not come. */
const SLOWEST = 60_000;
/** A refused sender may go on for so long before the connection is cut. */
const PATIENCE = 10_000;

const PROBLEMS = {
  413: [
    'too_large',
    'Too large',
    'The request is larger than 1 MB, or the file than 50 MB. Send less at a time.',
  ],
  500: ['internal', 'Fault in Putlog', 'Putlog made a mistake here. Nothing was saved. Try again.'],
};

/** Whether the body is a file, which is passed on as it comes and never held whole. */
export const isUpload = ({ method, url }) => UPLOADS.test(`${method} ${url.split('?', 1)[0]}`);
const UPLOADS = /^(POST \/api\/v1\/section-imports|PUT \/api\/v1\/section-imports\/[\w-]+\/source)$/;

export const refusesLength = (request) =>
  Number(request.headers['content-length'] ?? 0) > (isUpload(request) ? MOST_OF_FILE : MOST);

/** The whole body, or null as soon as it is known to be too large. */
export function readBody(request) {
  return new Promise((resolve, reject) => {
    if (refusesLength(request)) return resolve(null);
    const chunks = [];
    let length = 0;
    const late = setTimeout(() => request.destroy(), SLOWEST);
    request.on('close', () => clearTimeout(late));
    const take = (chunk) => {
      length += chunk.length;
      if (length <= MOST) return chunks.push(chunk);
      request.off('data', take);
      resolve(null);
    };
    request.on('data', take);
    request.on('end', () => {
      clearTimeout(late);
      resolve(Buffer.concat(chunks));
    });
    request.on('error', reject);
  });
}

/**
 * problem+json (RFC 9457). What the client still sends is read and thrown away before the connection closes: closed
 * under its hands, it would lose the answer as well.
 */
export function answerProblem(request, response, status) {
  const [code, title, detail] = PROBLEMS[status];
  const errors = [{ pointer: '', code, message: detail }];
  const text = JSON.stringify({ type: `urn:putlog:problem:${code}`, title, status, detail, errors });
  response.writeHead(status, {
    'Content-Type': 'application/problem+json; charset=utf-8',
    'Content-Length': Buffer.byteLength(text),
    'Cache-Control': 'no-store',
    Connection: 'close',
  });
  response.write(text);
  const end = () => response.end();
  if (request.complete) return end();
  request.on('end', end);
  request.on('close', end);
  throwAway(request);
}

/** What is left of a body that nobody reads any more. */
export function throwAway(request) {
  if (request.complete) return;
  const timer = setTimeout(() => request.destroy(), PATIENCE);
  request.on('close', () => clearTimeout(timer));
  request.resume();
}
