import { exportBook } from '#app/features/refrigerant-book/queries.server.ts';
import { parseBook } from '#app/features/refrigerant-book/schema.ts';
import { requireViewer } from '#app/server/guards.server.ts';
import type { Route } from './+types/export.ts';

export async function loader({ context, url }: Route.LoaderArgs) {
  const viewer = requireViewer(context, url);
  return new Response(await exportBook(viewer, parseBook(url.searchParams)), {
    headers: {
      'Content-Type': 'text/csv; charset=utf-8',
      'Content-Disposition': 'attachment; filename="refrigerant-book.csv"',
      'Cache-Control': 'private, no-store',
    },
  });
}
