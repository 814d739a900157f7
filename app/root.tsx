import { randomUUID } from 'node:crypto';
import type { ReactNode } from 'react';
import { data, Links, Meta, Outlet, Scripts, ScrollRestoration, useRouteLoaderData } from 'react-router';
import { ErrorPage } from '#app/components/errors/error-page.tsx';
import { Progress } from '#app/components/shell/progress.tsx';
import { findViewer } from '#app/features/auth/sessions.server.ts';
import { requestIdContext, viewerContext } from '#app/server/context.ts';
import { readScheme, takeToast } from '#app/server/cookies.server.ts';
import { logger } from '#app/server/logger.server.ts';
import { useNonce } from '#app/server/nonce.ts';
import { isCrossSiteWrite, setSecurityHeaders } from '#app/server/security.server.ts';
import { whileUnderWay } from '#app/server/shutdown.server.ts';
import type { Route } from './+types/root.ts';
import favicon from './components/shell/favicon.svg';
import './app.css';

export const links: Route.LinksFunction = () => [{ rel: 'icon', href: favicon, type: 'image/svg+xml' }];

export const meta: Route.MetaFunction = () => [
  { title: 'Weepmark' },
  { name: 'description', content: 'The leak diagnosis case library of a plant or fleet shop.' },
];

export const middleware: Route.MiddlewareFunction[] = [logRequest, refuseCrossSiteWrites, findWhoAsks];

async function logRequest(
  { request, context, url }: Parameters<Route.MiddlewareFunction>[0],
  next: () => Promise<unknown>,
) {
  const requestId = randomUUID();
  context.set(requestIdContext, requestId);
  const started = performance.now();
  const response = await whileUnderWay(async () => (await next()) as Response);
  if (!response.headers.has('Content-Security-Policy')) setSecurityHeaders(response.headers);
  response.headers.set('X-Request-Id', requestId);
  const ms = Math.round(performance.now() - started);
  logger.info(
    { requestId, method: request.method, path: url.pathname, status: response.status, ms },
    'request',
  );
  return response;
}

function refuseCrossSiteWrites({ request }: Parameters<Route.MiddlewareFunction>[0]) {
  if (isCrossSiteWrite(request))
    throw new Response('This came from another site and was refused.', { status: 403 });
}

async function findWhoAsks({ request, context }: Parameters<Route.MiddlewareFunction>[0]) {
  context.set(viewerContext, await findViewer(request, new Date()));
}

export async function loader({ request }: Route.LoaderArgs) {
  const { toast, headers } = await takeToast(request);
  return data({ scheme: await readScheme(request), toast }, { headers });
}

export function Layout({ children }: { children: ReactNode }) {
  const nonce = useNonce();
  const root = useRouteLoaderData<typeof loader>('root');
  return (
    <html lang="en-GB" data-scheme={root?.scheme ?? 'system'}>
      <head>
        <meta charSet="utf-8" />
        <meta name="viewport" content="width=device-width, initial-scale=1" />
        <meta name="color-scheme" content="light dark" />
        <Meta />
        <Links />
      </head>
      <body>
        <Progress />
        {children}
        <ScrollRestoration nonce={nonce} />
        <Scripts nonce={nonce} />
      </body>
    </html>
  );
}

export default function App() {
  return <Outlet />;
}

export function ErrorBoundary({ error }: Route.ErrorBoundaryProps) {
  return <ErrorPage error={error} standalone />;
}
