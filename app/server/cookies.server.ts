import { type CookieOptions, createCookie } from 'react-router';
import type { Scheme } from '#app/domain/units/preferences.ts';
import { env } from './env.server.ts';

const shared: CookieOptions = {
  path: '/',
  httpOnly: true,
  sameSite: 'lax',
  secure: env.PUBLIC_URL.startsWith('https://'),
  secrets: [env.SESSION_SECRET],
};

const YEAR_SECONDS = 365 * 24 * 60 * 60;
export const SESSION_DAYS = 30;

export const sessionCookie = createCookie('weepmark_session', {
  ...shared,
  maxAge: SESSION_DAYS * 24 * 60 * 60,
});
export const schemeCookie = createCookie('weepmark_scheme', { ...shared, maxAge: YEAR_SECONDS });
const toastCookie = createCookie('weepmark_toast', { ...shared, maxAge: 60 });

export type Toast = {
  tone: 'done' | 'warn';
  text: string;
  undo?: { action: string; fields: Record<string, string> };
};

/** The `Set-Cookie` header that shows `toast` once on the next page. */
export async function toastHeader(toast: Toast): Promise<HeadersInit> {
  return { 'Set-Cookie': await toastCookie.serialize(toast) };
}

/** The waiting toast, if any, and the header that clears it. */
export async function takeToast(request: Request): Promise<{ toast: Toast | null; headers: HeadersInit }> {
  const toast: Toast | null = await toastCookie.parse(request.headers.get('Cookie'));
  if (!toast || typeof toast.text !== 'string') return { toast: null, headers: {} };
  return { toast, headers: { 'Set-Cookie': await toastCookie.serialize('', { maxAge: 0 }) } };
}

export async function readScheme(request: Request): Promise<Scheme> {
  const stored: unknown = await schemeCookie.parse(request.headers.get('Cookie'));
  return stored === 'daylight' || stored === 'lamp' ? stored : 'system';
}
