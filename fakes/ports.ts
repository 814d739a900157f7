import { createServer } from 'node:net';

const TRIES = 50;

function isFree(port: number): Promise<boolean> {
  return new Promise((resolve) => {
    const probe = createServer();
    probe.once('error', () => resolve(false));
    probe.listen(port, '127.0.0.1', () => probe.close(() => resolve(true)));
  });
}

/**
 * The port that `name` asks for. A port that was asked for and is taken is an error; the default moves aside to the
 * next free one. Ports in `taken` are kept for others.
 */
export async function choosePort(
  name: string,
  asked: string | undefined,
  usual: number,
  taken: ReadonlySet<number> = new Set(),
): Promise<number> {
  if (asked !== undefined && asked !== '') {
    const port = Number(asked);
    if (!Number.isInteger(port) || port < 1 || port > 65_535)
      throw new Error(`${name} is not a port: ${asked}`);
    if (!(await isFree(port))) throw new Error(`Port ${port} (${name}) is taken by another program.`);
    return port;
  }
  for (let port = usual; port < usual + TRIES; port += 1) {
    if (!taken.has(port) && (await isFree(port))) return port;
  }
  throw new Error(`No free port near ${usual}; set ${name}.`);
}
