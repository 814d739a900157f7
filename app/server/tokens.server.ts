import { createHash, createHmac, randomBytes, timingSafeEqual } from 'node:crypto';
import { env } from './env.server.ts';

/** A secret for a link, cookie or API token: 256 bits, safe in addresses. Only its hash is stored. */
export function randomToken(): string {
  return randomBytes(32).toString('base64url');
}

/** 64 hex digits. The tokens hashed here are random, so a plain digest is enough. */
export function hashToken(token: string): string {
  return createHash('sha256').update(token).digest('hex');
}

/** A signature over `text` with the server's secret, for short-lived links. */
export function sign(text: string): string {
  return createHmac('sha256', env.SESSION_SECRET).update(text).digest('base64url');
}

export function signatureMatches(text: string, signature: string): boolean {
  const expected = Buffer.from(sign(text));
  const given = Buffer.from(signature);
  return expected.length === given.length && timingSafeEqual(expected, given);
}
