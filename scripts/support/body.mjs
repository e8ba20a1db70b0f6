/** The most that a request may bring: 1 MB. */
const MOST = 1024 * 1024;
/** A refused sender may go on for so long before the connection is cut. */
const PATIENCE = 10_000;

const PROBLEMS = {
  413: ['too_large', 'Too large', 'The request is larger than 1 MB. Send less at a time.'],
  500: ['internal', 'Fault in Putlog', 'Putlog made a mistake here. Nothing was saved. Try again.'],
};

export const refusesLength = ({ headers }) => Number(headers['content-length'] ?? 0) > MOST;

/** The whole body, or null as soon as it is known to be too large. */
export function readBody(request) {
  return new Promise((resolve, reject) => {
    if (refusesLength(request)) return resolve(null);
    const chunks = [];
    let length = 0;
    const take = (chunk) => {
      length += chunk.length;
      if (length <= MOST) return chunks.push(chunk);
      request.off('data', take);
      resolve(null);
    };
    request.on('data', take);
    request.on('end', () => resolve(Buffer.concat(chunks)));
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
  setTimeout(() => request.destroy(), PATIENCE).unref();
  request.resume();
}
