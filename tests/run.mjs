import { spawn } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { installDebianPackage, installPackages, say } from '../fakes/bare-machine.mjs';

/**
 * `npm test [-- domain|features|routes|e2e …]`: everything a bare machine needs, then typecheck, lint, build and the
 * tests, on a data folder and ports of their own. The last line says how many passed and failed.
 */
const root = path.resolve(import.meta.dirname, '..');
const PROJECTS = ['domain', 'features', 'routes', 'e2e'];
const [asked, ...rest] = process.argv.slice(2);
const only = PROJECTS.includes(asked ?? '') ? asked : null;
const vitestArgs = only ? rest : process.argv.slice(2);
const totals = { passed: 0, failed: 0 };

installPackages();
installDebianPackage('mariadb-server', 'mariadbd');
if (only === null || only === 'e2e') installDebianPackage('chromium', 'chromium');

const folder = mkdtempSync(path.join(tmpdir(), 'weepmark-test-'));
const { register } = await import('tsx/esm/api');
register();
const { startTestServices } = await import('./setup/services.ts');
const { buildIfChanged } = await import('../fakes/build.ts');

let services;
try {
  if (only === null) {
    await check('Typecheck', [
      ['node_modules/@react-router/dev/bin.js', 'typegen'],
      ['node_modules/typescript/bin/tsc', '--noEmit'],
    ]);
    await check('Lint', [['node_modules/@biomejs/biome/bin/biome', 'check', '.']]);
  }
  if (only !== 'domain') {
    say('Starting the services for the tests …');
    services = await startTestServices(folder);
    if (only !== 'features') await buildIfChanged(say);
  }
  const environment = { ...process.env, ...services?.environment, NODE_ENV: 'test' };
  const projects = only ? [only] : PROJECTS;
  const quick = projects.filter((name) => name !== 'e2e');
  if (quick.length > 0) await runVitest(quick, environment);
  if (projects.includes('e2e')) await runVitest(['e2e'], environment);
} catch (error) {
  totals.failed += 1;
  process.stderr.write(`${error instanceof Error ? error.stack : error}\n`);
} finally {
  await services?.stop();
  rmSync(folder, { recursive: true, force: true });
}

if (totals.passed + totals.failed === 0) totals.failed = 1;
process.stdout.write(`${totals.passed} passed, ${totals.failed} failed\n`);
process.exit(totals.failed === 0 ? 0 : 1);

/**
 * @param {string} name
 * @param {string[][]} commands
 */
async function check(name, commands) {
  for (const [script = '', ...args] of commands) {
    const { code, output } = await run(script, args, process.env);
    if (code !== 0) {
      totals.failed += 1;
      process.stdout.write(`${output}\n· ${name}: failed\n`);
      return;
    }
  }
  totals.passed += 1;
  say(`${name}: passed`);
}

/**
 * @param {string[]} names
 * @param {NodeJS.ProcessEnv} environment
 */
async function runVitest(names, environment) {
  const started = Date.now();
  const report = path.join(folder, `report-${names.join('-')}.json`);
  const projects = names.flatMap((name) => ['--project', name]);
  const args = [
    'run',
    '--config',
    'tests/vitest.config.ts',
    ...projects,
    '--reporter=default',
    '--reporter=json',
    `--outputFile.json=${report}`,
  ];
  const { code } = await run(
    'node_modules/vitest/vitest.mjs',
    [...args, '--passWithNoTests', ...vitestArgs],
    environment,
    true,
  );
  const { numPassedTests = 0, numFailedTests = 0 } = readReport(report);
  totals.passed += numPassedTests;
  totals.failed += numFailedTests;
  if (code !== 0 && numFailedTests === 0) totals.failed += 1;
  say(
    `${names.join(', ')}: ${numPassedTests} passed, ${numFailedTests} failed (${((Date.now() - started) / 1000).toFixed(1)} s)`,
  );
}

/** @param {string} file */
function readReport(file) {
  try {
    return JSON.parse(readFileSync(file, 'utf8'));
  } catch {
    return {};
  }
}

/**
 * @param {string} script
 * @param {string[]} args
 * @param {NodeJS.ProcessEnv} env
 * @param {boolean} [shown]
 * @returns {Promise<{code: number | null, output: string}>}
 */
function run(script, args, env, shown = false) {
  return new Promise((resolve, reject) => {
    const child = spawn(process.execPath, [script, ...args], {
      cwd: root,
      env,
      stdio: ['ignore', shown ? 'inherit' : 'pipe', shown ? 'inherit' : 'pipe'],
    });
    let output = '';
    child.stdout?.on('data', (chunk) => {
      output += chunk;
    });
    child.stderr?.on('data', (chunk) => {
      output += chunk;
    });
    child.once('error', reject);
    child.once('exit', (code) => resolve({ code, output }));
  });
}
