import { data, type RouterContextProvider } from 'react-router';
import type { z } from 'zod';
import type { Actor } from '#app/domain/permissions/actor.ts';
import { type Action, may } from '#app/domain/permissions/matrix.ts';
import { findTokenActor } from '#app/features/api-tokens/tokens.server.ts';
import { fieldErrors } from '#app/features/form-fields.ts';
import { type FieldErrors, Forbidden, NotFound, type Refusal } from '#app/features/outcome.ts';
import { requestIdContext, viewerContext } from '#app/server/context.ts';
import { logger } from '#app/server/logger.server.ts';

/** A refusal of the API: `{error: {code, message, fields}}` with the status that fits. */
export class ApiError extends Error {
  override name = 'ApiError';
  constructor(
    readonly status: number,
    readonly code: string,
    message: string,
    readonly fields: FieldErrors = {},
  ) {
    super(message);
  }
}

type Args = { request: Request; context: Readonly<RouterContextProvider> };

/** Who calls: a bearer token if one is sent, else the session of the browser. */
export async function requireApiActor(
  { request, context }: Args,
  action: Action = 'shop:read',
): Promise<Actor> {
  const actor = await findCaller(request, context);
  if (!actor) throw new ApiError(401, 'unauthorized', 'Sign in, or send a bearer token that is in force.');
  if (!may(actor.role, action)) throw new ApiError(403, 'forbidden', 'Your role may not do this.');
  return actor;
}

async function findCaller(request: Request, context: Args['context']): Promise<Actor | null> {
  const header = request.headers.get('Authorization');
  if (header === null) return context.get(viewerContext);
  const token = /^Bearer ([\w-]{20,200})$/.exec(header)?.[1];
  return token ? findTokenActor(token, new Date()) : null;
}

/** Answers what `work` answers as JSON, and every failure in the one shape of the API. */
export async function apiRoute(args: Args, work: () => Promise<unknown>, status = 200): Promise<Response> {
  try {
    const body = await work();
    return body instanceof Response ? body : json(body, status);
  } catch (error) {
    if (error instanceof ApiError) return errorAnswer(error);
    if (error instanceof NotFound)
      return errorAnswer(new ApiError(404, 'not_found', 'There is no such thing here.'));
    if (error instanceof Forbidden)
      return errorAnswer(new ApiError(403, 'forbidden', 'Your role may not do this.'));
    if (args.request.signal.aborted) return new Response(null, { status: 499 });
    logger.error({ err: error, requestId: args.context.get(requestIdContext) }, 'api fault');
    return errorAnswer(new ApiError(500, 'fault', 'Something went wrong here. It has been noted.'));
  }
}

export function json(body: unknown, status = 200): Response {
  return Response.json(body, { status, headers: { 'Cache-Control': 'no-store' } });
}

export function errorAnswer({ status, code, message, fields }: ApiError): Response {
  return json({ error: { code, message, fields } }, status);
}

export function methodNotAllowed(allowed: string): Response {
  const answer = errorAnswer(new ApiError(405, 'method_not_allowed', `Use ${allowed} here.`));
  answer.headers.set('Allow', allowed);
  return answer;
}

/** The body as text, up to a limit; too much is a 413. */
export async function readText(request: Request, maxBytes: number): Promise<string> {
  const decoder = new TextDecoder('utf-8', { fatal: true });
  let text = '';
  let bytes = 0;
  try {
    for await (const chunk of request.body ?? []) {
      bytes += (chunk as Uint8Array).byteLength;
      if (bytes > maxBytes)
        throw new ApiError(413, 'too_large', `At most ${Math.round(maxBytes / 1_000_000)} MB at a time.`);
      text += decoder.decode(chunk as Uint8Array, { stream: true });
    }
    return text + decoder.decode();
  } catch (error) {
    if (error instanceof TypeError) throw new ApiError(400, 'not_text', 'The body is not valid UTF-8.');
    throw error;
  }
}

export async function readJson<T>(request: Request, schema: z.ZodType<T>): Promise<T> {
  const text = await readText(request, 1_000_000);
  let value: unknown;
  try {
    value = JSON.parse(text);
  } catch {
    throw new ApiError(400, 'not_json', 'The body is not valid JSON.');
  }
  const parsed = schema.safeParse(value);
  if (!parsed.success) {
    throw new ApiError(400, 'invalid', 'Some fields are missing or wrong.', fieldErrors(parsed.error));
  }
  return parsed.data;
}

/** A feature's refusal as an error of the API. */
export function refusalError(refusal: Refusal): ApiError {
  switch (refusal.refused) {
    case 'fields':
      return new ApiError(400, 'invalid', 'Some fields are missing or wrong.', refusal.fields);
    case 'conflict':
      return new ApiError(409, 'conflict', `${refusal.byName} changed this meanwhile.`);
    case 'gate':
      return new ApiError(409, 'gate', `${refusal.rule} Missing: ${refusal.lacks.join('; ')}.`);
  }
}

/** For loaders of addresses under /api that exist for no method. */
export function apiNotFound(): never {
  throw data(
    { error: { code: 'not_found', message: 'There is no such thing here.', fields: {} } },
    { status: 404 },
  );
}
