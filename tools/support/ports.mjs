import { createServer } from 'node:net';
import { Failure } from './failure.mjs';

function tryPort(port) {
  return new Promise((resolve, reject) => {
    const server = createServer();
    server.once('error', reject);
    server.listen({ port, host: '127.0.0.1', exclusive: true }, () => {
      const found = server.address().port;
      server.close(() => resolve(found));
    });
  });
}

/** Whether a program could listen on this loopback port now. */
export const isPortFree = (port) =>
  tryPort(port).then(
    () => true,
    () => false,
  );

/** A loopback port that nothing uses; `remembered` when that one is still free, and never one of `taken`. */
export async function freePort(remembered, taken = []) {
  if (remembered !== undefined && !taken.includes(remembered) && (await isPortFree(remembered))) return remembered;
  for (;;) {
    const port = await tryPort(0);
    if (!taken.includes(port)) return port;
  }
}

/** Stops with a sentence when the address of the app cannot be had. */
export async function checkPort(port) {
  try {
    await tryPort(port);
  } catch (error) {
    if (error.code === 'EACCES') {
      throw new Failure(
        `Port ${port} needs more rights than this user has: choose one from 1024 on, e.g. PORT=3000 npm start.`,
      );
    }
    throw new Failure(
      `Port ${port} is taken by another program: end it, or choose another one, e.g. PORT=${port === 3100 ? 3200 : 3100} npm start.`,
    );
  }
}
