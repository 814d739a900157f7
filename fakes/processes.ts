import { readFileSync } from 'node:fs';
import { setTimeout as pause } from 'node:timers/promises';

/** A process that cannot be mistaken for another: its id and when it started, in clock ticks since boot. */
export type ProcessMark = { pid: number; ticks: string };

const STATE_FIELD = 0;
const START_TICKS_FIELD = 19;

function statFields(pid: number): string[] | null {
  try {
    const stat = readFileSync(`/proc/${pid}/stat`, 'utf8');
    return stat.slice(stat.lastIndexOf(')') + 2).split(' ');
  } catch {
    return null;
  }
}

export function markProcess(pid: number): ProcessMark {
  return { pid, ticks: statFields(pid)?.[START_TICKS_FIELD] ?? '' };
}

export function isAlive({ pid, ticks }: ProcessMark): boolean {
  const fields = statFields(pid);
  return fields !== null && fields[STATE_FIELD] !== 'Z' && fields[START_TICKS_FIELD] === ticks;
}

/** Asks a process to end, waits, and ends it by force when it does not. */
export async function endProcess(mark: ProcessMark, patienceMs = 20_000): Promise<void> {
  if (!isAlive(mark)) return;
  process.kill(mark.pid, 'SIGTERM');
  for (let waited = 0; waited < patienceMs; waited += 50) {
    await pause(50);
    if (!isAlive(mark)) return;
  }
  process.kill(mark.pid, 'SIGKILL');
  await pause(100);
}
