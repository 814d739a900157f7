import { createHash } from 'node:crypto';
import { readFile } from 'node:fs/promises';
import type { Photo } from '#db/models/index.ts';
import { keepPhoto, type NewPhoto } from './keep-photo.server.ts';

type FromFile = Omit<NewPhoto, 'sha256' | 'browserTime' | 'now'> & {
  capturedAt: Date | null;
  uploadedAt: Date;
};

/** Keeps a photo that lies on this machine, with the times it is given: for the demo. */
export async function storePhotoFromFile({ capturedAt, uploadedAt, ...photo }: FromFile): Promise<Photo> {
  const sha256 = createHash('sha256')
    .update(await readFile(photo.file))
    .digest('hex');
  const row = await keepPhoto({ ...photo, sha256, browserTime: null, now: uploadedAt });
  return row.update({ capturedAt, capturedAtSource: capturedAt ? 'file' : 'unknown' });
}
