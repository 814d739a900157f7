import { randomBytes } from 'node:crypto';
import { PassThrough } from 'node:stream';
import { createReadableStreamFromReadable } from '@react-router/node';
import { isbot } from 'isbot';
import { renderToPipeableStream } from 'react-dom/server';
import {
  type EntryContext,
  type HandleErrorFunction,
  type RouterContextProvider,
  ServerRouter,
} from 'react-router';
import { requestIdContext } from '#app/server/context.ts';
import { logger } from '#app/server/logger.server.ts';
import { NonceContext } from '#app/server/nonce.ts';
import { pagePolicy, setSecurityHeaders } from '#app/server/security.server.ts';

export const streamTimeout = 10_000;

export default function handleRequest(
  request: Request,
  status: number,
  headers: Headers,
  entryContext: EntryContext,
  context: RouterContextProvider,
): Promise<Response> {
  const nonce = randomBytes(18).toString('base64');
  const waitForAll = isbot(request.headers.get('User-Agent')) || request.headers.get('Save-Data') === 'on';
  return new Promise((resolve, reject) => {
    let answered = false;
    let answerStatus = status;
    const { pipe, abort } = renderToPipeableStream(
      <NonceContext value={nonce}>
        <ServerRouter context={entryContext} url={request.url} nonce={nonce} />
      </NonceContext>,
      {
        nonce,
        [waitForAll ? 'onAllReady' : 'onShellReady']() {
          answered = true;
          const body = new PassThrough();
          headers.set('Content-Type', 'text/html; charset=utf-8');
          headers.set('Content-Security-Policy', pagePolicy(nonce));
          if (!headers.has('Cache-Control')) headers.set('Cache-Control', 'private, no-cache');
          setSecurityHeaders(headers);
          resolve(new Response(createReadableStreamFromReadable(body), { headers, status: answerStatus }));
          pipe(body);
        },
        onShellError: reject,
        onError(error) {
          answerStatus = 500;
          if (answered)
            logger.error({ err: error, requestId: context.get(requestIdContext) }, 'render fault');
        },
      },
    );
    setTimeout(abort, streamTimeout + 1000).unref();
  });
}

export const handleError: HandleErrorFunction = (error, { request, context }) => {
  if (request.signal.aborted) return;
  const { method, url } = request;
  logger.error({ err: error, method, url, requestId: context.get(requestIdContext) }, 'request fault');
};
