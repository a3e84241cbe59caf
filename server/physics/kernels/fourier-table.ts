/** Cosines and sines of a trigonometric basis at evenly spaced samples of one period. */
export interface FourierTable {
  harmonics: number;
  samples: number;
  /** samples × (2 harmonics + 1), row n: 1, cos τ, sin τ, cos 2τ, sin 2τ, … at τ = 2πn/samples. */
  basis: Float64Array;
}

const tables = new Map<number, FourierTable>();

/**
 * The table for a number of harmonics and of samples; built once and shared.
 * @throws RangeError where there are too few samples to tell the harmonics apart (samples > 2 harmonics).
 */
export function fourierTable(harmonics: number, samples: number): FourierTable {
  if (!(samples > 2 * harmonics)) throw new RangeError(`samples must exceed ${2 * harmonics}, got ${samples}`);
  const key = harmonics * 65536 + samples;
  const found = tables.get(key);
  if (found) return found;
  const width = 2 * harmonics + 1;
  const circle = new Float64Array(2 * samples);
  for (let n = 0; n < samples; n++) {
    circle[2 * n] = Math.cos((2 * Math.PI * n) / samples);
    circle[2 * n + 1] = Math.sin((2 * Math.PI * n) / samples);
  }
  const basis = new Float64Array(samples * width);
  for (let n = 0; n < samples; n++) {
    basis[n * width] = 1;
    for (let h = 1; h <= harmonics; h++) {
      const at = (h * n) % samples;
      basis[n * width + 2 * h - 1] = circle[2 * at]!;
      basis[n * width + 2 * h] = circle[2 * at + 1]!;
    }
  }
  const table = { harmonics, samples, basis };
  tables.set(key, table);
  return table;
}

/** Values at the samples of Σ c_k basis_k; `coefficients` may hold fewer harmonics than the table. */
export function synthesiseInto(table: FourierTable, coefficients: Float64Array, out: Float64Array): void {
  const width = 2 * table.harmonics + 1;
  const used = Math.min(width, coefficients.length);
  const { basis, samples } = table;
  for (let n = 0; n < samples; n++) {
    let sum = 0;
    const row = n * width;
    for (let k = 0; k < used; k++) sum += basis[row + k]! * coefficients[k]!;
    out[n] = sum;
  }
}

/** Coefficients (mean, cos 1, sin 1, …) of the samples, as many as `out` holds. */
export function analyseInto(table: FourierTable, values: Float64Array, out: Float64Array): void {
  const width = 2 * table.harmonics + 1;
  const used = Math.min(width, out.length);
  const { basis, samples } = table;
  out.fill(0);
  for (let n = 0; n < samples; n++) {
    const value = values[n]!;
    const row = n * width;
    for (let k = 0; k < used; k++) out[k]! += value * basis[row + k]!;
  }
  const scale = 2 / samples;
  out[0]! *= 0.5 * scale;
  for (let k = 1; k < used; k++) out[k]! *= scale;
}

/** d/dt of a coefficient vector at fundamental ω: (cos, sin)_h → hω (sin, −cos)_h. */
export function differentiateInto(coefficients: Float64Array, omega: number, out: Float64Array): void {
  out[0] = 0;
  for (let k = 1; k + 1 < coefficients.length; k += 2) {
    const rate = ((k + 1) / 2) * omega;
    const cosine = coefficients[k]!;
    out[k] = rate * coefficients[k + 1]!;
    out[k + 1] = -rate * cosine;
  }
}
