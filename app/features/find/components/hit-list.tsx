import { Link } from 'react-router';
import { CaseStateBadge } from '#app/components/ui/badge.tsx';
import { Day } from '#app/components/ui/time.tsx';
import type { MarkedPart } from '#app/domain/search/marks.ts';
import type { Hit } from '../hits.server.ts';

export function Marked({ parts }: { parts: readonly MarkedPart[] }) {
  let place = 0;
  return parts.map(({ text, marked }) => {
    const key = place;
    place += text.length;
    return marked ? <mark key={key}>{text}</mark> : <span key={key}>{text}</span>;
  });
}

/** The found cases, each with its photo, the cause in one line, the passage that matched and why. */
export function HitList({ hits }: { hits: readonly Hit[] }) {
  return (
    <ol className="divide-y divide-line border-y border-line">
      {hits.map((hit) => (
        <li key={hit.number} className="flex gap-4 py-5">
          <div className="min-w-0 flex-1">
            <h3 className="text-lg font-semibold break-words">
              <Link to={`/cases/${hit.number}`} className="link">
                {hit.title}
              </Link>
            </h3>
            <p className="text-muted">
              Case {hit.number}
              {hit.externalId && ` (${hit.externalId})`} · {hit.machineNumber} {hit.machineModel} ·{' '}
              {hit.mediumName} · <Day value={hit.openedAt} />
            </p>
            {hit.because && (
              <p className="mt-1 font-semibold break-words">
                <span className="text-evidence" aria-hidden>
                  ●{' '}
                </span>
                {hit.because}
              </p>
            )}
            <p className="mt-1 max-w-prose break-words">
              <Marked parts={hit.passage} />
            </p>
            <p className="mt-1 flex flex-wrap items-center gap-x-3 gap-y-1 text-sm text-muted">
              <CaseStateBadge state={hit.state} />
              {hit.why.length > 0 && <span>{hit.why.join('; ')}</span>}
              {hit.note && (
                <Link to={`/write-ups/${hit.note.slug}`} className="link">
                  Note: {hit.note.title}
                </Link>
              )}
            </p>
          </div>
          {hit.photo && (
            <Link to={`/cases/${hit.number}/trace`} tabIndex={-1} aria-hidden className="shrink-0">
              <img
                src={hit.photo.src}
                alt=""
                width={112}
                height={84}
                loading="lazy"
                className="h-21 w-28 rounded-lg border border-line object-cover max-sm:h-15 max-sm:w-20"
              />
            </Link>
          )}
        </li>
      ))}
    </ol>
  );
}
