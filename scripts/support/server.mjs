import { createServer } from 'node:http';
import { BlockList, isIPv6 } from 'node:net';
import compression from 'compression';
import sirv from 'sirv';
import { answerProblem, isUpload, readBody, refusesLength, throwAway } from './body.mjs';

/**
 * The HTTP server in front of Astro's handler: built files, compression, a limit to bodies, and headers that say what
 * we know instead of what the client claims. `origin` is where people reach us. `proxies` are the addresses of proxies
 * in front of us, or networks: "10.0.0.0/8, 127.0.0.1".
 */
export function createWebServer({ handler, folder, origin, proxies = '' }) {
  const { host, protocol } = new URL(origin);
  const trusted = readProxies(proxies);
  const compress = compression({ threshold: 1024 });
  const files = sirv(folder, {
    etag: true,
    setHeaders: (response, path) => response.setHeader('Cache-Control', lifeOf(path)),
  });

  /** Answers without an end of their own. */
  const streams = new Set();

  const serve = (request, response) => {
    beforeHead(response, () => {
      sayCharset(response);
      if (!server.listening) response.setHeader('Connection', 'close');
      if (isStream(response)) hold(response);
    });
    const address = clientAddress(request, trusted);
    const claims = Object.keys(request.headers).filter((name) => CLAIM.test(name));
    for (const name of claims) delete request.headers[name];
    Object.assign(request.headers, {
      host,
      'x-forwarded-proto': protocol.slice(0, -1),
      'x-forwarded-for': address,
    });
    compress(request, response, () => files(request, response, () => passOn(handler, request, response)));
  };

  const hold = (response) => {
    streams.add(response);
    response.on('close', () => streams.delete(response));
    // Asked for by a connection that was open when we were told to stop.
    if (!server.listening) response.destroy();
  };

  const server = createServer(
    // A file of 50 MB over a slow line; other bodies have a time of their own.
    { requestTimeout: 600_000, headersTimeout: 20_000, keepAliveTimeout: 65_000 },
    serve,
  );
  // Asked first whether the body is welcome, we can refuse it before it is sent.
  server.on('checkContinue', (request, response) => {
    if (!refusesLength(request)) response.writeContinue();
    serve(request, response);
  });
  /** Takes no more requests, lets those in hand end, and cuts the streams: whoever reads them comes back elsewhere. */
  const drain = (onDrained) => {
    server.close(onDrained);
    server.closeIdleConnections();
    for (const response of streams) response.destroy();
  };
  return Object.assign(server, { drain });
}

const isStream = (response) => String(response.getHeader('content-type')).startsWith('text/event-stream');

/** What a client or a proxy says about who asked for what, and how. */
const CLAIM = /^(x-forwarded-.*|x-real-ip|forwarded)$/;

async function passOn(handler, request, response) {
  try {
    if (isUpload(request)) return await passUpload(handler, request, response);
    const body = await readBody(request);
    if (body === null) return answerProblem(request, response, 413);
    // An iterable that Astro takes for the body; the request itself has been read.
    request.body = (async function* () {
      if (body.length > 0) yield body;
    })();
    await handler(request, response);
  } catch (error) {
    console.error(error);
    if (response.headersSent) response.destroy();
    else answerProblem(request, response, 500);
  }
}

/** The body as it comes. Whoever stops reading before its end still gets the answer through. */
async function passUpload(handler, request, response) {
  if (refusesLength(request)) return answerProblem(request, response, 413);
  const chunks = request.iterator({ destroyOnReturn: false });
  request.body = { [Symbol.asyncIterator]: () => chunks };
  await handler(request, response);
  throwAway(request);
}

/** Built files carry a hash of their content in their name. */
function lifeOf(path) {
  if (path.startsWith('/_astro/')) return 'public, max-age=31536000, immutable';
  return path.includes('.') && !path.endsWith('.html') ? 'public, max-age=3600' : 'no-cache';
}

/** Behind a trusted proxy the last hop of its list: what it saw itself. The hops before that anybody can write. */
function clientAddress({ socket, headers }, trusted) {
  const peer = (socket.remoteAddress ?? '').replace(/^::ffff:/, '');
  const forwarded = headers['x-forwarded-for'];
  if (!forwarded || !trusted.check(peer, isIPv6(peer) ? 'ipv6' : 'ipv4')) return peer;
  return forwarded.split(',').at(-1).trim() || peer;
}

function readProxies(text) {
  const list = new BlockList();
  for (const entry of text
    .split(',')
    .map((each) => each.trim())
    .filter(Boolean)) {
    const [address, bits] = entry.split('/');
    const family = isIPv6(address) ? 'ipv6' : 'ipv4';
    if (bits) list.addSubnet(address, Number(bits), family);
    else list.addAddress(address, family);
  }
  return list;
}

/** Calls `work` when the answer's head is about to be sent; the compression has set all of its headers by then. */
function beforeHead(response, work) {
  const { writeHead } = response;
  response.writeHead = (...status) => {
    work();
    return writeHead.apply(response, status);
  };
}

/** Text without its encoding is guessed at by browsers. */
function sayCharset(response) {
  const type = String(response.getHeader('content-type') ?? '');
  if (/^text\/[a-z]+$/.test(type)) response.setHeader('Content-Type', `${type}; charset=utf-8`);
}
