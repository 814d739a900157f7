import { Notice } from '#app/components/ui/notice.tsx';
import { Day } from '#app/components/ui/time.tsx';
import type { LeakEstimate } from '#app/domain/leak-rate/leak-history.ts';

/** Says that a circuit was filled up while nobody had mended it. */
export function ToppedUp({ toppedUp }: Pick<LeakEstimate, 'toppedUp'>) {
  if (toppedUp.length === 0) return null;
  return (
    <Notice tone="warn" title="Topped up without a repair">
      <p>Refrigerant went in while no repair was on record. It leaked then, and may still.</p>
      <ul className="list-disc pl-5">
        {toppedUp.map(({ grams, at }) => (
          <li key={at}>
            {grams.toLocaleString('en-GB')} g on <Day value={at} />
          </li>
        ))}
      </ul>
    </Notice>
  );
}
