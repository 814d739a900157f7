import { randomBytes } from 'node:crypto';
import { mkdir, readFile, rm, writeFile } from 'node:fs/promises';
import path from 'node:path';
import { startDatabase } from '#db/local/server.ts';
import { ROOT } from './build.ts';
import { startMail } from './mail.ts';
import { BUCKET, OBJECT_STORE_ACCOUNT, startObjectStore } from './object-store.ts';
import { choosePort } from './ports.ts';
import { endProcess, isAlive, markProcess, type ProcessMark } from './processes.ts';

type Running = {
  owner: ProcessMark;
  children: ProcessMark[];
  address: string;
  environment: Record<string, string>;
};

export type Stack = {
  folder: string;
  port: number;
  address: string;
  environment: Record<string, string>;
  /** Notes a process that ends with the stack, also when the stack is killed: the next start ends it. */
  adopt(pid: number): Promise<void>;
  stop(): Promise<void>;
};

/** The tests keep away from the ports of a copy that may be running beside them. */
const TEST_PORTS_APART = 20_000;

/** The data folder of this copy. */
export function dataFolder(): string {
  return path.resolve(process.env.WEEPMARK_DATA || path.join(ROOT, '.data'));
}

function runningFile(folder: string): string {
  return path.join(folder, 'running.json');
}

/** The stack that runs over `folder` now, or null. */
export async function findRunning(folder: string): Promise<Running | null> {
  const text = await readFile(runningFile(folder), 'utf8').catch(() => null);
  if (text === null) return null;
  try {
    return JSON.parse(text) as Running;
  } catch {
    return null;
  }
}

/** Starts MariaDB and the fakes on loopback, after ending what a killed start of the same folder has left. */
export async function startStack({
  folder,
  mode,
  withPort = true,
}: {
  folder: string;
  mode: 'local' | 'test';
  withPort?: boolean;
}): Promise<Stack> {
  await mkdir(folder, { recursive: true, mode: 0o700 });
  const before = await findRunning(folder);
  if (before && isAlive(before.owner)) {
    throw new Error(`Weepmark already runs over ${folder}: ${before.address}`);
  }
  for (const child of before?.children ?? []) await endProcess(child);
  const secrets = await readSecrets(folder);
  const taken = new Set<number>();
  const choose = async (name: string, usual: number) => {
    const port =
      mode === 'test'
        ? await choosePort(name, undefined, usual + TEST_PORTS_APART, taken)
        : await choosePort(name, process.env[name], usual, taken);
    taken.add(port);
    return port;
  };
  const port = withPort ? await choose('PORT', 3000) : 0;
  const databasePort = await choose('WEEPMARK_DB_PORT', 3406);
  const storePort = await choose('WEEPMARK_S3_PORT', 4568);
  const mailPort = await choose('WEEPMARK_SMTP_PORT', 2526);
  const mailbox = path.join(folder, 'mailbox');
  const database = await startDatabase({ folder, port: databasePort, password: secrets.database });
  const store = await startObjectStore({ folder: path.join(folder, 'objects'), port: storePort });
  const mail = await startMail({ folder: mailbox, port: mailPort });
  const address = `http://127.0.0.1:${port}`;
  const environment = {
    WEEPMARK_MODE: mode,
    PUBLIC_URL: address,
    SESSION_SECRET: secrets.session,
    DATABASE_URL: database.url('weepmark'),
    S3_ENDPOINT: `http://127.0.0.1:${storePort}`,
    S3_BUCKET: BUCKET,
    S3_ACCESS_KEY_ID: OBJECT_STORE_ACCOUNT.accessKeyId,
    S3_SECRET_ACCESS_KEY: OBJECT_STORE_ACCOUNT.secretAccessKey,
    SMTP_URL: `smtp://127.0.0.1:${mailPort}`,
    MAILBOX_DIR: mailbox,
    LOG_LEVEL: process.env.LOG_LEVEL ?? 'warn',
    AWS_SDK_JS_NODE_VERSION_SUPPORT_WARNING_DISABLED: 'true',
  };
  const running: Running = {
    owner: markProcess(process.pid),
    children: database.child.pid ? [markProcess(database.child.pid)] : [],
    address,
    environment,
  };
  const note = () => writeFile(runningFile(folder), JSON.stringify(running), { mode: 0o600 });
  await note();
  return {
    folder,
    port,
    address,
    environment,
    async adopt(pid) {
      running.children.unshift(markProcess(pid));
      await note();
    },
    async stop() {
      for (const child of running.children) await endProcess(child);
      await Promise.allSettled([store.stop(), mail.stop()]);
      await rm(runningFile(folder), { force: true });
    },
  };
}

async function readSecrets(folder: string): Promise<{ session: string; database: string }> {
  const file = path.join(folder, 'secrets.json');
  const text = await readFile(file, 'utf8').catch(() => null);
  if (text) return JSON.parse(text);
  const secrets = {
    session: `local-${randomBytes(32).toString('hex')}`,
    database: randomBytes(18).toString('hex'),
  };
  await writeFile(file, JSON.stringify(secrets), { mode: 0o600 });
  return secrets;
}
