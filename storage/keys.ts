import { randomBytes } from 'node:crypto';

export const PHOTO_SIZES = ['thumb', 'medium', 'original'] as const;
export type PhotoSize = (typeof PHOTO_SIZES)[number];

/** The longest side of a version, in pixels. */
export const LONGEST_SIDE = { medium: 1600, thumb: 320 } as const;

export const PHOTO_PREFIX = 'shop/';

/** Where a new photo's three objects lie; the name cannot be guessed. */
export function newPhotoKey(shopId: number): string {
  return `${PHOTO_PREFIX}${shopId}/photo/${randomBytes(18).toString('base64url')}`;
}

export function objectKeyOf(photoKey: string, size: PhotoSize): string {
  return `${photoKey}/${size}`;
}
