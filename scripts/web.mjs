import { createServer } from 'node:http';
import { BlockList, isIPv6 } from 'node:net';
import { fileURLToPath } from 'node:url';
import compression from 'compression';
import sirv from 'sirv';
import { answerProblem, readBody, refusesLength } from './support/body.mjs';

const port = Number(process.env.PORT || 4321);
const host = process.env.HOST || '127.0.0.1';
const origin = new URL(process.env.ORIGIN || `http://localhost:${port}`);
/** Addresses of proxies in front of us, or networks: "10.0.0.0/8, 127.0.0.1". From others X-Forwarded-For is a claim. */
const proxies = readProxies(process.env.TRUSTED_PROXIES ?? '');
/** Seconds that requests in hand may still take when we are told to stop. */
const DRAIN = 20;

process.env.ASTRO_NODE_AUTOSTART = 'disabled';
const { handler } = await import('../dist/server/entry.mjs');
// The middleware reads the settings: a wrong or missing one stops us here, not at the first request.
await import('../dist/server/_astro-internal_middleware.mjs');

const compress = compression({ threshold: 1024 });
const files = sirv(fileURLToPath(new URL('../dist/client', import.meta.url)), {
  etag: true,
  setHeaders: (response, path) => response.setHeader('Cache-Control', lifeOf(path)),
});

const server = createServer({ requestTimeout: 60_000, headersTimeout: 20_000, keepAliveTimeout: 65_000 });
server.on('request', serve);
// Asked first whether the body is welcome, we can refuse it before it is sent.
server.on('checkContinue', (request, response) => {
  if (!refusesLength(request)) response.writeContinue();
  serve(request, response);
});
server.listen(port, host, () => {
  if (process.send) process.send('ready');
  else console.log(`Serving ${origin.origin} on ${host}:${port}`);
});

/** Built files carry a hash of their content in their name. */
function lifeOf(path) {
  if (path.startsWith('/_astro/')) return 'public, max-age=31536000, immutable';
  return path.includes('.') && !path.endsWith('.html') ? 'public, max-age=3600' : 'no-cache';
}

function serve(request, response) {
  sayCharset(response);
  if (stopping) response.setHeader('Connection', 'close');
  trustOnlyOurselves(request);
  compress(request, response, () => files(request, response, () => toAstro(request, response)));
}

async function toAstro(request, response) {
  try {
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

/** Host, scheme and the client's address as we know them, whatever the client says about itself. */
function trustOnlyOurselves(request) {
  const { headers, socket } = request;
  const address = clientAddress(socket.remoteAddress ?? '', headers['x-forwarded-for']);
  for (const name of Object.keys(headers))
    if (/^(x-forwarded-.*|x-real-ip|forwarded)$/.test(name)) delete headers[name];
  headers.host = origin.host;
  headers['x-forwarded-proto'] = origin.protocol.slice(0, -1);
  headers['x-forwarded-for'] = address;
}

/** Behind a trusted proxy the last hop of its list: what it saw itself. The hops before that anybody can write. */
function clientAddress(peer, forwarded) {
  const plain = peer.replace(/^::ffff:/, '');
  if (!forwarded || !proxies.check(plain, isIPv6(plain) ? 'ipv6' : 'ipv4')) return plain;
  return String(forwarded).split(',').at(-1).trim() || plain;
}

function readProxies(list) {
  const block = new BlockList();
  for (const entry of list
    .split(',')
    .map((text) => text.trim())
    .filter(Boolean)) {
    const [address, bits] = entry.split('/');
    const family = isIPv6(address) ? 'ipv6' : 'ipv4';
    if (bits) block.addSubnet(address, Number(bits), family);
    else block.addAddress(address, family);
  }
  return block;
}

/** Text without its encoding is guessed at by browsers. The compression has made headers of all arguments by then. */
function sayCharset(response) {
  const { writeHead } = response;
  response.writeHead = (...status) => {
    const type = String(response.getHeader('content-type') ?? '');
    if (/^text\/[a-z]+$/.test(type)) response.setHeader('Content-Type', `${type}; charset=utf-8`);
    return writeHead.apply(response, status);
  };
}

let stopping = false;
function stop() {
  if (stopping) return;
  stopping = true;
  server.close(() => process.exit(0));
  server.closeIdleConnections();
  setTimeout(() => process.exit(0), DRAIN * 1000).unref();
}

for (const signal of ['SIGTERM', 'SIGINT']) process.on(signal, stop);
// The program that started us is gone, and with it whoever would have stopped us.
process.on('disconnect', stop);
