import { spawn, spawnSync } from 'node:child_process';
import { setTimeout as pause } from 'node:timers/promises';

/** Loads the demo and serves the built app for the browser tests; ended by its id. */
export default async function serveApp(): Promise<() => Promise<void>> {
  const env = { ...process.env, NODE_ENV: 'production', HOST: '127.0.0.1' };
  const seeded = spawnSync(process.execPath, ['--import', 'tsx', 'db/seed.ts', '--first-run'], {
    env,
    encoding: 'utf8',
  });
  if (seeded.status !== 0) throw new Error(`the demo did not load:\n${seeded.stdout}${seeded.stderr}`);
  const server = spawn(
    process.execPath,
    ['node_modules/@react-router/serve/bin.js', 'build/server/index.js'],
    {
      env,
      stdio: ['ignore', 'ignore', 'inherit'],
    },
  );
  for (let tries = 0; tries < 300; tries += 1) {
    const answer = await fetch(`${process.env.PUBLIC_URL}/healthz`).catch(() => null);
    if (answer?.ok) break;
    await pause(100);
  }
  return async () => {
    server.kill('SIGTERM');
    await new Promise((resolve) => server.once('exit', resolve));
  };
}
