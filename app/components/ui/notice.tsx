import { CircleAlert, Info, TriangleAlert } from 'lucide-react';
import type { ReactNode } from 'react';
import type { Caution } from '#app/domain/vocabulary/vocabulary.ts';

type Tone = 'info' | 'warn' | 'danger';
const LOOK: Record<Tone, string> = {
  info: 'border-action bg-action-soft',
  warn: 'border-warn bg-warn-soft',
  danger: 'border-danger bg-danger-soft',
};
const ICONS = { info: Info, warn: TriangleAlert, danger: CircleAlert } as const;

type Props = { tone?: Tone; title?: string; alert?: boolean; children?: ReactNode };

export function Notice({ tone = 'info', title, alert, children }: Props) {
  const Icon = ICONS[tone];
  return (
    <div
      role={alert ? 'alert' : undefined}
      className={`flex gap-3 rounded-r-lg border-l-4 px-4 py-3 ${LOOK[tone]}`}
    >
      <Icon className="mt-0.5 size-5 shrink-0" aria-hidden />
      <div className="min-w-0 space-y-1 break-words">
        {title && <p className="font-semibold">{title}</p>}
        {children}
      </div>
    </div>
  );
}

/** The usual cautions, before the step that they guard. */
export function Cautions({ cautions, open = false }: { cautions: readonly Caution[]; open?: boolean }) {
  if (cautions.length === 0) return null;
  return (
    <details open={open} className="rounded-r-lg border-l-4 border-warn bg-warn-soft print:hidden">
      <summary className="tap flex items-center gap-3 px-4 py-2 font-semibold">
        <TriangleAlert className="size-5 shrink-0" aria-hidden />
        <span>Before you start: {cautions.map(({ title }) => title.toLowerCase()).join(' · ')}</span>
      </summary>
      <ul className="space-y-3 px-4 pt-1 pb-4">
        {cautions.map(({ id, title, text }) => (
          <li key={id}>
            <strong className="font-semibold">{title}.</strong> {text}
          </li>
        ))}
        <li className="text-sm">
          Common practice, not a substitute: local codes, the maker’s manual and licensed people come first.
        </li>
      </ul>
    </details>
  );
}
