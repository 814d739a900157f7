import { type ReactNode, useId } from 'react';

type Props = { title?: string; lead?: ReactNode; actions?: ReactNode; id?: string; children: ReactNode };

/** A part of a page under a hairline, with its heading. */
export function Panel({ title, lead, actions, id, children }: Props) {
  const heading = useId();
  return (
    <section
      id={id}
      aria-labelledby={title ? heading : undefined}
      className="scroll-mt-24 border-t border-line pt-5"
    >
      {title && (
        <div className="mb-4 flex flex-wrap items-baseline justify-between gap-3">
          <div>
            <h2 id={heading} className="text-lg font-semibold">
              {title}
            </h2>
            {lead && <p className="mt-1 max-w-prose text-muted">{lead}</p>}
          </div>
          {actions}
        </div>
      )}
      {children}
    </section>
  );
}

export type Fact = { label: string; value: ReactNode };

/** Label and value pairs; empty values are left out. */
export function Facts({ facts, columns = 2 }: { facts: Fact[]; columns?: 1 | 2 | 3 }) {
  const shown = facts.filter(({ value }) => value !== null && value !== undefined && value !== '');
  if (shown.length === 0) return null;
  const grid = columns === 1 ? '' : columns === 2 ? 'sm:grid-cols-2' : 'grid-cols-2 sm:grid-cols-3';
  return (
    <dl className={`grid gap-x-8 gap-y-3 ${grid}`}>
      {shown.map(({ label, value }) => (
        <div key={label}>
          <dt className="text-sm text-muted">{label}</dt>
          <dd className="figures break-words whitespace-pre-line">{value}</dd>
        </div>
      ))}
    </dl>
  );
}
