import { ChevronLeft, ChevronRight } from 'lucide-react';
import { Link, useSearchParams } from 'react-router';

/** Links to the pages before and after; the other parts of the address stay. */
export function Pagination({ page, pageCount, noun }: { page: number; pageCount: number; noun: string }) {
  const [params] = useSearchParams();
  if (pageCount <= 1) return null;
  const to = (target: number) => {
    const next = new URLSearchParams(params);
    next.set('page', String(target));
    return `?${next}`;
  };
  const look =
    'tap inline-flex items-center gap-1 rounded-lg border border-edge px-3 font-semibold hover:border-action';
  return (
    <nav
      aria-label={`Pages of ${noun}`}
      className="mt-6 flex items-center justify-between gap-3 print:hidden"
    >
      {page > 1 ? (
        <Link to={to(page - 1)} className={look} rel="prev">
          <ChevronLeft className="size-5" aria-hidden />
          Before
        </Link>
      ) : (
        <span />
      )}
      <span className="figures text-muted">
        Page {page} of {pageCount}
      </span>
      {page < pageCount ? (
        <Link to={to(page + 1)} className={look} rel="next">
          Next
          <ChevronRight className="size-5" aria-hidden />
        </Link>
      ) : (
        <span />
      )}
    </nav>
  );
}
