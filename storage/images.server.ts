import path from 'node:path';
import { fileTypeFromFile } from 'file-type';
import { imageSizeFromFile } from 'image-size/fromFile';
import { Piscina } from 'piscina';
import { env } from '#app/server/env.server.ts';
import { LONGEST_SIDE } from './keys.ts';

const TYPES = ['image/jpeg', 'image/png', 'image/webp'];
const WAITING_PER_WORKER = 12;
const QUALITY = 84;

/** Why a file is no photo that can be kept; the message is for the person who sent it. */
export class BadImage extends Error {
  override name = 'BadImage';
}

/** The server has as much image work waiting as it takes. */
export class ImagesBusy extends Error {
  override name = 'ImagesBusy';
}

export type Versions = { width: number; height: number; medium: Buffer; thumb: Buffer };

let pool: Piscina | undefined;

function imagePool(): Piscina {
  pool ??= new Piscina({
    filename: path.resolve('storage/image-worker.mjs'),
    minThreads: 0,
    maxThreads: env.IMAGE_WORKERS,
    maxQueue: env.IMAGE_WORKERS * WAITING_PER_WORKER,
    idleTimeout: 20_000,
  });
  return pool;
}

/** Ends the worker threads of a script that is done. */
export async function closeImagePool(): Promise<void> {
  await pool?.close();
  pool = undefined;
}

/** What a file is, by its bytes and its header alone: nothing is decoded yet. */
export async function inspectImage(file: string): Promise<{ mime: string; width: number; height: number }> {
  const type = await fileTypeFromFile(file);
  if (!type || !TYPES.includes(type.mime)) {
    throw new BadImage(
      type?.mime === 'image/heic' || type?.mime === 'image/heif'
        ? 'HEIC photos cannot be read here. Set the camera to “most compatible” (JPEG), or send a JPEG.'
        : 'This is not a JPEG, PNG or WebP picture.',
    );
  }
  const size = await imageSizeFromFile(file).catch(() => null);
  if (!size?.width || !size.height) throw new BadImage('The header of this picture is damaged.');
  if (size.width * size.height > env.IMAGE_MAX_MEGAPIXELS * 1_000_000) {
    throw new BadImage(`This picture has more than ${env.IMAGE_MAX_MEGAPIXELS} megapixels.`);
  }
  return { mime: type.mime, width: size.width, height: size.height };
}

/** The upright versions of a photo, made in a worker thread. */
export async function makeVersions(file: string, mime: string): Promise<Versions> {
  try {
    const made: { width: number; height: number; medium: Uint8Array; thumb: Uint8Array } =
      await imagePool().run({
        path: file,
        mime,
        sides: LONGEST_SIDE,
        quality: QUALITY,
      });
    return { ...made, medium: Buffer.from(made.medium), thumb: Buffer.from(made.thumb) };
  } catch (error) {
    if (error instanceof Error && /queue is at limit/i.test(error.message)) {
      throw new ImagesBusy('Too many photos are being worked on. Try again in a minute.');
    }
    throw new BadImage('This picture is damaged and cannot be read.');
  }
}
