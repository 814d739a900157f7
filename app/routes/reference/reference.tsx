import { Link } from 'react-router';
import { CircuitDrawing } from '#app/components/drawing/circuit-drawing.tsx';
import { PageHeader } from '#app/components/ui/page-header.tsx';
import { Panel } from '#app/components/ui/panel.tsx';
import { entriesFor, methodFacts, partNames } from '#app/domain/vocabulary/vocabulary.ts';
import { shopVocabulary } from '#app/features/catalogue/queries.server.ts';
import { requireActor } from '#app/server/guards.server.ts';
import type { Route } from './+types/reference.ts';

export const meta: Route.MetaFunction = () => [{ title: 'Reference · Weepmark' }];

export async function loader({ context }: Route.LoaderArgs) {
  const vocabulary = await shopVocabulary(requireActor(context).shopId);
  return {
    names: partNames(vocabulary, 'refrigerant'),
    methods: entriesFor(vocabulary, 'method').map(({ id, name }) => ({
      id,
      name,
      facts: methodFacts(id) ?? null,
    })),
  };
}

/** How a circuit works, in the order in which the refrigerant runs. Common practice, no source. */
const HOW_IT_WORKS = [
  {
    at: 'Compressor',
    text: 'It draws cold vapour from the low side and presses it into the high side, hot. Liquid would break it.',
  },
  {
    at: 'Condenser',
    text: 'Air takes the heat away; the hot vapour turns to warm liquid. Dirt or a dead fan shows as high pressure.',
  },
  {
    at: 'Drier, or accumulator',
    text: 'With an expansion valve, a drier on the high side holds back water and keeps liquid in reserve. With a fixed orifice, an accumulator on the low side keeps liquid from the compressor.',
  },
  {
    at: 'Expansion valve or orifice',
    text: 'Liquid is let through a narrow place into low pressure and turns very cold. Here the two sides part.',
  },
  {
    at: 'Evaporator',
    text: 'The cold liquid boils and takes heat from the cab’s air, and water out of it. Back to the compressor as vapour.',
  },
  {
    at: 'A second branch',
    text: 'A tee, a shut-off solenoid and a second evaporator or chiller: each can leak on its own, so test it on its own.',
  },
] as const;

const PLACES = [
  { to: 'pressures', title: 'Pressures', text: 'Saturation of eleven refrigerants, as a plot and a table.' },
  {
    to: 'hold-test',
    title: 'Hold test',
    text: 'Tight, moisture or leak, and what the test could have seen.',
  },
  { to: 'charge', title: 'Charge', text: 'Running pressures against the air outside.' },
  { to: 'leak-rate', title: 'Leak rate', text: 'From what had to be added.' },
  { to: 'vacuum', title: 'Vacuum and altitude', text: 'How deep a gauge can go here, and when water boils.' },
  {
    to: 'cautions',
    title: 'Cautions',
    text: 'What hurts people in this work, and how not to be one of them.',
  },
  { to: 'glossary', title: 'Glossary', text: 'The words of the trade, and which of them mean the same.' },
] as const;

export default function Reference({ loaderData: { names, methods } }: Route.ComponentProps) {
  return (
    <div className="space-y-8">
      <PageHeader title="Reference" lead="What to have at hand beside the machine." />
      <ul className="grid gap-3 sm:grid-cols-2 lg:grid-cols-3">
        {PLACES.map(({ to, title, text }) => (
          <li key={to}>
            <Link
              to={to}
              className="block h-full rounded-xl border border-line bg-surface p-4 hover:border-action"
            >
              <span className="block text-lg font-semibold">{title}</span>
              <span className="text-muted">{text}</span>
            </Link>
          </li>
        ))}
      </ul>
      <Panel
        title="Methods"
        lead="What each can and cannot find. Rules of thumb, marked for what they rest on; not standards."
      >
        <ul className="grid gap-x-8 gap-y-6 sm:grid-cols-2">
          {methods.map(({ id, name, facts }) => (
            <li key={id}>
              <h3 className="font-semibold">{name}</h3>
              {facts && (
                <>
                  <p>Finds: {facts.canFind}.</p>
                  <p>Misses: {facts.cannotFind}.</p>
                  <p className="text-sm text-muted">
                    {facts.sensitivity} ({facts.basis}).
                  </p>
                </>
              )}
            </li>
          ))}
        </ul>
      </Panel>
      <Panel
        title="A refrigerant circuit"
        lead="The common arrangement (common practice, no source). Yours may differ: the maker’s drawing comes first."
      >
        <ol className="mb-5 max-w-prose list-decimal space-y-2 pl-6">
          {HOW_IT_WORKS.map(({ at, text }) => (
            <li key={at}>
              <span className="font-semibold">{at}.</span> {text}
            </li>
          ))}
        </ol>
        <CircuitDrawing names={names} />
      </Panel>
    </div>
  );
}
