import { describe, expect, test } from 'vitest';
import { ndcg } from './ndcg.ts';

const log2 = Math.log2;

describe('nDCG', () => {
  /**
   * The formula of Burges et al. 2005 (gain 2^grade − 1, discount log2(1 + rank)), worked by hand for the grades
   * 3, 2, 3, 0, 1, 2 that encyclopedic articles on the measure use: DCG = 7 + 3/log2(3) + 7/2 + 0 + 1/log2(6) + 3/log2(7).
   */
  test('the usual example', () => {
    const dcg = 7 + 3 / log2(3) + 7 / 2 + 1 / log2(6) + 3 / log2(7);
    const ideal = 7 + 7 / log2(3) + 3 / 2 + 3 / log2(5) + 1 / log2(6);
    expect(dcg).toBeCloseTo(13.848, 3);
    expect(ndcg([3, 2, 3, 0, 1, 2], [3, 2, 3, 0, 1, 2], 6)).toBeCloseTo(dcg / ideal, 12);
    expect(dcg / ideal).toBeCloseTo(0.949, 3);
  });

  test('the best order is 1, no relevant document is 0', () => {
    expect(ndcg([3, 2, 1, 0], [0, 1, 2, 3], 10)).toBe(1);
    expect(ndcg([0, 0], [], 10)).toBe(0);
    expect(ndcg([0, 0], [2], 10)).toBe(0);
  });

  test('what stands below the depth does not count', () => {
    expect(ndcg([0, 3], [3], 1)).toBe(0);
  });
});
