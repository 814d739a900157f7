import { Link } from 'react-router';
import { DataTable } from '#app/components/table/data-table.tsx';
import { DateTime } from '#app/components/ui/time.tsx';
import type { MovementView } from '../queries.server.ts';

/** The ledger; reversals and what they reverse name each other. */
export function MovementTable({
  movements,
  mayReverse = false,
}: {
  movements: readonly MovementView[];
  mayReverse?: boolean;
}) {
  return (
    <DataTable
      caption="Movements of refrigerant"
      rows={[...movements]}
      rowKey={({ id }) => id}
      columns={[
        {
          key: 'at',
          label: 'When',
          cell: ({ id, at }) => (
            <span>
              {id}, <DateTime value={at} />
            </span>
          ),
        },
        {
          key: 'kind',
          label: 'What',
          cell: ({ kindName, reverses, reversed, note }) => (
            <span>
              {reverses !== null ? `Reversal of ${reverses}` : kindName}
              {reversed && ' (reversed)'}
              {note && <span className="block text-sm text-muted">{note}</span>}
            </span>
          ),
        },
        {
          key: 'grams',
          label: 'Grams',
          numeric: true,
          cell: ({ grams, reverses, weighedGrams }) => (
            <span>
              {reverses !== null && '−'}
              {grams.toLocaleString('en-GB')}
              {weighedGrams !== null && (
                <span className="block text-sm text-muted">scale {weighedGrams.toLocaleString('en-GB')}</span>
              )}
            </span>
          ),
        },
        {
          key: 'refrigerant',
          label: 'Refrigerant',
          cell: ({ refrigerant, cylinderLabel }) => `${refrigerant}, ${cylinderLabel}`,
        },
        {
          key: 'machine',
          label: 'Machine, circuit, case',
          cell: ({ machineNumber, circuitName, caseNumber }) => (
            <span>
              {machineNumber} {circuitName && <span className="text-muted">{circuitName}</span>}{' '}
              {caseNumber !== null && (
                <Link to={`/cases/${caseNumber}`} className="link">
                  {caseNumber}
                </Link>
              )}
            </span>
          ),
        },
        {
          key: 'by',
          label: 'By',
          cell: ({ byName, certificate }) => [byName, certificate].filter(Boolean).join(', '),
        },
        ...(mayReverse
          ? [
              {
                key: 'reverse',
                label: 'Wrong?',
                cell: ({ id, reverses, reversed }: MovementView) =>
                  reverses === null && !reversed ? (
                    <Link
                      to={`?reverse=${id}#reverse`}
                      className="link inline-flex min-h-11 items-center print:hidden"
                      aria-label={`Reverse movement ${id}`}
                    >
                      Reverse
                    </Link>
                  ) : (
                    ''
                  ),
              },
            ]
          : []),
      ]}
    />
  );
}
