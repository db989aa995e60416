import { createServer } from 'node:net';
import { expect, test } from 'vitest';
import { freePort, servingPort } from './port.mjs';

test('a wished port is taken as it is, and refused with words when something has it', async () => {
  const port = await freePort();
  await expect(servingPort(String(port))).resolves.toBe(port);
  const other = createServer();
  await new Promise<void>((resolve) => other.listen(port, '127.0.0.1', resolve));
  await expect(servingPort(String(port))).rejects.toThrow(`Port ${port} is in use by another program`);
  await new Promise((resolve) => other.close(resolve));
});

test.each(['0', '65536', '43.5', 'front'])('PORT=%s is refused with words', async (wish) => {
  await expect(servingPort(wish)).rejects.toThrow(
    `PORT must be a whole number from 1 to 65535; it is “${wish}”`,
  );
});
