import type { ReactNode } from 'react';
import { LINK_NAMES, type LinkKey } from '#app/domain/chain/chain.ts';

/** The page of one link: what it still lacks, then its parts. */
export function LinkFrame({
  link,
  lacks,
  children,
}: {
  link: LinkKey;
  lacks: string[];
  children: ReactNode;
}) {
  return (
    <section aria-label={LINK_NAMES[link]} className="space-y-8">
      {lacks.length > 0 && (
        <p className="text-muted">
          <span className="font-semibold text-ink">Still lacks</span> {lacks.join(', ')}.
        </p>
      )}
      {children}
    </section>
  );
}
