import { createServer, type Server } from 'node:net';
import { afterEach, expect, test } from 'vitest';
import { choosePort } from './ports.ts';

const open: Server[] = [];

function occupy(): Promise<number> {
  return new Promise((resolve) => {
    const server = createServer();
    open.push(server);
    server.listen(0, '127.0.0.1', () => {
      const address = server.address();
      resolve(typeof address === 'object' && address ? address.port : 0);
    });
  });
}

afterEach(() => {
  for (const server of open.splice(0)) server.close();
});

test('a default that is taken moves aside', async () => {
  const taken = await occupy();
  const chosen = await choosePort('PORT', undefined, taken);
  expect(chosen).toBeGreaterThan(taken);
});

test('a default that another service keeps moves aside too', async () => {
  const free = await choosePort('PORT', undefined, 41_000);
  expect(await choosePort('OTHER', '', free, new Set([free]))).toBeGreaterThan(free);
});

test('a port that was asked for and is taken is an error that names it', async () => {
  const taken = await occupy();
  await expect(choosePort('WEEPMARK_DB_PORT', String(taken), 3406)).rejects.toThrow(
    `Port ${taken} (WEEPMARK_DB_PORT) is taken`,
  );
});

test.each(['x', '0', '70000', '-1', '3.5'])('%s is no port', async (asked) => {
  await expect(choosePort('PORT', asked, 3000)).rejects.toThrow('PORT is not a port');
});
