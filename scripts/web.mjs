import { fileURLToPath } from 'node:url';
import { createWebServer } from './support/server.mjs';

const port = Number(process.env.PORT || 4321);
const host = process.env.HOST || '127.0.0.1';
process.env.ORIGIN ||= `http://localhost:${port}`;
process.env.ASTRO_NODE_AUTOSTART = 'disabled';
/** Seconds that requests in hand may still take when we are told to stop. */
const DRAIN = 20;

const { handler } = await import('../dist/server/entry.mjs');
// The middleware reads the settings: a wrong or missing one stops us here, not at the first request.
await import('../dist/server/_astro-internal_middleware.mjs');
const server = createWebServer({
  handler,
  folder: fileURLToPath(new URL('../dist/client', import.meta.url)),
  origin: process.env.ORIGIN,
  proxies: process.env.TRUSTED_PROXIES,
});
server.listen(port, host, () => {
  if (process.send) process.send('ready');
  else console.log(`Serving ${process.env.ORIGIN} on ${host}:${port}`);
});

function stop() {
  server.drain(() => process.exit(0));
  setTimeout(() => process.exit(0), DRAIN * 1000).unref();
}

for (const signal of ['SIGTERM', 'SIGINT']) process.once(signal, stop);
// The program that started us is gone, and with it whoever would have stopped us.
process.once('disconnect', stop);
