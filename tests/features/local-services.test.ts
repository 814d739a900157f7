import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { createConnection } from 'mariadb';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { startDatabase } from '#db/local/server.ts';
import { choosePort } from '#fakes/ports.ts';
import { endProcess, isAlive, markProcess } from '#fakes/processes.ts';

let folder: string;
beforeAll(async () => {
  folder = await mkdtemp(path.join(tmpdir(), 'weepmark-services-'));
});
afterAll(() => rm(folder, { recursive: true, force: true }));

async function start() {
  const port = await choosePort('WEEPMARK_DB_PORT', undefined, 23_406);
  const database = await startDatabase({ folder, port, password: 'local' });
  const query = async (sql: string) => {
    const url = new URL(database.url('weepmark'));
    const connection = await createConnection({
      host: url.hostname,
      port,
      user: url.username,
      password: url.password,
      database: 'weepmark',
    });
    const rows = await connection.query(sql);
    await connection.end();
    return rows;
  };
  return { mark: markProcess(database.child.pid ?? 0), query };
}

test('a database whose server was killed starts again and has what was committed', async () => {
  const first = await start();
  await first.query('CREATE TABLE kept (word VARCHAR(20)) ENGINE=InnoDB');
  await first.query("INSERT INTO kept VALUES ('drier')");
  process.kill(first.mark.pid, 'SIGKILL');
  await endProcess(first.mark);
  const second = await start();
  expect(await second.query('SELECT word FROM kept')).toMatchObject([{ word: 'drier' }]);
  await endProcess(second.mark);
  expect(isAlive(second.mark)).toBe(false);
});
