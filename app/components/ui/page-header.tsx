import type { ReactNode } from 'react';

type Props = { title: string; eyebrow?: ReactNode; lead?: ReactNode; actions?: ReactNode };

export function PageHeader({ title, eyebrow, lead, actions }: Props) {
  return (
    <header className="mb-6 flex flex-wrap items-end justify-between gap-4">
      <div className="min-w-0">
        {eyebrow && <div className="eyebrow mb-1">{eyebrow}</div>}
        <h1 className="text-2xl font-semibold break-words sm:text-3xl">{title}</h1>
        {lead && <p className="mt-2 max-w-prose text-muted">{lead}</p>}
      </div>
      {actions && <div className="flex flex-wrap gap-2">{actions}</div>}
    </header>
  );
}
