import type { loadCircuitBalances } from '../queries.server.ts';

type Props = { circuits: Awaited<ReturnType<typeof loadCircuitBalances>> };

const grams = (value: number) => `${value.toLocaleString('en-GB')} g`;

/** What went into each circuit and came out of it; what is beyond the plate has leaked. */
export function CircuitBalances({ circuits }: Props) {
  return (
    <ul className="figures divide-y divide-line">
      {circuits.map(({ number, circuit, charged, recovered, plateGrams, leakedGrams }) => (
        <li key={`${number} ${circuit}`} className="flex flex-wrap justify-between gap-x-6 py-2">
          <span className="font-semibold">
            {number} <span className="font-normal text-muted">{circuit}</span>
          </span>
          <span>
            {grams(charged)} in, {grams(recovered)} out,{' '}
            {plateGrams === null ? 'plate unknown' : `plate ${grams(plateGrams)}`}
            {leakedGrams !== null && leakedGrams > 0 && (
              <strong>, {grams(leakedGrams)} leaked for certain</strong>
            )}
          </span>
        </li>
      ))}
    </ul>
  );
}
