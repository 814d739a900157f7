import { spawn } from 'node:child_process';
import { expect, test } from 'vitest';
import { endProcess, isAlive, markProcess } from './processes.ts';

function start(script: string): Promise<number> {
  return new Promise((resolve) => {
    const child = spawn(process.execPath, ['-e', `${script}; process.stdout.write('up')`], {
      stdio: ['ignore', 'pipe', 'ignore'],
    });
    child.stdout.once('data', () => resolve(child.pid ?? 0));
  });
}

test('a process is known by its id and its start, and ended politely', async () => {
  const mark = markProcess(await start('setInterval(() => {}, 1000)'));
  expect(isAlive(mark)).toBe(true);
  await endProcess(mark);
  expect(isAlive(mark)).toBe(false);
});

test('one that does not listen is ended by force', async () => {
  const mark = markProcess(await start("process.on('SIGTERM', () => {}); setInterval(() => {}, 1000)"));
  await endProcess(mark, 300);
  expect(isAlive(mark)).toBe(false);
});

test('another process with the same id is left alone', async () => {
  const mark = markProcess(await start('setInterval(() => {}, 1000)'));
  await endProcess({ pid: mark.pid, ticks: '1' });
  expect(isAlive(mark)).toBe(true);
  await endProcess(mark);
});
