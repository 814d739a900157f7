import { env } from './env.server.ts';

/**
 * Whether a write comes from another site. Browsers name the sender in Sec-Fetch-Site, older ones in Origin;
 * a client that sends neither (a command-line tool with a token) has no ambient cookies to abuse.
 */
export function isCrossSiteWrite(request: Request): boolean {
  if (request.method === 'GET' || request.method === 'HEAD' || request.method === 'OPTIONS') return false;
  const site = request.headers.get('Sec-Fetch-Site');
  if (site && site !== 'same-origin' && site !== 'none') return true;
  const origin = request.headers.get('Origin');
  if (!origin) return false;
  const host = URL.canParse(origin) ? new URL(origin).host : null;
  return host !== new URL(env.PUBLIC_URL).host && host !== request.headers.get('Host');
}

/** Headers of every answer. The content security policy of pages is added with their nonce. */
export function setSecurityHeaders(headers: Headers): void {
  headers.set('X-Content-Type-Options', 'nosniff');
  headers.set('Referrer-Policy', 'same-origin');
  headers.set('X-Frame-Options', 'DENY');
  headers.set('Cross-Origin-Opener-Policy', 'same-origin');
  headers.set('Cross-Origin-Resource-Policy', 'same-origin');
  headers.set('Permissions-Policy', 'camera=(self), geolocation=(), microphone=(), payment=()');
  if (env.PUBLIC_URL.startsWith('https://')) headers.set('Strict-Transport-Security', 'max-age=31536000');
  if (!headers.has('Content-Security-Policy')) {
    headers.set('Content-Security-Policy', "default-src 'none'; frame-ancestors 'none'");
  }
}

/** The policy of a page: own files only, scripts by nonce. Development needs inline styles and the reload socket. */
export function pagePolicy(nonce: string): string {
  const development = env.NODE_ENV === 'development';
  return [
    "default-src 'self'",
    `script-src 'self' 'nonce-${nonce}'`,
    `style-src 'self'${development ? " 'unsafe-inline'" : ''}`,
    "img-src 'self' blob: data:",
    "font-src 'self'",
    `connect-src 'self'${development ? ' ws:' : ''}`,
    "object-src 'none'",
    "base-uri 'none'",
    "form-action 'self'",
    "frame-ancestors 'none'",
  ].join('; ');
}
