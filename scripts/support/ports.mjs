import { createServer } from 'node:net';

const HOST = process.env.HOST || '127.0.0.1';

const listenOn = (port, host) =>
  new Promise((resolve, reject) => {
    const server = createServer();
    server.on('error', reject);
    server.listen(port, host, () => {
      const taken = server.address().port;
      server.close(() => resolve(taken));
    });
  });

export const freePort = () => listenOn(0, '127.0.0.1');

export const portIsFree = (port, host = HOST) =>
  listenOn(port, host).then(
    () => true,
    () => false,
  );

/** Whether our web process answers there, and everything it depends on is well. */
export async function isReady(port) {
  const host = HOST === '0.0.0.0' || HOST === '::' ? '127.0.0.1' : HOST;
  try {
    const response = await fetch(`http://${host}:${port}/readyz`, { signal: AbortSignal.timeout(2000) });
    return response.ok;
  } catch {
    return false;
  }
}
