import { spawn } from 'node:child_process';
import { createHash } from 'node:crypto';
import { existsSync } from 'node:fs';
import { readdir, readFile, writeFile } from 'node:fs/promises';
import path from 'node:path';

export const ROOT = path.resolve(import.meta.dirname, '..');
const SOURCES = [
  'app',
  'db',
  'storage',
  'package-lock.json',
  'vite.config.ts',
  'react-router.config.ts',
  'tsconfig.json',
];
const STAMP = path.join(ROOT, 'build', 'sources.sha256');

async function sourceHash(): Promise<string> {
  const hash = createHash('sha256');
  for (const source of SOURCES) {
    for (const file of await filesOf(path.join(ROOT, source))) {
      hash.update(path.relative(ROOT, file)).update(await readFile(file));
    }
  }
  return hash.digest('hex');
}

async function filesOf(place: string): Promise<string[]> {
  if (!existsSync(place)) return [];
  const entries = await readdir(place, { withFileTypes: true, recursive: true }).catch(() => null);
  if (!entries) return [place];
  return entries
    .filter((entry) => entry.isFile() && !entry.name.endsWith('.test.ts') && !entry.name.endsWith('.jpg'))
    .map((entry) => path.join(entry.parentPath, entry.name))
    .sort();
}

/** Builds the app unless the last build was made from the same sources. */
export async function buildIfChanged(say: (text: string) => void): Promise<void> {
  const hash = await sourceHash();
  const last = await readFile(STAMP, 'utf8').catch(() => '');
  if (last === hash) return;
  say('Building the app …');
  await runTool('node_modules/@react-router/dev/bin.js', ['build']);
  await writeFile(STAMP, hash);
}

/** Runs a Node program of the project; its output is shown only when it fails. */
export function runTool(script: string, args: string[]): Promise<void> {
  return new Promise((resolve, reject) => {
    const child = spawn(process.execPath, [path.join(ROOT, script), ...args], {
      cwd: ROOT,
      env: { ...process.env, NODE_ENV: 'production' },
      stdio: ['ignore', 'pipe', 'pipe'],
    });
    let output = '';
    child.stdout.on('data', (chunk) => {
      output += chunk;
    });
    child.stderr.on('data', (chunk) => {
      output += chunk;
    });
    child.once('error', reject);
    child.once('exit', (code) =>
      code === 0 ? resolve() : reject(new Error(`${script} failed:\n${output}`)),
    );
  });
}
