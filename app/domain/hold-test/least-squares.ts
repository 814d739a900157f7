export type Fit = { coefficients: number[]; errors: number[]; rss: number };

/**
 * Ordinary least squares of `y` on the columns of `rows` by the normal equations, with the standard error of each
 * coefficient. Null when the columns do not tell the coefficients apart.
 */
export function leastSquares(rows: readonly number[][], y: readonly number[]): Fit | null {
  const size = rows[0]?.length ?? 0;
  const normal = Array.from({ length: size }, (_row, i) =>
    Array.from({ length: size }, (_cell, j) =>
      rows.reduce((sum, row) => sum + (row[i] as number) * (row[j] as number), 0),
    ),
  );
  const inverse = invert(normal);
  if (!inverse) return null;
  const moments = Array.from({ length: size }, (_row, i) =>
    rows.reduce((sum, row, place) => sum + (row[i] as number) * (y[place] as number), 0),
  );
  const coefficients = inverse.map((row) =>
    row.reduce((sum, cell, j) => sum + cell * (moments[j] as number), 0),
  );
  const rss = rows.reduce((sum, row, place) => {
    const fitted = row.reduce((total, cell, j) => total + cell * (coefficients[j] as number), 0);
    return sum + ((y[place] as number) - fitted) ** 2;
  }, 0);
  const variance = rss / Math.max(rows.length - size, 1);
  const errors = inverse.map((row, i) => Math.sqrt(Math.max(variance * (row[i] as number), 0)));
  return { coefficients, errors, rss };
}

/** Gauss–Jordan with pivoting. */
function invert(matrix: readonly number[][]): number[][] | null {
  const size = matrix.length;
  const work = matrix.map((row, i) => [...row, ...row.map((_cell, j) => (i === j ? 1 : 0))]);
  for (let column = 0; column < size; column += 1) {
    let pivot = column;
    for (let row = column + 1; row < size; row += 1) {
      if (Math.abs(work[row]?.[column] ?? 0) > Math.abs(work[pivot]?.[column] ?? 0)) pivot = row;
    }
    const pivotRow = work[pivot];
    const head = pivotRow?.[column] ?? 0;
    if (!pivotRow || Math.abs(head) < 1e-12) return null;
    work[pivot] = work[column] as number[];
    work[column] = pivotRow.map((cell) => cell / head);
    for (let row = 0; row < size; row += 1) {
      if (row === column) continue;
      const factor = work[row]?.[column] ?? 0;
      work[row] = (work[row] as number[]).map((cell, j) => cell - factor * (work[column]?.[j] ?? 0));
    }
  }
  return work.map((row) => row.slice(size));
}
