import { Link } from 'react-router';
import { Notice } from '#app/components/ui/notice.tsx';
import type { loadStock } from '../queries.server.ts';

type Props = Pick<
  Awaited<ReturnType<typeof loadStock>>,
  'whereabouts' | 'outOfBalanceGrams' | 'overdrawn' | 'outsideBook'
>;

/** Where everything is that ever came in, and what the book does not know of. */
export function BookBalance({ whereabouts, outOfBalanceGrams, overdrawn, outsideBook }: Props) {
  const balances = outOfBalanceGrams === 0 && overdrawn.length === 0;
  return (
    <div className="space-y-4">
      {balances ? (
        <Notice title="The book balances">
          <p>What is at all places together is what came from suppliers, and no cylinder is overdrawn.</p>
        </Notice>
      ) : (
        <Notice tone="danger" title="The book does not balance">
          <p>
            Out by {outOfBalanceGrams} g{overdrawn.length > 0 && `; overdrawn: ${overdrawn.join(', ')}`}.
          </p>
        </Notice>
      )}
      {outsideBook.count > 0 && (
        <Notice tone="warn" title="Not in the book">
          <p>
            {outsideBook.count === 1 ? 'One charge entry names' : `${outsideBook.count} charge entries name`}{' '}
            no cylinder of the book, on case{' '}
            {outsideBook.cases.map((number, place) => (
              <span key={number}>
                {place > 0 && ', '}
                <Link to={`/cases/${number}/charge`} className="link">
                  {number}
                </Link>
              </span>
            ))}
            . Choose the cylinder there, and the book follows.
          </p>
        </Notice>
      )}
      {whereabouts.length > 0 && (
        <div className="grid gap-4 lg:grid-cols-2">
          {whereabouts.map(({ refrigerant, places }) => (
            <section key={refrigerant} className="rounded-xl border border-line bg-surface p-4">
              <h2 className="mb-1 font-semibold">Where the {refrigerant} is</h2>
              <dl className="figures">
                {places
                  .filter(({ place, grams }) => grams !== 0 || place === 'supplier' || place === 'cylinder')
                  .map(({ place, name, grams }) => (
                    <div
                      key={place}
                      className={`flex justify-between gap-4 py-1 ${place === 'supplier' ? 'border-b border-line' : ''}`}
                    >
                      <dt>{name}</dt>
                      <dd>{grams.toLocaleString('en-GB')} g</dd>
                    </div>
                  ))}
              </dl>
            </section>
          ))}
        </div>
      )}
    </div>
  );
}
