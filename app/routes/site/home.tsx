import { redirect } from 'react-router';
import { CircuitDrawing } from '#app/components/drawing/circuit-drawing.tsx';
import { ButtonLink } from '#app/components/ui/button.tsx';
import { LINK_KEYS, LINK_NAMES, type LinkKey } from '#app/domain/chain/chain.ts';
import { baseVocabulary, partNames } from '#app/domain/vocabulary/vocabulary.ts';
import { viewerContext } from '#app/server/context.ts';
import type { Route } from './+types/home.ts';

export const meta: Route.MetaFunction = () => [
  { title: 'Weepmark: leak cases with their proof' },
  {
    name: 'description',
    content: 'Where a plant or fleet shop keeps its leak cases, with the photos that prove them.',
  },
];

export function loader({ context }: Route.LoaderArgs) {
  if (context.get(viewerContext)) throw redirect('/bench');
  return { names: partNames(baseVocabulary, 'refrigerant') };
}

const SAID: Record<LinkKey, string> = {
  complaint: 'What the operator said, in their words, on which machine.',
  readings: 'Pressures and temperatures, in the unit the gauge shows.',
  trace: 'What was tried, what the lamp showed, and the part it was.',
  repair: 'What was replaced, and what else while it was open.',
  proof: 'Tight, before any fluid goes back.',
  charge: 'What went in, against the plate.',
  'write-up': 'Why it failed, so that the next one is quicker.',
};

export default function Home({ loaderData }: Route.ComponentProps) {
  return (
    <div className="mx-auto max-w-5xl space-y-16 py-6">
      <section className="max-w-3xl space-y-5">
        <h1 className="text-4xl font-semibold sm:text-5xl">Find the leak once. Keep how you found it.</h1>
        <p className="text-xl text-muted">
          Weepmark is where a plant or fleet shop keeps its leak cases: from the operator’s complaint to a
          circuit proved tight, refilled and written up, with the photos that show it. The next mechanic with
          the same complaint starts where you finished.
        </p>
        <ButtonLink to="/sign-in" variant="primary">
          Sign in to your shop
        </ButtonLink>
      </section>
      <section aria-labelledby="links-heading" className="space-y-5">
        <h2 id="links-heading" className="text-2xl font-semibold">
          A case is a chain of seven links
        </h2>
        <ol className="grid gap-x-8 gap-y-5 sm:grid-cols-2 lg:grid-cols-3">
          {LINK_KEYS.map((key) => (
            <li key={key} className="border-t border-line pt-3">
              <p className="font-semibold">{LINK_NAMES[key]}</p>
              <p className="text-muted">{SAID[key]}</p>
            </li>
          ))}
        </ol>
      </section>
      <section aria-labelledby="drawing-heading" className="space-y-5">
        <h2 id="drawing-heading" className="text-2xl font-semibold">
          Put your finger on it
        </h2>
        <CircuitDrawing names={loaderData.names} found={['condenser-joint']} />
      </section>
    </div>
  );
}
