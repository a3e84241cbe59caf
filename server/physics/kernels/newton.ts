import { solveInPlace } from './linear-solve';

/** A square system of equations with its Jacobian, asked at the same point in this order. */
export interface SquareSystem {
  size: number;
  residualInto(x: Float64Array, out: Float64Array): void;
  /** Row-major dR/dx at the x of the last residual. */
  jacobianInto(out: Float64Array): void;
}

export interface NewtonResult {
  x: Float64Array;
  converged: boolean;
  iterations: number;
  /** Norm of the residual over `residualScale`. */
  residual: number;
  /** Sign of det J at the last iteration; 0 where singular. */
  determinantSign: number;
}

const norm = (values: Float64Array): number => {
  let sum = 0;
  for (let k = 0; k < values.length; k++) sum += values[k]! * values[k]!;
  return Math.sqrt(sum);
};

/**
 * Newton's method with step halving. Converged when the residual is below `tolerance` · `residualScale` (or the step no
 * longer changes x and the residual is below the square root of that).
 *
 * @param residualScale size of a residual that means "no solution at all", in the residual's unit.
 * @throws RangeError where x has the wrong length.
 */
export function solveByNewton(
  system: SquareSystem,
  start: Float64Array,
  residualScale: number,
  options: { tolerance?: number; most?: number } = {},
): NewtonResult {
  const { size } = system;
  if (start.length !== size) throw new RangeError(`start must hold ${size} values, got ${start.length}`);
  const tolerance = options.tolerance ?? 1e-12;
  const most = options.most ?? 40;
  let x = Float64Array.from(start);
  let trial = new Float64Array(size);
  const residual = new Float64Array(size);
  const step = new Float64Array(size);
  const jacobian = new Float64Array(size * size);
  system.residualInto(x, residual);
  let error = norm(residual) / residualScale;
  let determinantSign = 0;
  let iterations = 0;
  for (; iterations < most && !(error <= tolerance) && Number.isFinite(error); iterations++) {
    system.jacobianInto(jacobian);
    step.set(residual);
    determinantSign = solveInPlace(jacobian, step, size);
    if (determinantSign === 0) break;
    let fraction = 1;
    let next = Infinity;
    for (let halving = 0; halving < 12; halving++) {
      for (let k = 0; k < size; k++) trial[k] = x[k]! - fraction * step[k]!;
      system.residualInto(trial, residual);
      next = norm(residual) / residualScale;
      if (next < error * (1 - 0.1 * fraction) || next <= tolerance) break;
      fraction *= 0.5;
    }
    if (!(next < error)) {
      // no further descent: rounding, or a stall
      system.residualInto(x, residual);
      break;
    }
    [x, trial] = [trial, x];
    error = next;
  }
  const converged = error <= tolerance || (error < Math.sqrt(tolerance) * 1e-2 && norm(step) <= 1e-9 * norm(x));
  if (iterations === 0 && converged) {
    system.jacobianInto(jacobian);
    step.set(residual);
    determinantSign = solveInPlace(jacobian, step, size);
  }
  return { x, converged, iterations, residual: error, determinantSign };
}
