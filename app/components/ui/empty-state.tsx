import type { ReactNode } from 'react';

/** What an empty place says: what is not here yet and what to do next. */
export function EmptyState({
  title,
  children,
  action,
}: {
  title: string;
  children?: ReactNode;
  action?: ReactNode;
}) {
  return (
    <div className="rounded-xl border border-dashed border-edge px-5 py-8 text-center">
      <p className="font-semibold">{title}</p>
      {children && <div className="mx-auto mt-1 max-w-prose text-muted">{children}</div>}
      {action && <div className="mt-4">{action}</div>}
    </div>
  );
}
