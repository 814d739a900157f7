import { alikeComplaint } from '#app/features/find/alike.server.ts';
import { LONGEST_QUERY } from '#app/features/find/schema.ts';
import { requireActor } from '#app/server/guards.server.ts';
import type { Route } from './+types/alike.ts';

const SHOWN = 5;

/** Solved cases like a complaint that is being typed. */
export async function loader({ context, url }: Route.LoaderArgs) {
  const viewer = requireActor(context);
  const { searchParams } = url;
  const medium = searchParams.get('medium') ?? '';
  const hits = await alikeComplaint(
    viewer,
    {
      text: (searchParams.get('text') ?? '').slice(0, LONGEST_QUERY),
      symptomIds: (searchParams.get('symptoms') ?? '').split(',').filter(Boolean).slice(0, 40),
      medium: /^[\w-]{1,60}$/.test(medium) ? medium : undefined,
      machineNumber: (searchParams.get('machine') ?? '').slice(0, 60) || undefined,
    },
    SHOWN,
  );
  return { hits };
}
