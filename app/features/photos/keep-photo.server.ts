import { createReadStream } from 'node:fs';
import { stat } from 'node:fs/promises';
import exifr from 'exifr';
import type { Transaction } from 'sequelize';
import type { LinkKey } from '#app/domain/chain/chain.ts';
import type { Actor } from '#app/domain/permissions/actor.ts';
import { parseExifTime } from '#app/domain/photos/capture-time.ts';
import type { PhotoRole } from '#app/domain/photos/photo-role.ts';
import { recordAudit } from '#app/features/audit/audit.server.ts';
import { settleCase } from '#app/features/cases/settle.server.ts';
import { Case, Circuit, Photo } from '#db/models/index.ts';
import { transact } from '#db/transact.server.ts';
import { inspectImage, makeVersions } from '#storage/images.server.ts';
import { newPhotoKey, objectKeyOf, PHOTO_SIZES } from '#storage/keys.ts';
import { deleteObjects, putObject } from '#storage/store.server.ts';

export type NewPhoto = {
  actor: Actor;
  /** The file on this machine's disk, its SHA-256 and the capture time that the browser named. */
  file: string;
  sha256: string;
  browserTime: Date | null;
  on: { caseId: number } | { circuitId: number };
  link: LinkKey | '';
  role: PhotoRole;
  caption: string;
  now: Date;
};

/**
 * Checks a file, makes its versions, stores all three objects and then the row; whatever fails after the first object
 * removes the objects again. Throws BadImage for a file that is no photo.
 */
export async function keepPhoto(photo: NewPhoto): Promise<Photo> {
  const { actor, file, now } = photo;
  const { mime } = await inspectImage(file);
  const captured = await captureTime(file, photo.browserTime, now);
  const versions = await makeVersions(file, mime);
  const { size } = await stat(file);
  const objectKey = newPhotoKey(actor.shopId);
  try {
    await putObject(objectKeyOf(objectKey, 'original'), createReadStream(file), mime, size);
    await putObject(
      objectKeyOf(objectKey, 'medium'),
      versions.medium,
      'image/jpeg',
      versions.medium.byteLength,
    );
    await putObject(objectKeyOf(objectKey, 'thumb'), versions.thumb, 'image/jpeg', versions.thumb.byteLength);
    return await transact((transaction) =>
      insertRow(photo, { objectKey, contentType: mime, bytes: size, ...captured, ...versions }, transaction),
    );
  } catch (error) {
    await deleteObjects(PHOTO_SIZES.map((name) => objectKeyOf(objectKey, name)));
    throw error;
  }
}

type Stored = Pick<
  Photo,
  'objectKey' | 'contentType' | 'bytes' | 'width' | 'height' | 'capturedAt' | 'capturedAtSource'
>;

async function insertRow(photo: NewPhoto, stored: Stored, transaction: Transaction): Promise<Photo> {
  const { actor, on, link, role, caption, sha256, now } = photo;
  const caseId = 'caseId' in on ? on.caseId : null;
  const circuitId = 'circuitId' in on ? on.circuitId : null;
  const lock = transaction.LOCK.UPDATE;
  if (caseId !== null) await Case.findByPk(caseId, { transaction, lock, rejectOnEmpty: true });
  else await Circuit.findByPk(circuitId ?? 0, { transaction, lock, rejectOnEmpty: true });
  const last = await Photo.max<number | null, Photo>('position', {
    where: { caseId, circuitId },
    transaction,
  });
  const { objectKey, contentType, bytes, width, height, capturedAt, capturedAtSource } = stored;
  const row = await Photo.create(
    {
      ...{ objectKey, contentType, bytes, width, height, capturedAt, capturedAtSource },
      ...{ shopId: actor.shopId, caseId, circuitId, link, role, caption, sha256 },
      position: (last ?? 0) + 1,
      uploadedById: actor.userId || null,
      uploadedByName: actor.name,
      uploadedAt: now,
    },
    { transaction },
  );
  await recordAudit(
    {
      actor,
      action: 'photo-added',
      subject: 'photo',
      subjectId: row.id,
      caseId,
      detail: { role, caption, sha256 },
      at: now,
    },
    transaction,
  );
  if (caseId !== null) await settleCase(caseId, transaction);
  return row;
}

async function captureTime(
  file: string,
  browserTime: Date | null,
  now: Date,
): Promise<Pick<Stored, 'capturedAt' | 'capturedAtSource'>> {
  const tags: { DateTimeOriginal?: string; OffsetTimeOriginal?: string } | undefined = await exifr
    .parse(file, { pick: ['DateTimeOriginal', 'OffsetTimeOriginal'], reviveValues: false })
    .catch(() => undefined);
  const fromFile = parseExifTime(tags?.DateTimeOriginal, tags?.OffsetTimeOriginal, now);
  if (fromFile) return { capturedAt: fromFile, capturedAtSource: 'file' };
  if (browserTime) return { capturedAt: browserTime, capturedAtSource: 'browser' };
  return { capturedAt: null, capturedAtSource: 'unknown' };
}
