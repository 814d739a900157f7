import path from 'node:path';
import { createRequestHandler, type ServerBuild } from 'react-router';

const built = path.resolve('build/server/index.js');
let handler: ((request: Request) => Promise<Response>) | undefined;

export type Visit = {
  as?: string | null;
  method?: string;
  form?: Record<string, string | string[]> | FormData;
  json?: unknown;
  body?: BodyInit;
  headers?: Record<string, string>;
};

export const ORIGIN = process.env.PUBLIC_URL ?? '';

/** A request to the built site, as a browser with the given cookie would send it. Redirects are answered, not followed. */
export async function visit(
  address: string,
  { as = null, method, form, json, body, headers = {} }: Visit = {},
): Promise<Response> {
  handler ??= createRequestHandler((await import(built)) as ServerBuild, 'production');
  const sent = new Headers({ Host: new URL(ORIGIN).host, ...headers });
  if (as) sent.set('Cookie', as);
  let payload: BodyInit | undefined = body;
  if (form instanceof FormData) payload = form;
  else if (form) {
    const fields = new URLSearchParams();
    for (const [name, value] of Object.entries(form))
      for (const one of [value].flat()) fields.append(name, one);
    payload = fields;
  } else if (json !== undefined) {
    payload = JSON.stringify(json);
    sent.set('Content-Type', 'application/json');
  }
  const verb = method ?? (payload === undefined ? 'GET' : 'POST');
  if (verb !== 'GET' && !sent.has('Origin') && !sent.has('Authorization')) sent.set('Origin', ORIGIN);
  return handler(new Request(new URL(address, ORIGIN), { method: verb, headers: sent, body: payload }));
}
