import { PageHeader } from '#app/components/ui/page-header.tsx';
import { CAUTIONS } from '#app/domain/vocabulary/vocabulary.ts';
import type { Route } from './+types/cautions.ts';

export const meta: Route.MetaFunction = () => [{ title: 'Cautions · Weepmark' }];

export default function CautionsPage() {
  return (
    <>
      <PageHeader
        title="Cautions"
        lead="The usual words of the trade. Local codes, the maker’s manual and people with the right licence come before anything here."
      />
      <ul className="max-w-3xl space-y-5">
        {CAUTIONS.map(({ id, title, text }) => (
          <li key={id} id={id} className="border-l-4 border-warn pl-4">
            <h2 className="text-lg font-semibold">{title}</h2>
            <p>{text}</p>
          </li>
        ))}
      </ul>
    </>
  );
}
