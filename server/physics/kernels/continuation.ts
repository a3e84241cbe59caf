import { solveInPlace } from './linear-solve';

/** Equations R(x, λ) = 0 with one parameter; the derivatives are asked at the point of the last residual. */
export interface ParametricSystem {
  size: number;
  residualInto(x: Float64Array, parameter: number, out: Float64Array): void;
  jacobianInto(out: Float64Array): void;
  parameterSlopeInto(out: Float64Array): void;
}

export interface ContinuationOptions {
  /** Sizes that count as one unit of arc length in x and in the parameter. */
  scale: number;
  parameterScale: number;
  /** Residual that counts as one. */
  residualScale: number;
  /** First step, and the largest one, in units of arc length. */
  firstStep: number;
  largestStep: number;
  most: number;
  /** +1 to begin towards larger parameters, −1 towards smaller. */
  direction: 1 | -1;
}

/**
 * Follows a solution curve through folds by pseudo-arc-length with tangent prediction.
 *
 * @param visit called with each solution on the curve in turn, the start first; returns false to stop.
 * @returns the number of points and why it ended.
 * @throws RangeError where the start has the wrong length.
 * Source: Keller (1977); Allgower & Georg, Introduction to Numerical Continuation Methods (2003), ch. 6.
 */
export function followCurve(
  system: ParametricSystem,
  start: Float64Array,
  parameter: number,
  options: ContinuationOptions,
  visit: (x: Float64Array, parameter: number) => boolean,
): { points: number; ended: 'stopped' | 'step too small' | 'too many points' | 'no start' } {
  const n = system.size;
  if (start.length !== n) throw new RangeError(`start must hold ${n} values, got ${start.length}`);
  const { scale, parameterScale, residualScale } = options;
  const m = n + 1;
  const matrix = new Float64Array(m * m);
  const jacobian = new Float64Array(n * n);
  const residual = new Float64Array(n);
  const slope = new Float64Array(n);
  const right = new Float64Array(m);
  let x = Float64Array.from(start);
  let trial = new Float64Array(n);
  let lambda = parameter;
  let tangent = new Float64Array(m);
  tangent[n] = options.direction;
  let nextTangent = new Float64Array(m);

  const fillMatrix = (row: Float64Array): void => {
    system.jacobianInto(jacobian);
    system.parameterSlopeInto(slope);
    for (let r = 0; r < n; r++) {
      for (let c = 0; c < n; c++) matrix[r * m + c] = (jacobian[r * n + c]! * scale) / residualScale;
      matrix[r * m + n] = (slope[r]! * parameterScale) / residualScale;
    }
    for (let c = 0; c < m; c++) matrix[n * m + c] = row[c]!;
  };
  /** Newton back to the curve within the plane normal to the tangent; the tangent at the result follows. */
  const correct = (at: Float64Array, from: number): { lambda: number; iterations: number } | null => {
    let value = from;
    for (let iteration = 0; iteration < 8; iteration++) {
      system.residualInto(at, value, residual);
      let error = 0;
      for (let r = 0; r < n; r++) error = Math.max(error, Math.abs(residual[r]!) / residualScale);
      if (!Number.isFinite(error)) return null;
      fillMatrix(tangent);
      if (error < 1e-9) {
        right.fill(0);
        right[n] = 1;
        if (solveInPlace(matrix, right, m) === 0) return null;
        let size = 0;
        for (let c = 0; c < m; c++) size += right[c]! * right[c]!;
        size = Math.sqrt(size);
        for (let c = 0; c < m; c++) nextTangent[c] = right[c]! / size;
        return { lambda: value, iterations: iteration };
      }
      for (let r = 0; r < n; r++) right[r] = -residual[r]! / residualScale;
      right[n] = 0;
      if (solveInPlace(matrix, right, m) === 0) return null;
      for (let c = 0; c < n; c++) at[c]! += right[c]! * scale;
      value += right[n]! * parameterScale;
    }
    return null;
  };

  const first = correct(x, lambda);
  if (!first) return { points: 0, ended: 'no start' };
  lambda = first.lambda;
  [tangent, nextTangent] = [nextTangent, tangent];
  if (tangent[n]! * options.direction < 0) for (let c = 0; c < m; c++) tangent[c]! *= -1;
  let points = 1;
  if (!visit(x, lambda)) return { points, ended: 'stopped' };
  let step = options.firstStep;
  while (points < options.most) {
    for (let c = 0; c < n; c++) trial[c] = x[c]! + step * tangent[c]! * scale;
    const result = correct(trial, lambda + step * tangent[n]! * parameterScale);
    let turn = 0;
    if (result) for (let c = 0; c < m; c++) turn += tangent[c]! * nextTangent[c]!;
    // a turn of more than 37° a step may jump to another curve
    if (!result || turn < 0.8) {
      step *= 0.5;
      if (step < 1e-9 * options.largestStep) return { points, ended: 'step too small' };
      continue;
    }
    [x, trial] = [trial, x];
    [tangent, nextTangent] = [nextTangent, tangent];
    lambda = result.lambda;
    points++;
    if (!visit(x, lambda)) return { points, ended: 'stopped' };
    if (result.iterations <= 3 && turn > 0.95) step = Math.min(1.6 * step, options.largestStep);
    else if (result.iterations > 5) step *= 0.7;
  }
  return { points, ended: 'too many points' };
}
