import { Op } from 'sequelize';
import { sequelize } from '#db/connection.server.ts';
import { Photo } from '#db/models/index.ts';
import { closeImagePool } from './images.server.ts';
import { objectKeyOf, PHOTO_PREFIX, PHOTO_SIZES } from './keys.ts';
import { rebuildVersions } from './rebuild.server.ts';
import { deleteObjects, type ListedObject, listObjects } from './store.server.ts';

const HOUR_MS = 60 * 60_000;
const UNDO_MS = 30 * 24 * HOUR_MS;

/**
 * `npm run storage:check [-- --repair]`: whether every photo has its three objects in the right size and every object
 * its photo. Objects younger than an hour may belong to an upload that is under way. Repairing makes lost versions anew,
 * removes rows whose original is gone, objects without a row, and photos deleted more than 30 days ago.
 */
export async function checkStorage(
  repair: boolean,
  now: Date,
): Promise<{ photos: number; objects: number; faults: string[] }> {
  const objects = new Map<string, ListedObject>();
  for await (const object of listObjects(PHOTO_PREFIX)) objects.set(object.key, object);
  const faults: string[] = [];
  const known = new Set<string>();
  let photos = 0;
  for (let after = 0; ; ) {
    const rows = await Photo.findAll({
      where: { id: { [Op.gt]: after } },
      order: [['id', 'ASC']],
      limit: 500,
    });
    if (rows.length === 0) break;
    for (const row of rows) {
      photos += 1;
      after = row.id;
      for (const size of PHOTO_SIZES) known.add(objectKeyOf(row.objectKey, size));
      faults.push(...(await checkPhoto(row, objects, repair, now)));
    }
  }
  const orphans = [...objects.values()].filter(({ key }) => !known.has(key));
  const settled = orphans.filter(({ modifiedAt }) => now.getTime() - modifiedAt.getTime() > HOUR_MS);
  for (const { key } of settled) faults.push(`object without a photo: ${key}`);
  if (repair) {
    for (let from = 0; from < settled.length; from += 500) {
      await deleteObjects(settled.slice(from, from + 500).map(({ key }) => key));
    }
  }
  return { photos, objects: objects.size, faults };
}

async function checkPhoto(
  row: Photo,
  objects: Map<string, ListedObject>,
  repair: boolean,
  now: Date,
): Promise<string[]> {
  const keys = PHOTO_SIZES.map((size) => objectKeyOf(row.objectKey, size));
  if (row.deletedAt && now.getTime() - row.deletedAt.getTime() > UNDO_MS) {
    if (repair) {
      await row.destroy();
      await deleteObjects(keys);
    }
    return [`photo ${row.id}: deleted more than 30 days ago, still stored`];
  }
  const original = objects.get(objectKeyOf(row.objectKey, 'original'));
  if (!original || original.bytes !== row.bytes) {
    if (repair) {
      await row.destroy();
      await deleteObjects(keys);
    }
    return [`photo ${row.id}: its original is ${original ? 'of another size' : 'gone'}`];
  }
  const lost = PHOTO_SIZES.filter((size) => !objects.get(objectKeyOf(row.objectKey, size))?.bytes);
  if (lost.length === 0) return [];
  if (repair) await rebuildVersions(row);
  return lost.map((size) => `photo ${row.id}: its ${size} version is gone`);
}

export async function main(args: string[]): Promise<number> {
  const repair = args.includes('--repair');
  const { photos, objects, faults } = await checkStorage(repair, new Date());
  for (const fault of faults) process.stdout.write(`${fault}\n`);
  const verdict = faults.length === 0 ? 'all sound' : `${faults.length} faults${repair ? ', repaired' : ''}`;
  process.stdout.write(`${photos} photos, ${objects} objects: ${verdict}.\n`);
  return faults.length === 0 || repair ? 0 : 1;
}

if (process.argv[1]?.endsWith('storage/check.ts')) {
  process.exitCode = await main(process.argv.slice(2));
  await closeImagePool();
  await sequelize.close();
}
