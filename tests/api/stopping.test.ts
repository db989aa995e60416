import { connect } from 'node:net';
import { once } from 'node:events';
import { expect, test, vi } from 'vitest';
import { aServerProcess, type ServerProcess } from '../support/server-process';

vi.setConfig({ testTimeout: 90_000 }); // each starts a process of its own

const body = JSON.stringify({ email: 'nobody@anglers.example' });

/** Begins a request and holds back the end of its body. */
async function aHalfSentRequest({ port }: ServerProcess) {
  const socket = connect(port, '127.0.0.1');
  await once(socket, 'connect');
  const head = [
    'POST /api/accounts/reset-request HTTP/1.1',
    'Host: 127.0.0.1',
    'Content-Type: application/json',
    `Content-Length: ${body.length}`,
  ];
  socket.write(`${head.join('\r\n')}\r\n\r\n${body.slice(0, 10)}`);
  let answer = '';
  socket.on('data', (part) => (answer += part.toString()));
  const closed = once(socket, 'close').then(() => answer);
  return { finish: () => socket.write(body.slice(10)), closed };
}

const until = async (met: () => boolean | Promise<boolean>) => {
  while (!(await met())) await new Promise((next) => setTimeout(next, 20));
};

const refused = async (url: string) => {
  try {
    await fetch(`${url}/api/health`, { headers: { connection: 'close' } });
    return false;
  } catch {
    return true;
  }
};

test('asked to stop, it takes nothing new, finishes what is under way and ends with zero', async () => {
  const server = await aServerProcess();
  try {
    const request = await aHalfSentRequest(server);
    await fetch(`${server.url}/api/health`); // leaves a kept-alive connection behind
    server.child.kill('SIGTERM');
    await until(() => refused(server.url));
    expect(server.child.exitCode).toBeNull();
    request.finish();
    expect(await request.closed).toMatch(/^HTTP\/1\.1 202 /);
    expect(await server.ended).toBe(0);
    expect(server.written()).toContain('"msg":"stopped"');
  } finally {
    await server.close();
  }
});

test('asked a second time, it stops at once', async () => {
  const server = await aServerProcess();
  try {
    const { closed } = await aHalfSentRequest(server);
    server.child.kill('SIGINT');
    await until(() => refused(server.url));
    expect(server.child.exitCode).toBeNull();
    server.child.kill('SIGINT');
    expect(await server.ended).toBe(1);
    expect(await closed.catch(() => '')).toBe('');
  } finally {
    await server.close();
  }
});

test('with settings it can’t use it says which, and does not start', async () => {
  await expect(aServerProcess({ PORT: 'seven', PUBLIC_URL: 'nowhere' })).rejects.toThrow(
    /starting:\nThe environment's settings can't be used\.\nPORT: .+\nPUBLIC_URL: .+\n$/,
  );
});
