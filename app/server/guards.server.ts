import { data, type RouterContextProvider, redirect } from 'react-router';
import { type Action, may } from '#app/domain/permissions/matrix.ts';
import { Forbidden, NotFound } from '#app/features/outcome.ts';
import { type Viewer, viewerContext } from './context.ts';

type Context = Readonly<RouterContextProvider>;

/** The signed-in viewer of a page; without one, on to the sign-in page and back afterwards. */
export function requireViewer(context: Context, url: URL): Viewer {
  const viewer = context.get(viewerContext);
  if (viewer) return viewer;
  const back = `${url.pathname}${url.search}`;
  throw redirect(back === '/' ? '/sign-in' : `/sign-in?${new URLSearchParams({ to: back })}`);
}

/** The viewer inside the signed-in layout, whose middleware has turned everyone else away. */
export function requireActor(context: Context): Viewer {
  const viewer = context.get(viewerContext);
  if (!viewer) throw data(null, { status: 401 });
  return viewer;
}

export function requirePermission(context: Context, action: Action): Viewer {
  const viewer = requireActor(context);
  if (!may(viewer.role, action)) throw data(null, { status: 403 });
  return viewer;
}

/** Runs a feature function for a page: a row that is missing or another shop's is a 404, a forbidden one a 403. */
export async function orRefuse<T>(work: Promise<T>): Promise<T> {
  try {
    return await work;
  } catch (error) {
    if (error instanceof NotFound) throw data(null, { status: 404 });
    if (error instanceof Forbidden) throw data(null, { status: 403 });
    throw error;
  }
}

/** An address part that must be a whole number; anything else is a page that does not exist. */
export function wholeParam(value: string | undefined): number {
  if (!value || !/^\d{1,9}$/.test(value)) throw data(null, { status: 404 });
  return Number(value);
}
