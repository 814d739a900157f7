/**
 * The moment of an Exif 2.32 time (`DateTimeOriginal`, "YYYY:MM:DD HH:MM:SS") with its offset ("+02:00"); without one
 * the camera's clock is taken as UTC. Null for anything that is no such time, or lies before 1990 or after `now`.
 */
export function parseExifTime(text: string | undefined, offset: string | undefined, now: Date): Date | null {
  const parts = /^(\d{4}):(\d{2}):(\d{2}) (\d{2}):(\d{2}):(\d{2})/.exec(text ?? '');
  if (!parts) return null;
  const [, year, month, day, hour, minute, second] = parts;
  const zone = /^[+-]\d{2}:\d{2}$/.test(offset ?? '') ? offset : 'Z';
  return plausible(new Date(`${year}-${month}-${day}T${hour}:${minute}:${second}${zone}`), now);
}

/** A capture time that a browser names, as an ISO time or in milliseconds. */
export function parseBrowserTime(text: string, now: Date): Date | null {
  const time = /^\d{10,14}$/.test(text)
    ? Number(text)
    : /^\d{4}-\d{2}-\d{2}T/.test(text)
      ? Date.parse(text)
      : Number.NaN;
  return plausible(new Date(time), now);
}

const A_DAY_MS = 24 * 60 * 60_000;
const EARLIEST = Date.UTC(1990, 0, 1);

function plausible(time: Date, now: Date): Date | null {
  const value = time.getTime();
  return Number.isFinite(value) && value >= EARLIEST && value <= now.getTime() + A_DAY_MS ? time : null;
}
