import type { Actor } from '#app/domain/permissions/actor.ts';
import { may } from '#app/domain/permissions/matrix.ts';
import { Forbidden, NotFound } from '#app/features/outcome.ts';
import { sign, signatureMatches } from '#app/server/tokens.server.ts';
import { Photo } from '#db/models/index.ts';
import type { PhotoSize } from '#storage/keys.ts';

/** A short-lived link to a version of a photo, for readers without an account. Originals are never linked so. */
export function signedPhotoPath(photoId: number, size: Exclude<PhotoSize, 'original'>, until: Date): string {
  const time = until.getTime();
  return `/photos/${photoId}/${size}?until=${time}&sig=${sign(`photo ${photoId} ${size} ${time}`)}`;
}

/** The photo that a signed link stands for; missing, forged and expired links alike are not found. */
export async function findSignedPhoto(
  photoId: number,
  size: PhotoSize,
  params: URLSearchParams,
  now: Date,
): Promise<Photo> {
  const until = Number(params.get('until'));
  const genuine = signatureMatches(`photo ${photoId} ${size} ${until}`, params.get('sig') ?? '');
  if (size === 'original' || !genuine || !(until > now.getTime())) throw new NotFound();
  const photo = await Photo.findOne({ where: { id: photoId, deletedAt: null } });
  if (!photo) throw new NotFound();
  return photo;
}

/** A photo of the actor's shop in a size that they may have. */
export async function findPhotoFor(actor: Actor, photoId: number, size: PhotoSize): Promise<Photo> {
  const photo = await Photo.findOne({ where: { id: photoId, shopId: actor.shopId } });
  if (!photo) throw new NotFound();
  if (size === 'original' && !mayHaveOriginal(actor, photo)) throw new Forbidden();
  return photo;
}

/** Originals hold what was stripped from the copies: position and device. */
export function mayHaveOriginal(actor: Actor, photo: Pick<Photo, 'uploadedById'>): boolean {
  return may(actor.role, 'photo:original') || photo.uploadedById === actor.userId;
}
