import { Readable } from 'node:stream';
import type { Photo } from '#db/models/index.ts';
import { objectKeyOf, type PhotoSize } from '#storage/keys.ts';
import { getObject } from '#storage/store.server.ts';

const AN_HOUR = 3600;

/** A version of a photo as an answer: private, with a tag, and in ranges where the original is asked for. */
export async function photoAnswer(photo: Photo, size: PhotoSize, request: Request): Promise<Response | null> {
  const tag = `"${photo.sha256.slice(0, 24)}-${size}"`;
  const headers = new Headers({
    'Cache-Control': `private, max-age=${AN_HOUR}`,
    ETag: tag,
    'Content-Type': size === 'original' ? photo.contentType : 'image/jpeg',
    'Content-Disposition': 'inline',
    Vary: 'Cookie',
  });
  if (request.headers.get('If-None-Match') === tag) return new Response(null, { status: 304, headers });
  const range = size === 'original' ? readRange(request.headers.get('Range'), photo.bytes) : null;
  if (range === 'unsatisfiable') {
    headers.set('Content-Range', `bytes */${photo.bytes}`);
    return new Response(null, { status: 416, headers });
  }
  const object = await getObject(objectKeyOf(photo.objectKey, size), range ?? undefined);
  if (!object) return null;
  headers.set('Content-Length', String(object.length));
  if (size === 'original') headers.set('Accept-Ranges', 'bytes');
  if (range && object.contentRange) headers.set('Content-Range', object.contentRange);
  const body = Readable.toWeb(object.body) as ReadableStream;
  return new Response(body, { status: range ? 206 : 200, headers });
}

/** One range of bytes, as the store takes it; several ranges at once are answered whole. */
function readRange(header: string | null, bytes: number): string | null | 'unsatisfiable' {
  const parts = /^bytes=(\d{0,15})-(\d{0,15})$/.exec(header ?? '');
  if (!parts || (parts[1] === '' && parts[2] === '')) return null;
  const [from, to] =
    parts[1] === ''
      ? [bytes - Number(parts[2]), bytes - 1]
      : [Number(parts[1]), parts[2] === '' ? bytes - 1 : Number(parts[2])];
  if (from >= bytes || to < from) return 'unsatisfiable';
  return `bytes=${Math.max(from, 0)}-${Math.min(to, bytes - 1)}`;
}
