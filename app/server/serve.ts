import { spawn } from 'node:child_process';
import path from 'node:path';
import { readEnvironment } from './environment.ts';

/** `npm run serve`: the built product in production. It checks the environment, migrates, then serves; it starts no fakes. */
process.env.NODE_ENV = 'production';
process.env.WEEPMARK_MODE = 'production';
try {
  readEnvironment(process.env);
} catch (error) {
  process.stderr.write(`${error instanceof Error ? error.message : error}\n`);
  process.exit(1);
}

const { sequelize } = await import('#db/connection.server.ts');
const { migrate } = await import('#db/migrations.ts');
await migrate(sequelize);
await sequelize.close();

const root = path.resolve(import.meta.dirname, '../..');
const server = spawn(
  process.execPath,
  [path.join(root, 'node_modules/@react-router/serve/bin.js'), path.join(root, 'build/server/index.js')],
  { cwd: root, stdio: 'inherit', env: process.env },
);
for (const signal of ['SIGINT', 'SIGTERM'] as const) process.on(signal, () => server.kill(signal));
server.on('exit', (code) => process.exit(code ?? 0));
