import type { LinkKey } from '#app/domain/chain/chain.ts';
import type { PhotoRole } from '#app/domain/photos/photo-role.ts';

/** A photo as a page shows it. `original` is null for those who may not have it. */
export type PhotoView = {
  id: number;
  link: LinkKey | '';
  role: PhotoRole;
  roleName: string;
  caption: string;
  width: number;
  height: number;
  capturedAt: string | null;
  capturedAtSource: 'file' | 'browser' | 'unknown';
  uploadedByName: string;
  uploadedAt: string;
  thumb: string;
  medium: string;
  original: string | null;
  mayDelete: boolean;
};

export type PhotoList = { photos: PhotoView[]; deleted: PhotoView[]; mayAdd: boolean };
