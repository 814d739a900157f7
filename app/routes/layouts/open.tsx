import { Outlet } from 'react-router';
import { ErrorPage } from '#app/components/errors/error-page.tsx';
import { OpenShell } from '#app/components/shell/open-shell.tsx';
import { viewerContext } from '#app/server/context.ts';
import type { Route } from './+types/open.ts';

export function loader({ context }: Route.LoaderArgs) {
  return { signedIn: context.get(viewerContext) !== null };
}

export default function OpenLayout({ loaderData, matches }: Route.ComponentProps) {
  const root = matches[0].loaderData;
  return (
    <OpenShell signedIn={loaderData.signedIn} scheme={root.scheme} toast={root.toast}>
      <Outlet />
    </OpenShell>
  );
}

export function ErrorBoundary({ error }: Route.ErrorBoundaryProps) {
  return <ErrorPage error={error} standalone />;
}
