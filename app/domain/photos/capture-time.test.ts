import { describe, expect, test } from 'vitest';
import { parseBrowserTime, parseExifTime } from './capture-time.ts';

const NOW = new Date('2026-12-01T12:00:00Z');

describe('capture times', () => {
  test.each([
    ['2026:05:03 10:11:12', undefined, '2026-05-03T10:11:12.000Z'],
    ['2026:05:03 10:11:12', '+02:00', '2026-05-03T08:11:12.000Z'],
    ['2026:05:03 10:11:12', 'nonsense', '2026-05-03T10:11:12.000Z'],
  ])('%s %s', (text, offset, iso) => expect(parseExifTime(text, offset, NOW)?.toISOString()).toBe(iso));

  test.each([
    undefined,
    '',
    '0000:00:00 00:00:00',
    '2026:13:40 99:00:00',
    '1970:01:01 00:00:00',
    '2036:01:01 00:00:00',
  ])('%j is unknown', (text) => expect(parseExifTime(text, undefined, NOW)).toBeNull());

  test.each([
    ['1764590400000', '2025-12-01T12:00:00.000Z'],
    ['2026-05-03T10:11:12.000Z', '2026-05-03T10:11:12.000Z'],
  ])('the browser’s %s', (text, iso) => expect(parseBrowserTime(text, NOW)?.toISOString()).toBe(iso));

  test.each(['', 'yesterday', '12', '99999999999999'])('the browser’s %j is unknown', (text) =>
    expect(parseBrowserTime(text, NOW)).toBeNull(),
  );
});
