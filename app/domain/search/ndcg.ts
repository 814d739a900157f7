/**
 * Normalised discounted cumulative gain at `depth`, with gain 2^grade − 1 and discount log2(rank + 1)
 * (Järvelin and Kekäläinen 2002; this form in Burges et al. 2005). `ranked` are the grades in the order shown,
 * `all` every grade that exists. Answers 0 when nothing is relevant.
 */
export function ndcg(ranked: readonly number[], all: readonly number[], depth: number): number {
  const ideal = gain(
    [...all].sort((x, y) => y - x),
    depth,
  );
  return ideal === 0 ? 0 : gain(ranked, depth) / ideal;
}

function gain(grades: readonly number[], depth: number): number {
  return grades
    .slice(0, depth)
    .reduce((sum, grade, place) => sum + (2 ** grade - 1) / Math.log2(place + 2), 0);
}
