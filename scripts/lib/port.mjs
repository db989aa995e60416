import { createServer } from 'node:net';
import { Halt } from './halt.mjs';

const firstPort = 4310;

/**
 * @param {number} port 0 asks the system for any
 * @param {string} host
 * @returns {Promise<number | undefined>} the port, or undefined when something else has it
 */
export function tryPort(port, host) {
  return new Promise((resolve) => {
    const probe = createServer();
    probe.once('error', () => resolve(undefined));
    probe.listen({ port, host, exclusive: true }, () => {
      const address = probe.address();
      const taken = typeof address === 'object' && address ? address.port : undefined;
      probe.close(() => resolve(taken));
    });
  });
}

/** Any free loopback port. @returns {Promise<number>} */
export async function freePort() {
  const port = await tryPort(0, '127.0.0.1');
  if (port === undefined) throw new Halt('No free port could be found on this machine.');
  return port;
}

/**
 * The port to serve on: PORT when it is set, else the first free one from 4310.
 * @param {string | undefined} wished
 */
export async function servingPort(wished) {
  if (wished) {
    const port = Number(wished);
    if (!Number.isInteger(port) || port < 1 || port > 65_535)
      throw new Halt(`PORT must be a whole number from 1 to 65535; it is “${wished}”.`);
    if ((await tryPort(port, '::')) ?? (await tryPort(port, '0.0.0.0'))) return port;
    throw new Halt(`Port ${port} is in use by another program: set PORT to another one, or leave it unset.`);
  }
  for (let port = firstPort; port < firstPort + 200; port += 1) {
    if ((await tryPort(port, '::')) ?? (await tryPort(port, '0.0.0.0'))) return port;
  }
  throw new Halt(`No port from ${firstPort} to ${firstPort + 199} is free: set PORT to one that is.`);
}
