import type { ReactNode } from 'react';
import { CASE_STATE_NAMES, type CaseState } from '#app/domain/chain/chain.ts';

export type Tone = 'plain' | 'action' | 'evidence' | 'warn' | 'danger';

const LOOK: Record<Tone, string> = {
  plain: 'bg-raised text-ink',
  action: 'bg-action-soft text-action-deep',
  evidence: 'bg-evidence-soft text-evidence',
  warn: 'bg-warn-soft text-warn',
  danger: 'bg-danger-soft text-danger',
};

export function Badge({
  tone = 'plain',
  icon,
  children,
}: {
  tone?: Tone;
  icon?: ReactNode;
  children: ReactNode;
}) {
  return (
    <span
      className={`inline-flex items-center gap-1.5 rounded-full px-2.5 py-0.5 text-sm font-semibold whitespace-nowrap ${LOOK[tone]}`}
    >
      {icon}
      {children}
    </span>
  );
}

/** One shape for each state, so that no state is told by colour alone. */
const SHAPES: Record<CaseState, string> = {
  open: 'M6 1.5a4.5 4.5 0 1 0 0 9a4.5 4.5 0 1 0 0-9Z',
  'leak-found': 'M6 1C8 4 10 5.5 10 7.6a4 4 0 0 1-8 0C2 5.5 4 4 6 1Z',
  repaired: 'M1.5 6h9M6 1.5v9',
  'proved-tight': 'M1.5 6.5 4.7 9.7 10.5 2.5',
  running: 'M3 1.5v9L10.5 6Z',
  'written-up': 'M2 2h8M2 6h8M2 10h5',
  parked: 'M3.5 2v8M8.5 2v8',
  'closed-unsolved': 'M2 2l8 8M10 2l-8 8',
};

const TONES: Record<CaseState, Tone> = {
  open: 'plain',
  'leak-found': 'evidence',
  repaired: 'action',
  'proved-tight': 'action',
  running: 'action',
  'written-up': 'plain',
  parked: 'warn',
  'closed-unsolved': 'danger',
};

export function CaseStateBadge({ state }: { state: CaseState }) {
  return (
    <Badge
      tone={TONES[state]}
      icon={
        <svg
          viewBox="0 0 12 12"
          className="size-3"
          fill="none"
          stroke="currentColor"
          strokeWidth="1.8"
          aria-hidden="true"
        >
          <path d={SHAPES[state]} />
        </svg>
      }
    >
      {CASE_STATE_NAMES[state]}
    </Badge>
  );
}
