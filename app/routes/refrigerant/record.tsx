import { ButtonLink } from '#app/components/ui/button.tsx';
import { PrintButton } from '#app/components/ui/print-button.tsx';
import { Day } from '#app/components/ui/time.tsx';
import { CircuitBalances } from '#app/features/refrigerant-book/components/circuit-balances.tsx';
import { DateFilter } from '#app/features/refrigerant-book/components/date-filter.tsx';
import { MovementTable } from '#app/features/refrigerant-book/components/movement-table.tsx';
import { listMovements, loadBookPage } from '#app/features/refrigerant-book/queries.server.ts';
import { parseBook } from '#app/features/refrigerant-book/schema.ts';
import { requireActor } from '#app/server/guards.server.ts';
import type { Route } from './+types/record.ts';

const MOST_PRINTED = 2000;

export const meta: Route.MetaFunction = () => [{ title: 'Refrigerant record · Weepmark' }];

export async function loader({ context, url }: Route.LoaderArgs) {
  const viewer = requireActor(context);
  const input = { ...parseBook(url.searchParams), page: 1 };
  const { circuits, cylinders, people } = await loadBookPage(viewer, input);
  return {
    input,
    circuits,
    cylinders,
    people,
    shopName: viewer.shopName,
    ...(await listMovements(viewer, input, MOST_PRINTED)),
  };
}

export default function Record({
  loaderData: { input, movements, total, circuits, cylinders, people, shopName },
}: Route.ComponentProps) {
  return (
    <article className="space-y-6">
      <p className="flex flex-wrap gap-2 print:hidden">
        <ButtonLink to="/refrigerant">Back to the book</ButtonLink>
        <PrintButton />
      </p>
      <header className="border-b-2 border-ink pb-3">
        <h1 className="text-2xl font-semibold">Refrigerant record, {shopName}</h1>
        <p>
          {input.from ? <Day value={input.from} /> : 'From the beginning'} to{' '}
          {input.to ? <Day value={input.to} /> : 'today'}
          {input.machine && `, machine ${input.machine}`}. {total} movements.
        </p>
      </header>
      <DateFilter input={input} people={people} />
      <MovementTable movements={movements} />
      <section>
        <h2 className="mb-2 text-lg font-semibold">In stock now</h2>
        <ul className="figures">
          {cylinders.map(({ id, label, refrigerant, grams }) => (
            <li key={id}>
              {label}: {grams.toLocaleString('en-GB')} g {refrigerant}
            </li>
          ))}
        </ul>
      </section>
      <section>
        <h2 className="mb-2 text-lg font-semibold">By circuit</h2>
        <CircuitBalances circuits={circuits} />
      </section>
      <p className="text-sm text-muted">
        Kept by the shop; local law says what an inspector needs beside it.
      </p>
    </article>
  );
}
