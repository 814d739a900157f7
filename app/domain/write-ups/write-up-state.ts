export const WRITE_UP_STATES = ['draft', 'in-review', 'sent-back', 'published', 'withdrawn'] as const;
export type WriteUpState = (typeof WRITE_UP_STATES)[number];

export const WRITE_UP_STATE_NAMES: Record<WriteUpState, string> = {
  draft: 'Draft',
  'in-review': 'In review',
  'sent-back': 'Sent back',
  published: 'Published',
  withdrawn: 'Withdrawn',
};

export type WriteUpMove = 'submit' | 'send-back' | 'publish' | 'withdraw';

const MOVES: Record<WriteUpMove, { from: readonly WriteUpState[]; to: WriteUpState }> = {
  submit: { from: ['draft', 'sent-back'], to: 'in-review' },
  'send-back': { from: ['in-review'], to: 'sent-back' },
  publish: { from: ['draft', 'in-review', 'sent-back', 'published', 'withdrawn'], to: 'published' },
  withdraw: { from: ['published'], to: 'withdrawn' },
};

/** The state after a move, or null when the move does not start from this state. Publishing again makes a revision. */
export function nextWriteUpState(state: WriteUpState, move: WriteUpMove): WriteUpState | null {
  return MOVES[move].from.includes(state) ? MOVES[move].to : null;
}
