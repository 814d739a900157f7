import { createHash } from 'node:crypto';
import { createWriteStream } from 'node:fs';
import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { Readable, Transform } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import busboy from 'busboy';

export const MOST_FILES = 20;
export const MOST_BYTES = 25_000_000;

export type ReceivedFile = { name: string; path: string; sha256: string; bytes: number; tooLarge: boolean };
export type Received = { fields: Record<string, string>; files: ReceivedFile[]; tooMany: boolean };

/** The request is not a form with files. */
export class BadForm extends Error {
  override name = 'BadForm';
}

/**
 * Takes in a multipart form file by file onto disk, hashing as it goes, hands it to `use`, and clears up whatever
 * happens. Nothing larger than a chunk is held in memory.
 */
export async function receiveForm<T>(request: Request, use: (received: Received) => Promise<T>): Promise<T> {
  const folder = await mkdtemp(path.join(tmpdir(), 'weepmark-upload-'));
  try {
    return await use(await readForm(request, folder));
  } finally {
    await rm(folder, { recursive: true, force: true });
  }
}

async function readForm(request: Request, folder: string): Promise<Received> {
  const type = request.headers.get('Content-Type') ?? '';
  if (!request.body || !type.startsWith('multipart/form-data'))
    throw new BadForm('Send a multipart form with the photos.');
  let parser: busboy.Busboy;
  try {
    parser = busboy({
      headers: { 'content-type': type },
      defParamCharset: 'utf8',
      limits: {
        files: MOST_FILES,
        fileSize: MOST_BYTES,
        fields: 40,
        fieldSize: 20_000,
        parts: MOST_FILES + 60,
      },
    });
  } catch {
    throw new BadForm('This form cannot be read.');
  }
  const received: Received = { fields: {}, files: [], tooMany: false };
  const writes: Promise<void>[] = [];
  parser.on('field', (name, value) => {
    received.fields[name] = value;
  });
  parser.on('filesLimit', () => {
    received.tooMany = true;
  });
  parser.on('file', (_field, stream, info) => {
    if (!info.filename) {
      stream.resume();
      return;
    }
    const file = {
      name: info.filename.slice(0, 200),
      path: path.join(folder, String(writes.length)),
      sha256: '',
      bytes: 0,
      tooLarge: false,
    };
    received.files.push(file);
    stream.on('limit', () => {
      file.tooLarge = true;
    });
    writes.push(writeFile(stream, file));
  });
  try {
    await pipeline(Readable.fromWeb(request.body as Parameters<typeof Readable.fromWeb>[0]), parser);
    await Promise.all(writes);
  } catch (error) {
    await Promise.allSettled(writes);
    if (request.signal.aborted) throw error;
    throw new BadForm('The form was cut off on its way. Send it again.');
  }
  return received;
}

async function writeFile(stream: Readable, file: ReceivedFile): Promise<void> {
  const hash = createHash('sha256');
  const counted = new Transform({
    transform(chunk: Buffer, _encoding, next) {
      hash.update(chunk);
      file.bytes += chunk.byteLength;
      next(null, chunk);
    },
  });
  await pipeline(stream, counted, createWriteStream(file.path));
  file.sha256 = hash.digest('hex');
}
