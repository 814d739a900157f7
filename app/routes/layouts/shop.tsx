import { Outlet, useRouteLoaderData } from 'react-router';
import { ErrorPage } from '#app/components/errors/error-page.tsx';
import { AppShell } from '#app/components/shell/app-shell.tsx';
import type { loader as rootLoader } from '#app/root.tsx';
import { requireActor, requireViewer } from '#app/server/guards.server.ts';
import type { Route } from './+types/shop.ts';

export const middleware: Route.MiddlewareFunction[] = [
  ({ context, url }) => {
    requireViewer(context, url);
  },
];

/** Also what makes the middleware run when the browser navigates without a page load. */
export function loader({ context }: Route.LoaderArgs) {
  const { name, role, shopName } = requireActor(context);
  return { viewer: { name, role, shopName } };
}

export default function ShopLayout({ loaderData, matches }: Route.ComponentProps) {
  const root = matches[0].loaderData;
  return (
    <AppShell viewer={loaderData.viewer} scheme={root.scheme} toast={root.toast}>
      <Outlet />
    </AppShell>
  );
}

export function ErrorBoundary({ error, loaderData }: Route.ErrorBoundaryProps) {
  const root = useRouteLoaderData<typeof rootLoader>('root');
  if (!loaderData) return <ErrorPage error={error} standalone />;
  return (
    <AppShell viewer={loaderData.viewer} scheme={root?.scheme ?? 'system'} toast={null}>
      <ErrorPage error={error} />
    </AppShell>
  );
}
