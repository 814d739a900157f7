import { createWriteStream } from 'node:fs';
import { mkdtemp, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import path from 'node:path';
import { pipeline } from 'node:stream/promises';
import type { Photo } from '#db/models/index.ts';
import { makeVersions } from './images.server.ts';
import { objectKeyOf } from './keys.ts';
import { getObject, putObject } from './store.server.ts';

/** Makes a photo's copies anew from its original. */
export async function rebuildVersions(row: Photo): Promise<void> {
  const folder = await mkdtemp(path.join(tmpdir(), 'weepmark-rebuild-'));
  try {
    const original = await getObject(objectKeyOf(row.objectKey, 'original'));
    if (!original) return;
    const file = path.join(folder, 'original');
    await pipeline(original.body, createWriteStream(file));
    const { medium, thumb } = await makeVersions(file, row.contentType);
    await putObject(objectKeyOf(row.objectKey, 'medium'), medium, 'image/jpeg', medium.byteLength);
    await putObject(objectKeyOf(row.objectKey, 'thumb'), thumb, 'image/jpeg', thumb.byteLength);
  } finally {
    await rm(folder, { recursive: true, force: true });
  }
}
