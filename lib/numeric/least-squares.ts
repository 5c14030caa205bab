/** Solution of a linear least-squares problem. */
export interface LeastSquares {
  /** Coefficient of each column. */
  readonly coefficients: readonly number[];
  /** y − A·coefficients, a value per row. */
  readonly residuals: readonly number[];
  /** √(Σ residual²/(rows − columns)); NaN when there are as many columns as rows. */
  readonly residualStandardDeviation: number;
  /** Standard error of each coefficient; NaN when there are as many columns as rows. */
  readonly standardErrors: readonly number[];
  /** Covariances of the coefficients, s²·(AᵀA)⁻¹ row by row; NaN when there are as many columns as rows. */
  readonly covariance: readonly (readonly number[])[];
}

/** A column whose part that the others do not explain is below this part of itself depends on them. */
const dependence = 1e-12;

/**
 * The coefficients that bring Σ column_j·coefficient_j nearest to y (smallest Σ residual²), by Householder's QR
 * decomposition (G. H. Golub and C. F. Van Loan, Matrix Computations, 4th ed., §5.3.2) of the columns scaled to length 1,
 * so that units of the columns do not matter. Standard errors from s²·(RᵀR)⁻¹, for independent deviations of
 * equal size. `columns` holds one list per coefficient, each as long as `y`. Throws RangeError on differing lengths, fewer
 * rows than columns, values that are not finite, and columns that depend on one another.
 */
export function leastSquares(columns: readonly (readonly number[])[], y: readonly number[]): LeastSquares {
  const rows = y.length;
  const count = columns.length;
  requireProblem(columns, y);
  const scales = columns.map((column) => norm(column));
  const a = columns.map((column, j) => Float64Array.from(column, (value) => value / scales[j]!));
  const right = Float64Array.from(y);
  const diagonal = new Float64Array(count);
  for (let j = 0; j < count; j += 1) {
    const v = a[j]!;
    const length = norm(v.subarray(j));
    if (!(length > dependence))
      throw new RangeError(
        `Column ${j + 1} of the fit depends on the columns before it, so its coefficient is undetermined.`,
      );
    // The reflection that takes the rest of the column to the diagonal; of the two signs the one that does not cancel.
    diagonal[j] = v[j]! > 0 ? -length : length;
    v[j]! -= diagonal[j]!;
    for (let k = j + 1; k < count; k += 1) reflect(v, j, a[k]!);
    reflect(v, j, right);
  }
  const scaled = backSubstitute(a, diagonal, right);
  const coefficients = Array.from(scaled, (value, j) => value / scales[j]!);
  const residuals = y.map((value, i) =>
    columns.reduce((rest, column, j) => rest - column[i]! * coefficients[j]!, value),
  );
  const freedom = rows - count;
  const deviation = freedom > 0 ? norm(residuals) / Math.sqrt(freedom) : NaN;
  const errors = inverseRows(a, diagonal).map((row, j) =>
    row.map((value) => (deviation * value) / scales[j]!),
  );
  const covariance = errors.map((row) => errors.map((other) => product(row, other)));
  return {
    coefficients,
    residuals,
    residualStandardDeviation: deviation,
    standardErrors: errors.map((row) => norm(row)),
    covariance,
  };
}

function requireProblem(columns: readonly (readonly number[])[], y: readonly number[]): void {
  if (columns.length === 0) throw new RangeError("A fit needs at least one column.");
  if (y.length < columns.length)
    throw new RangeError(
      `${columns.length} coefficients need at least as many points; there are ${y.length}.`,
    );
  columns.forEach((column, j) => {
    if (column.length !== y.length)
      throw new RangeError(`Column ${j + 1} of the fit has ${column.length} values and y has ${y.length}.`);
    if (!column.every(Number.isFinite))
      throw new RangeError(`Column ${j + 1} of the fit holds a value that is not finite.`);
    if (column.every((value) => value === 0))
      throw new RangeError(
        `Column ${j + 1} of the fit is zero throughout, so its coefficient is undetermined.`,
      );
  });
  if (!y.every(Number.isFinite)) throw new RangeError("The values to be fitted must be finite.");
}

/** target − 2·v·(v·target)/(v·v), over the rows from `first` on. */
function reflect(v: Float64Array, first: number, target: Float64Array): void {
  let product = 0;
  let square = 0;
  for (let i = first; i < v.length; i += 1) {
    product += v[i]! * target[i]!;
    square += v[i]! * v[i]!;
  }
  const factor = (2 * product) / square;
  for (let i = first; i < v.length; i += 1) target[i]! -= factor * v[i]!;
}

/** R·x = right, where R has the diagonal given and above it the entries of a (column by column). */
function backSubstitute(
  a: readonly Float64Array[],
  diagonal: Float64Array,
  right: Float64Array,
): Float64Array {
  const x = new Float64Array(diagonal.length);
  for (let i = diagonal.length - 1; i >= 0; i -= 1) {
    let rest = right[i]!;
    for (let j = i + 1; j < diagonal.length; j += 1) rest -= a[j]![i]! * x[j]!;
    x[i] = rest / diagonal[i]!;
  }
  return x;
}

/** Rows of R⁻¹, whose products with one another make (RᵀR)⁻¹. */
function inverseRows(a: readonly Float64Array[], diagonal: Float64Array): Float64Array[] {
  const columns = a.map((_, j) => {
    const unit = new Float64Array(diagonal.length);
    unit[j] = 1;
    return backSubstitute(a, diagonal, unit);
  });
  return columns.map((_, i) => Float64Array.from(columns, (column) => column[i]!));
}

const product = (a: Float64Array, b: Float64Array): number =>
  a.reduce((sum, value, i) => sum + value * b[i]!, 0);

/** Euclidean length, scaled by the largest value so that no square leaves the range of doubles. */
function norm(values: ArrayLike<number>): number {
  let largest = 0;
  for (let i = 0; i < values.length; i += 1) largest = Math.max(largest, Math.abs(values[i]!));
  if (largest === 0) return 0;
  let sum = 0;
  for (let i = 0; i < values.length; i += 1) sum += (values[i]! / largest) ** 2;
  return largest * Math.sqrt(sum);
}
