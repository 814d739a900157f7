import { Check, X } from 'lucide-react';
import { Link, useFetcher } from 'react-router';
import { Badge } from '#app/components/ui/badge.tsx';
import type { AlikeHit } from '../alike.server.ts';

type Props = { hits: readonly AlikeHit[]; caseNumber?: number; mayJudge?: boolean; newTab?: boolean };

/** Alike cases, each with its reasons; on a case they can be confirmed or dismissed. */
export function AlikeList({ hits, caseNumber, mayJudge = false, newTab = false }: Props) {
  return (
    <ul className="divide-y divide-line">
      {hits.map((hit) => (
        <li key={hit.number} className="py-3">
          <div className="flex gap-3">
            <div className="min-w-0 flex-1">
              <Link
                to={`/cases/${hit.number}`}
                className="link font-semibold break-words"
                target={newTab ? '_blank' : undefined}
              >
                {hit.number} {hit.title}
              </Link>
              {hit.because && <p className="break-words">{hit.because}</p>}
              <p className="text-sm text-muted break-words">
                {hit.machineNumber} {hit.machineModel}
                {hit.reasons.length > 0 && `: ${hit.reasons.join('; ')}`}
              </p>
            </div>
            {hit.photo && (
              <img
                src={hit.photo.src}
                alt=""
                width={80}
                height={60}
                loading="lazy"
                className="h-15 w-20 shrink-0 rounded-lg border border-line object-cover"
              />
            )}
          </div>
          {caseNumber !== undefined && <Judgement hit={hit} caseNumber={caseNumber} mayJudge={mayJudge} />}
        </li>
      ))}
    </ul>
  );
}

function Judgement({ hit, caseNumber, mayJudge }: { hit: AlikeHit; caseNumber: number; mayJudge: boolean }) {
  const fetcher = useFetcher();
  const sent = fetcher.formData?.get('verdict');
  const verdict =
    sent === undefined || sent === null ? hit.verdict : sent === '' ? null : (sent as AlikeHit['verdict']);
  const look =
    'tap inline-flex items-center gap-1 rounded-lg border border-edge px-3 text-sm font-semibold hover:border-action';
  return (
    <div className="mt-2 flex flex-wrap items-center gap-2 print:hidden">
      {verdict === 'confirmed' && <Badge tone="action">Confirmed alike</Badge>}
      {verdict === 'dismissed' && <Badge>Not alike</Badge>}
      {mayJudge && (
        <fetcher.Form method="post" action={`/cases/${caseNumber}?index`} className="flex flex-wrap gap-2">
          <input type="hidden" name="intent" value="judge" />
          <input type="hidden" name="other" value={hit.number} />
          {verdict === null ? (
            <>
              <button type="submit" name="verdict" value="confirmed" className={look}>
                <Check className="size-4" aria-hidden />
                Alike
              </button>
              <button type="submit" name="verdict" value="dismissed" className={look}>
                <X className="size-4" aria-hidden />
                Not alike
              </button>
            </>
          ) : (
            <button type="submit" name="verdict" value="" className={look}>
              Take back
            </button>
          )}
        </fetcher.Form>
      )}
    </div>
  );
}
