import { readdirSync, readFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import exifr from 'exifr';
import { Jimp } from 'jimp';
import { afterEach, beforeAll, describe, expect, test } from 'vitest';
import type { Actor } from '#app/domain/permissions/actor.ts';
import { loadCaseHead } from '#app/features/cases/queries.server.ts';
import { Forbidden, NotFound } from '#app/features/outcome.ts';
import { findPhotoFor, findSignedPhoto, signedPhotoPath } from '#app/features/photos/access.server.ts';
import { changePhoto } from '#app/features/photos/commands.server.ts';
import { listCasePhotos, listCircuitPhotos } from '#app/features/photos/queries.server.ts';
import { MOST_BYTES, receiveForm } from '#app/features/photos/receive.server.ts';
import { photoAnswer } from '#app/features/photos/serve.server.ts';
import { keepUploads } from '#app/features/photos/upload.server.ts';
import { Photo } from '#db/models/index.ts';
import { checkStorage } from '#storage/check.ts';
import { objectKeyOf, PHOTO_PREFIX } from '#storage/keys.ts';
import { deleteObjects, getObject, listObjects, putObject } from '#storage/store.server.ts';
import { openTestCase } from '#tests/setup/forms.ts';
import { type MadeShop, makeMachine, makeShop } from '#tests/setup/people.ts';

let shop: MadeShop;
let far: MadeShop;
let number: number;
let circuitId: number;
const GAUGE = readFileSync('db/seeds/demo/photos/gauge-static-equal.jpg');
const LATER = new Date(Date.now() + 2 * 60 * 60_000);

beforeAll(async () => {
  shop = await makeShop();
  far = await makeShop('Far');
  const { circuit } = await makeMachine(shop.shop.id);
  circuitId = circuit.id;
  number = await openTestCase(shop.tech);
});

afterEach(() => {
  expect(readdirSync(tmpdir()).filter((name) => name.startsWith('weepmark-upload-'))).toEqual([]);
});

type Sent = Record<string, string | File | File[]>;

function upload(actor: Actor, fields: Sent) {
  const form = new FormData();
  for (const [name, value] of Object.entries(fields))
    for (const one of [value].flat()) form.append(name, one);
  const request = new Request('http://127.0.0.1/x', { method: 'POST', body: form });
  return receiveForm(request, (received) => keepUploads(actor, received, new Date()));
}

const onCase = (files: File | File[], more: Record<string, string> = {}) =>
  upload(shop.tech, { caseNumber: String(number), link: 'trace', role: 'uv', ...more, photos: files });
const file = (content: BlobPart, name = 'photo.jpg') => new File([content], name);

async function countObjects(): Promise<number> {
  let count = 0;
  for await (const _object of listObjects(`${PHOTO_PREFIX}${shop.shop.id}/`)) count += 1;
  return count;
}

async function bytesOf(key: string): Promise<Buffer> {
  const chunks: Buffer[] = [];
  for await (const chunk of (await getObject(key))?.body ?? []) chunks.push(chunk as Buffer);
  return Buffer.concat(chunks);
}

describe('what is kept', () => {
  test('three objects, upright, without metadata; the original byte for byte', async () => {
    const turned = readdirSync('db/seeds/demo/photos').map((name) => `db/seeds/demo/photos/${name}`);
    const orientations = await Promise.all(turned.map((name) => exifr.orientation(name)));
    const source = turned[orientations.indexOf(6)] ?? '';
    expect(source).not.toBe('');
    const bytes = readFileSync(source);
    expect(await exifr.gps(bytes)).toBeTruthy();
    const { photos, errors } = await onCase(file(bytes));
    expect(errors).toEqual([]);
    expect(photos).toMatchObject([{ width: 1600, height: 1200, capturedAtSource: 'file' }]);
    const row = await Photo.findByPk(photos[0]?.id ?? 0, { rejectOnEmpty: true });
    expect((await bytesOf(objectKeyOf(row.objectKey, 'original'))).equals(bytes)).toBe(true);
    for (const [size, width, height] of [
      ['medium', 1600, 1200],
      ['thumb', 320, 240],
    ] as const) {
      const copy = await bytesOf(objectKeyOf(row.objectKey, size));
      const image = await Jimp.fromBuffer(copy);
      expect([image.bitmap.width, image.bitmap.height]).toEqual([width, height]);
      expect(
        await exifr.parse(copy, { gps: true, tiff: true, exif: true }).catch(() => undefined),
      ).toBeFalsy();
    }
  });

  test('PNG and WebP too; a time that is not known is said to be unknown', async () => {
    const png = await new Jimp({ width: 40, height: 30, color: 0x00ff00ff }).getBuffer('image/png');
    const webp = readFileSync('tests/reference/photos/small.webp');
    const { photos, errors } = await onCase([
      file(new Uint8Array(png), 'a.png'),
      file(new Uint8Array(webp), 'b.webp'),
    ]);
    expect(errors).toEqual([]);
    expect(photos).toMatchObject([
      { width: 40, height: 30, capturedAtSource: 'unknown', capturedAt: null },
      { capturedAtSource: 'unknown' },
    ]);
    const named = await onCase(file(new Uint8Array(png)), { capturedAt: '2026-05-03T10:11:12.000Z' });
    expect(named.photos).toMatchObject([
      { capturedAtSource: 'browser', capturedAt: '2026-05-03T10:11:12.000Z' },
    ]);
  });

  test('the chain knows of it', async () => {
    const trace = (await loadCaseHead(shop.tech, number)).chain.find(({ key }) => key === 'trace');
    expect(trace?.state).toBe('partly');
    expect(trace?.lacks).not.toContain('a photo of the spot');
  });

  test('on a circuit, for the ports', async () => {
    const { photos } = await upload(shop.office, {
      circuitId: String(circuitId),
      role: 'port',
      photos: file(GAUGE),
    });
    expect(photos).toMatchObject([{ role: 'port' }]);
    expect((await listCircuitPhotos(shop.tech, circuitId)).photos.length).toBe(1);
  });

  test('uploads at once get places of their own', async () => {
    await Promise.all([onCase(file(GAUGE)), onCase(file(GAUGE)), onCase(file(GAUGE))]);
    const rows = await Photo.findAll({ where: { shopId: shop.shop.id, circuitId: null } });
    expect(new Set(rows.map(({ position }) => position)).size).toBe(rows.length);
  });
});

describe('what is refused, with a clear error and nothing left behind', () => {
  const png = (width: number, height: number) => {
    const header = Buffer.alloc(33);
    header.write('\x89PNG\r\n\x1a\n', 0, 'latin1');
    header.writeUInt32BE(13, 8);
    header.write('IHDR', 12, 'latin1');
    header.writeUInt32BE(width, 16);
    header.writeUInt32BE(height, 20);
    header.set([8, 6, 0, 0, 0], 24);
    return header;
  };
  const cases: [string, BlobPart, RegExp][] = [
    ['words', 'hello there', /not a JPEG, PNG or WebP/],
    ['an empty file', '', /empty/],
    ['a GIF', Buffer.from('R0lGODlhAQABAAAAACwAAAAAAQABAAACAkQBADs=', 'base64'), /not a JPEG, PNG or WebP/],
    ['an SVG', '<svg xmlns="http://www.w3.org/2000/svg"/>', /not a JPEG, PNG or WebP/],
    ['a zip named .jpg', Buffer.from('504b0304140000000000', 'hex'), /not a JPEG, PNG or WebP/],
    ['a JPEG cut in half', GAUGE.subarray(0, Math.floor(GAUGE.length / 3)), /damaged/],
    [
      'a JPEG of noise',
      Buffer.concat([Buffer.from('ffd8ffe000104a464946', 'hex'), Buffer.alloc(400, 7)]),
      /damaged/,
    ],
    ['a header of 50,000 × 50,000', png(50_000, 50_000), /megapixels/],
    ['a header without a picture', png(100, 100), /damaged/],
    ['more than 25 MB', Buffer.alloc(MOST_BYTES + 1, 1), /larger than 25 MB/],
  ];

  test.each(cases)('%s', async (_name, content, words) => {
    const before = [await countObjects(), await Photo.count()];
    const { photos, errors } = await onCase(file(content, 'photo.jpg'));
    expect(photos).toEqual([]);
    expect(errors).toMatchObject([{ file: 'photo.jpg', error: expect.stringMatching(words) }]);
    expect([await countObjects(), await Photo.count()]).toEqual(before);
  });

  test('good ones are kept when others fail', async () => {
    const { photos, errors } = await onCase([file('x', 'a.jpg'), file(GAUGE, 'b.jpg'), file('', 'c.jpg')]);
    expect(photos.length).toBe(1);
    expect(errors.map((one) => one.file)).toEqual(['a.jpg', 'c.jpg']);
  });

  test('the twenty-first file, and no file at all', async () => {
    const many = Array.from({ length: 21 }, (_, place) => file('x', `${place}.jpg`));
    const { errors } = await onCase(many);
    expect(errors[0]?.error).toContain('At most 20');
    expect((await upload(shop.tech, { caseNumber: String(number) })).errors[0]?.error).toContain(
      'at least one',
    );
  });

  test('when the row fails, the objects go', async () => {
    const before = await countObjects();
    const failing = { ...shop.tech, shopId: shop.shop.id, name: 'x'.repeat(400) };
    await expect(
      upload(failing, { caseNumber: String(number), link: 'trace', role: 'uv', photos: file(GAUGE) }),
    ).rejects.toThrow();
    expect(await countObjects()).toBe(before);
  });
});

describe('who may do what', () => {
  let photoId: number;
  beforeAll(async () => {
    const { photos } = await onCase(file(GAUGE));
    photoId = photos[0]?.id ?? 0;
  });

  test('the original: its uploader, the lead and the admin', async () => {
    for (const actor of [shop.tech, shop.lead, shop.admin])
      expect(await findPhotoFor(actor, photoId, 'original')).toBeTruthy();
    await expect(findPhotoFor(shop.office, photoId, 'original')).rejects.toThrow(Forbidden);
    expect(await findPhotoFor(shop.office, photoId, 'medium')).toBeTruthy();
  });

  test('another shop sees, adds and changes nothing', async () => {
    for (const size of ['thumb', 'medium', 'original'] as const) {
      await expect(findPhotoFor(far.lead, photoId, size)).rejects.toThrow(NotFound);
    }
    await expect(changePhoto(far.lead, photoId, { intent: 'delete' }, new Date())).rejects.toThrow(NotFound);
    await expect(upload(far.tech, { caseNumber: String(number), photos: file(GAUGE) })).rejects.toThrow(
      NotFound,
    );
    await expect(upload(far.tech, { circuitId: String(circuitId), photos: file(GAUGE) })).rejects.toThrow(
      NotFound,
    );
    await expect(upload(shop.admin, { caseNumber: String(number), photos: file(GAUGE) })).rejects.toThrow(
      Forbidden,
    );
  });

  test('a signed link works for its size and time only', async () => {
    const now = new Date();
    const until = new Date(now.getTime() + 60_000);
    const params = (size: 'thumb' | 'medium') =>
      new URL(signedPhotoPath(photoId, size, until), 'http://x').searchParams;
    expect(await findSignedPhoto(photoId, 'medium', params('medium'), now)).toBeTruthy();
    await expect(findSignedPhoto(photoId, 'thumb', params('medium'), now)).rejects.toThrow(NotFound);
    await expect(findSignedPhoto(photoId, 'original', params('medium'), now)).rejects.toThrow(NotFound);
    await expect(findSignedPhoto(photoId + 1, 'medium', params('medium'), now)).rejects.toThrow(NotFound);
    await expect(findSignedPhoto(photoId, 'medium', params('medium'), LATER)).rejects.toThrow(NotFound);
  });

  test('is answered privately, once, and the original in ranges', async () => {
    const row = await findPhotoFor(shop.lead, photoId, 'original');
    const ask = (headers: Record<string, string> = {}, size: 'thumb' | 'original' = 'original') =>
      photoAnswer(row, size, new Request('http://x', { headers }));
    const whole = await ask();
    expect(whole?.headers.get('Cache-Control')).toContain('private');
    expect((await whole?.arrayBuffer())?.byteLength).toBe(GAUGE.byteLength);
    const tag = whole?.headers.get('ETag') ?? '';
    expect((await ask({ 'If-None-Match': tag }))?.status).toBe(304);
    const part = await ask({ Range: 'bytes=10-19' });
    expect([part?.status, part?.headers.get('Content-Range')]).toEqual([
      206,
      `bytes 10-19/${GAUGE.byteLength}`,
    ]);
    expect(
      Buffer.from((await part?.arrayBuffer()) ?? new ArrayBuffer(0)).equals(GAUGE.subarray(10, 20)),
    ).toBe(true);
    expect((await ask({ Range: 'bytes=999999999-' }))?.status).toBe(416);
    await (await ask({ Range: 'nonsense' }))?.body?.cancel();
  });

  test('deleted by its uploader or the lead, and brought back', async () => {
    await expect(changePhoto(shop.office, photoId, { intent: 'delete' }, new Date())).rejects.toThrow(
      Forbidden,
    );
    await changePhoto(shop.tech, photoId, { intent: 'delete' }, new Date());
    const shown = await listCasePhotos(shop.tech, number);
    expect(shown.photos.some(({ id }) => id === photoId)).toBe(false);
    expect(shown.deleted.some(({ id }) => id === photoId)).toBe(true);
    await changePhoto(shop.lead, photoId, { intent: 'restore' }, new Date());
    expect((await listCasePhotos(shop.tech, number)).photos.some(({ id }) => id === photoId)).toBe(true);
  });

  test('moves one place at a time and stays at the end', async () => {
    const order = async () => (await listCasePhotos(shop.tech, number)).photos.map(({ id }) => id);
    const before = await order();
    await changePhoto(shop.tech, photoId, { intent: 'move', by: 'up' }, new Date());
    const after = await order();
    expect(after.indexOf(photoId)).toBe(before.indexOf(photoId) - 1);
    const first = after[0] ?? 0;
    await changePhoto(shop.tech, first, { intent: 'move', by: 'up' }, new Date());
    expect(await order()).toEqual(after);
  });
});

describe('the storage check', () => {
  test('finds every kind of fault, repairs it, and then finds none', async () => {
    await checkStorage(true, LATER);
    expect((await checkStorage(false, LATER)).faults).toEqual([]);
    const rows = await Photo.findAll({ limit: 3, order: [['id', 'ASC']] });
    const key = (place: number, size: 'thumb' | 'original') =>
      objectKeyOf(rows[place]?.objectKey ?? '', size);
    await deleteObjects([key(0, 'thumb'), key(1, 'original')]);
    await putObject(`${PHOTO_PREFIX}${shop.shop.id}/photo/orphan/medium`, Buffer.from('x'), 'image/jpeg', 1);
    await rows[2]?.update({ deletedAt: new Date('2020-01-01') });
    expect((await checkStorage(false, new Date())).faults.some((fault) => fault.includes('orphan'))).toBe(
      false,
    );
    const { faults } = await checkStorage(true, LATER);
    expect(faults.map((fault) => fault.replace(/\d+/g, 'N')).sort()).toEqual([
      'object without a photo: shop/N/photo/orphan/medium',
      'photo N: deleted more than N days ago, still stored',
      'photo N: its original is gone',
      'photo N: its thumb version is gone',
    ]);
    expect((await checkStorage(false, LATER)).faults).toEqual([]);
    expect(await Photo.findByPk(rows[0]?.id)).toBeTruthy();
    expect(await Photo.findByPk(rows[1]?.id)).toBeNull();
  });
});
