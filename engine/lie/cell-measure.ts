import { Rational } from '../exact/rational';

/** The factor that makes the product of d(independent coordinate) the measure of unit cells of a lattice. */
export function cellMeasure(cocharacters: readonly (readonly Rational[])[], independent: readonly number[]): Rational {
  return Rational.one.div(determinant(cocharacters.map((x) => independent.map((i) => x[i] as Rational))).abs());
}

/** Determinant of a small rational matrix by elimination. */
function determinant(matrix: readonly (readonly Rational[])[]): Rational {
  const rows = matrix.map((row) => [...row]);
  let result = Rational.one;
  for (let k = 0; k < rows.length; k++) {
    const pivotRow = rows.findIndex((row, i) => i >= k && !(row[k] as Rational).isZero());
    if (pivotRow < 0) return Rational.zero;
    if (pivotRow !== k) {
      [rows[k], rows[pivotRow]] = [rows[pivotRow] as Rational[], rows[k] as Rational[]];
      result = result.neg();
    }
    const top = rows[k] as Rational[];
    const pivot = top[k] as Rational;
    result = result.mul(pivot);
    for (let i = k + 1; i < rows.length; i++) {
      const factor = ((rows[i] as Rational[])[k] as Rational).div(pivot);
      rows[i] = (rows[i] as Rational[]).map((entry, j) => entry.sub(factor.mul(top[j] as Rational)));
    }
  }
  return result;
}
