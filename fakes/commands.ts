import { type ChildProcess, spawn } from 'node:child_process';
import { rm } from 'node:fs/promises';
import path from 'node:path';
import { setTimeout as pause } from 'node:timers/promises';
import { demoPassword, demoPeople } from '#db/seeds/demo/people.ts';
import { say } from './bare-machine.mjs';
import { buildIfChanged, ROOT } from './build.ts';
import { isAlive } from './processes.ts';
import { dataFolder, findRunning, type Stack, startStack } from './stack.ts';

const COMMANDS: Record<string, (args: string[]) => Promise<void>> = {
  serve,
  dev,
  'reset-demo': resetDemo,
  token: (args) =>
    withServices((environment) =>
      runScript('app/features/api-tokens/print-token.server.ts', args, environment),
    ),
  'storage-check': (args) => withServices((environment) => runScript('storage/check.ts', args, environment)),
  bench: (args) => withServices((environment) => runScript('tests/bench/run.ts', args, environment)),
};

export async function runCommand([name = 'serve', ...args]: string[]): Promise<void> {
  const command = COMMANDS[name];
  if (!command) throw new Error(`There is no command ${name}; use ${Object.keys(COMMANDS).join(', ')}.`);
  try {
    await command(args);
  } catch (error) {
    process.stderr.write(`${error instanceof Error ? error.message : error}\n`);
    process.exitCode = 1;
  }
}

async function serve(): Promise<void> {
  await buildIfChanged(say);
  await runApp('production', ['node_modules/@react-router/serve/bin.js', 'build/server/index.js']);
}

async function dev(): Promise<void> {
  await runApp('development', ['node_modules/@react-router/dev/bin.js', 'dev', '--host', '127.0.0.1']);
}

async function runApp(
  nodeEnv: 'production' | 'development',
  [script = '', ...args]: string[],
): Promise<void> {
  say('Starting MariaDB, the object store and the mail server …');
  const stack = await startStack({ folder: dataFolder(), mode: 'local' });
  let stopping = false;
  const stop = async () => {
    if (stopping) return;
    stopping = true;
    say('Stopping …');
    await stack.stop();
  };
  for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP'] as const) process.on(signal, stop);
  try {
    await prepareDatabase(stack);
    const environment = {
      ...stack.environment,
      NODE_ENV: nodeEnv,
      HOST: '127.0.0.1',
      PORT: String(stack.port),
    };
    const port = nodeEnv === 'development' ? ['--port', String(stack.port)] : [];
    const server = spawnNode([path.join(ROOT, script), ...args, ...port], environment);
    if (server.pid) await stack.adopt(server.pid);
    const ended = new Promise<void>((resolve) => server.once('exit', () => resolve()));
    await Promise.race([untilAnswering(stack.address), ended]);
    if (!stopping && server.exitCode === null) printWelcome(stack.address);
    await ended;
    if (!stopping) process.exitCode = 1;
  } finally {
    await stop();
  }
}

/** Migrates, and loads the demo when there is no shop yet. */
export async function prepareDatabase(stack: Stack): Promise<void> {
  await runScript('db/seed.ts', ['--first-run'], stack.environment);
}

async function resetDemo(): Promise<void> {
  const folder = dataFolder();
  const running = await findRunning(folder);
  if (running && isAlive(running.owner)) {
    throw new Error(`Weepmark runs over ${folder}. Stop it first, then reset the demo.`);
  }
  await rm(path.join(folder, 'objects'), { recursive: true, force: true });
  const stack = await startStack({ folder, mode: 'local', withPort: false });
  try {
    await runScript('db/seed.ts', ['--reset'], stack.environment);
  } finally {
    await stack.stop();
  }
}

/** Runs `work` with the services of the running copy, or with its own for as long as it takes. */
async function withServices(work: (environment: Record<string, string>) => Promise<void>): Promise<void> {
  const running = await findRunning(dataFolder());
  if (running && isAlive(running.owner)) return work(running.environment);
  const stack = await startStack({ folder: dataFolder(), mode: 'local', withPort: false });
  try {
    await prepareDatabase(stack);
    await work(stack.environment);
  } finally {
    await stack.stop();
  }
}

function spawnNode(args: string[], environment: Record<string, string>): ChildProcess {
  return spawn(process.execPath, args, {
    cwd: ROOT,
    stdio: 'inherit',
    env: { ...process.env, ...environment },
  });
}

async function runScript(script: string, args: string[], environment: Record<string, string>): Promise<void> {
  const child = spawnNode(['--import', 'tsx', path.join(ROOT, script), ...args], {
    NODE_ENV: 'production',
    ...environment,
  });
  const code = await new Promise<number | null>((resolve) => child.once('exit', resolve));
  if (code !== 0) throw new Error(`${script} ended with code ${code}.`);
}

async function untilAnswering(address: string): Promise<void> {
  for (let tries = 0; tries < 600; tries += 1) {
    const answer = await fetch(`${address}/healthz`).catch(() => null);
    if (answer?.ok) return;
    await pause(100);
  }
  throw new Error('The server does not answer.');
}

function printWelcome(address: string): void {
  const people = demoPeople
    .map(({ email, role, shop }) => `    ${email.padEnd(28)} ${role.padEnd(7)} ${shop}`)
    .join('\n');
  process.stdout.write(
    `\n  Weepmark is at ${address}\n\n  Demo sign-ins, all with the password ${demoPassword}:\n${people}\n\n  Mail it sends: ${address}/mailbox · Ctrl-C stops everything.\n\n`,
  );
}
