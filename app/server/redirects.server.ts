import { redirect } from 'react-router';
import { toastHeader } from './cookies.server.ts';

/** After a success: on to `to`, with a word of what was done. */
export async function redirectWithToast(to: string, text: string): Promise<Response> {
  return redirect(to, { headers: await toastHeader({ tone: 'done', text }) });
}

/** A path of this site from an untrusted value; anything else falls back. */
export function safePath(value: unknown, fallback: string): string {
  if (typeof value !== 'string' || !value.startsWith('/') || value.startsWith('//') || value.includes('\\'))
    return fallback;
  return value;
}
