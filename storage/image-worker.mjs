import { readFile } from 'node:fs/promises';
import { createRequire } from 'node:module';
import { Jimp, ResizeStrategy } from 'jimp';

const DECODE_MEGABYTES = 2048;

/**
 * Makes the upright copies of a photo, without any of its metadata. Runs in a worker thread.
 * @param {{path: string, mime: string, sides: {medium: number, thumb: number}, quality: number}} job
 */
export default async function makeVersions({ path, mime, sides, quality }) {
  const bytes = await readFile(path);
  const image = mime === 'image/webp' ? await decodeWebp(bytes) : await decodeOther(bytes, mime);
  const { width, height } = image.bitmap;
  shrink(image, sides.medium);
  const medium = await image.getBuffer('image/jpeg', { quality });
  shrink(image, sides.thumb);
  const thumb = await image.getBuffer('image/jpeg', { quality });
  return { width, height, medium, thumb };
}

/**
 * @param {Buffer} bytes
 * @param {string} mime
 */
function decodeOther(bytes, mime) {
  const options =
    mime === 'image/jpeg' ? { 'image/jpeg': { maxMemoryUsageInMB: DECODE_MEGABYTES } } : undefined;
  return Jimp.fromBuffer(bytes, options);
}

/** @type {Promise<unknown> | undefined} */
let webpReady;

/** @param {Buffer} bytes */
async function decodeWebp(bytes) {
  globalThis.ImageData ??= /** @type {any} */ (
    class {
      /**
       * @param {Uint8ClampedArray} data
       * @param {number} width
       * @param {number} height
       */
      constructor(data, width, height) {
        Object.assign(this, { data, width, height });
      }
    }
  );
  const { default: decode, init } = await import('@jsquash/webp/decode.js');
  webpReady ??= readFile(createRequire(import.meta.url).resolve('@jsquash/webp/codec/dec/webp_dec.wasm'))
    .then((code) => WebAssembly.compile(code))
    .then((module) => init(module));
  await webpReady;
  const { data, width, height } = await decode(
    bytes.buffer.slice(bytes.byteOffset, bytes.byteOffset + bytes.byteLength),
  );
  return Jimp.fromBitmap({ data: Buffer.from(data.buffer), width, height });
}

/**
 * @param {any} image
 * @param {number} side
 */
function shrink(image, side) {
  const { width, height } = image.bitmap;
  if (Math.max(width, height) <= side) return;
  const scale = side / Math.max(width, height);
  image.resize({
    w: Math.max(1, Math.round(width * scale)),
    h: Math.max(1, Math.round(height * scale)),
    mode: scale < 0.5 ? undefined : ResizeStrategy.BILINEAR,
  });
}
