import { renderNote } from '#app/features/write-ups/markdown.server.ts';
import { readForm } from '#app/server/forms.server.ts';
import { requirePermission } from '#app/server/guards.server.ts';
import type { Route } from './+types/preview.ts';

const MOST_LETTERS = 50_000;

/** A note as it will look, while it is being written. */
export async function action({ request, context }: Route.ActionArgs) {
  requirePermission(context, 'write-up:write');
  const body = String((await readForm(request)).get('body') ?? '').slice(0, MOST_LETTERS);
  return { html: renderNote(body) };
}
