import type { ReactNode } from 'react';

/** The page of one link: what it still lacks, then its parts. */
export function LinkFrame({ lacks, children }: { lacks: string[]; children: ReactNode }) {
  return (
    <div className="space-y-8">
      {lacks.length > 0 && (
        <p className="text-muted">
          <span className="font-semibold text-ink">Still lacks</span> {lacks.join(', ')}.
        </p>
      )}
      {children}
    </div>
  );
}
