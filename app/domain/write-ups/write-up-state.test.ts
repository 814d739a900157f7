import { expect, test } from 'vitest';
import { nextWriteUpState, WRITE_UP_STATES, type WriteUpMove } from './write-up-state.ts';

/** From draft, in review, sent back, published, withdrawn. */
const AFTER: Record<WriteUpMove, (string | null)[]> = {
  submit: ['in-review', null, 'in-review', null, null],
  'send-back': [null, 'sent-back', null, null, null],
  publish: ['published', 'published', 'published', 'published', 'published'],
  withdraw: [null, null, null, 'withdrawn', null],
};

test.each(Object.entries(AFTER))('%s', (move, after) => {
  expect(WRITE_UP_STATES.map((state) => nextWriteUpState(state, move as WriteUpMove))).toEqual(after);
});
