import { innerTurn } from '../kernels/hermite-extremum';
import { exponentialStep } from '../kernels/matrix-exponential';
import { uniformTable } from '../kernels/uniform-table';
import type { Device } from './device';
import { seriesCurrent } from './diode';
import { pathTable, quickCircuit } from './quick-tables';
import type { RecordRun } from './record-run';

/*
 * The quick way through a recording where no coil inductance and no stop is in the way: the linear mechanics and the
 * ramp of the base are stepped exactly, and what is left (coil force, stiffening, drag) by the classical Runge–Kutta
 * method in the frame that moves with them (Lawson 1967). Coupling and rectifier are looked up in tables.
 */

type Ten = [number, number, number, number, number, number, number, number, number, number];

const SHOWN = 4096;
const COUPLING_PANELS = 1024;
/** Most that any rate may turn within one step, rad. */
const LARGEST_TURN = 0.2;
const MOST_PARTS = 16;
/** Places in what an evaluation leaves behind. */
const [PUSH, CHARGE, EMF, CURRENT, DIRECT] = [0, 1, 2, 3, 4] as const;

/**
 * Runs a device from rest through a recording the quick way, with its circuit or with the coil `open`, or returns null
 * where that way is barred or its checks fail:
 * a rate too fast for the step, a motion past the tables, a balance off by more than 1e-4.
 */
export function runQuickly(device: Device, open: boolean, acceleration: Float64Array, rate: number): RecordRun | null {
  const circuit = open ? { kind: 'resistor' as const, resistance: Infinity } : quickCircuit(device);
  if (!circuit || device.stops !== null) return null;
  const { mass, damping, quadraticDrag, suspension, coupling, restPosition, coilResistance } = device;
  const stiffness = -suspension.forceSlope(0);
  const own = Math.sqrt(Math.abs(stiffness) / mass);
  let size = 0;
  for (let n = 0; n < acceleration.length; n++) size = Math.max(size, Math.abs(acceleration[n]!));
  // the tables reach as far as a resonant motion could go, or as far as the coupling is known
  const quality = damping > 0 ? Math.sqrt(Math.abs(stiffness) * mass) / damping : Infinity;
  const cycles = (acceleration.length * own) / (2 * Math.PI * rate);
  const reach = (size / (own * own)) * (1 + Math.min(quality, Math.PI * cycles));
  const low = Math.max(restPosition - reach, coupling.from);
  const high = Math.min(restPosition + reach, coupling.to);
  if (!(high > low) || !(own > 0) || !Number.isFinite(reach)) return null;
  const theta = uniformTable(
    (x) => coupling.at(x),
    (x) => coupling.slopeAt(x),
    low,
    high,
    COUPLING_PANELS,
  );
  let strongest = 0;
  for (let n = 0; n < theta.rows.length; n += 2) strongest = Math.max(strongest, Math.abs(theta.rows[n]!));
  const load = circuit.kind === 'resistor' ? circuit.resistance : 0;
  const electrical = (strongest * strongest) / ((coilResistance + load) * mass);
  const charging = circuit.kind === 'bridge' ? 1 / (coilResistance * circuit.capacitance) : 0;
  const parts = Math.ceil(Math.max(own, electrical, charging) / rate / LARGEST_TURN);
  if (parts > MOST_PARTS) return null;
  const table =
    circuit.kind === 'resistor' ? null : pathTable(circuit.diode, coilResistance, strongest * own * reach + 1);
  if (circuit.kind !== 'resistor' && !table) return null;

  const h = 1 / (rate * parts);
  // state (u, v), then the base's acceleration and its rise over the step: e^{Ah} carries all four
  const matrix = Float64Array.of(0, 1, 0, 0, -stiffness / mass, -damping / mass, -1, 0, 0, 0, 0, 1 / h, 0, 0, 0, 0);
  const whole = exponentialStep(matrix, 4, h).step;
  const half = exponentialStep(matrix, 4, h / 2).step;
  const [w00, w01, w02, w03] = [whole[0]!, whole[1]!, whole[2]!, whole[3]!];
  const [w10, w11, w12, w13] = [whole[4]!, whole[5]!, whole[6]!, whole[7]!];
  const [h00, h01, h02, h03] = [half[0]!, half[1]!, half[2]!, half[3]!];
  const [h10, h11, h12, h13] = [half[4]!, half[5]!, half[6]!, half[7]!];
  const bridge = circuit.kind === 'bridge' ? circuit : null;
  const conductance = circuit.kind === 'resistor' ? 1 / (coilResistance + circuit.resistance) : 0;
  const perCapacitance = bridge ? 1 / bridge.capacitance : 0;
  const perLoad = bridge ? 1 / bridge.resistance : 0;
  const floor = circuit.kind !== 'resistor' && circuit.diode.kind === 'shockley' ? -circuit.diode.saturationCurrent : 0;
  const curved = suspension.polynomial === null || suspension.polynomial.k2 !== 0 || suspension.polynomial.k3 !== 0;

  // where an evaluation takes place and what it leaves behind: arrays, because numbers handed to a function are boxed
  const at = new Float64Array(3);
  const now = new Float64Array(5);
  const sums = new Float64Array(10);
  const lowest = theta.from - restPosition;
  const thetaRows = theta.rows;
  const thetaPerUnit = theta.perUnit;
  const pathRows = table ? table.rows : null;
  const pathFrom = table ? table.from : 0;
  const pathPerUnit = table ? table.perUnit : 0;
  const pathPanels = table ? table.panels : 0;
  const { circuit: rectifying } = device;
  const pathCurrent = (drive: number): number =>
    'diode' in rectifying ? seriesCurrent(rectifying.diode, 2, coilResistance, drive) : 0;
  const evaluate = (): void => {
    const u = at[0]!;
    const v = at[1]!;
    const place = (u - lowest) * thetaPerUnit;
    // past the table's end the run is thrown away afterwards
    const n = place <= 0 ? 0 : place >= COUPLING_PANELS ? COUPLING_PANELS - 1 : place | 0;
    const t = place - n;
    const first = thetaRows[2 * n]!;
    const slope = thetaRows[2 * n + 1]!;
    const rise = thetaRows[2 * n + 2]! - first;
    const bend = slope + thetaRows[2 * n + 3]! - 2 * rise;
    const strength = first + t * (slope + t * (rise - slope - bend + t * bend));
    const emf = strength * v;
    let current = emf * conductance;
    if (pathRows) {
      const voltage = at[2]!;
      const size = emf < 0 ? -emf : emf;
      // the path that conducts, the one that blocks, and once more the first with what the second leaks
      let p = 0;
      let q = floor;
      for (let sweep = 0; sweep < 3; sweep++) {
        const drive = sweep === 1 ? coilResistance * p - size - voltage : size - voltage + coilResistance * q;
        const along = (drive - pathFrom) * pathPerUnit;
        let value: number;
        if (along <= 0) value = floor;
        else if (along >= pathPanels) value = pathCurrent(drive);
        else {
          const k = along | 0;
          const s = along - k;
          const a = pathRows[2 * k]!;
          const d = pathRows[2 * k + 1]!;
          const up = pathRows[2 * k + 2]! - a;
          const c3 = d + pathRows[2 * k + 3]! - 2 * up;
          value = a + s * (d + s * (up - d - c3 + s * c3));
        }
        if (sweep !== 1) p = value;
        else {
          q = value;
          // what the blocked path leaks besides −Is moves the other's drive by less than a nanovolt
          if (coilResistance * (q - floor) < 1e-9) break;
        }
      }
      current = emf < 0 ? q - p : p - q;
      now[DIRECT] = p + q;
      now[CHARGE] = (p + q - voltage * perLoad) * perCapacitance;
    }
    let push = -strength * current;
    if (curved) push += suspension.force(u) + stiffness * u;
    if (quadraticDrag !== 0) push -= quadraticDrag * Math.abs(v) * v;
    now[PUSH] = push / mass;
    now[EMF] = emf;
    now[CURRENT] = current;
  };

  const last = acceleration.length - 1;
  const every = Math.max(1, Math.ceil((last + 1) / SHOWN));
  const shown = Math.ceil((last + 1) / every);
  const base = new Float64Array(1);
  const state = new Float64Array(3);
  const series = (): Float64Array => new Float64Array(shown);
  const [time, displacement, emfShown, loadShown, coilShown] = [series(), series(), series(), series(), series()];
  let u = 0;
  let v = 0;
  let voltage = circuit.kind === 'store' ? circuit.voltage : 0;
  let [peak, emfPeak] = [0, 0];
  /** Adds the present evaluation to the books, once or twice as an outer or an inner one. */
  const count = (inner: boolean): void => {
    const weight = inner ? h / 3 : h / 6;
    const emf = now[EMF]!;
    const current = now[CURRENT]!;
    const uAt = at[0]!;
    const vAt = at[1]!;
    const square = weight * vAt * vAt;
    sums[0]! -= weight * base[0]! * vAt;
    sums[1]! += square;
    if (quadraticDrag !== 0) sums[2]! += square * Math.abs(vAt);
    sums[3]! += weight * current * current;
    sums[4]! += weight * emf * emf;
    sums[5]! += weight * uAt * uAt;
    if (pathRows) {
      const voltage = at[2]!;
      const direct = now[DIRECT]!;
      sums[6]! += weight * ((emf - coilResistance * current) * current - direct * voltage);
      sums[7]! += weight * voltage;
      sums[8]! += weight * voltage * voltage;
      sums[9]! += weight * (bridge ? voltage * perLoad : direct) * voltage;
    }
  };
  const sixth = h / 6;
  const show = (sample: number): void => {
    const n = sample / every;
    time[n] = sample / rate;
    displacement[n] = state[0]!;
    emfShown[n] = now[EMF]!;
    loadShown[n] = table ? state[2]! : now[EMF]! - coilResistance * now[CURRENT]!;
    coilShown[n] = now[CURRENT]!;
  };
  state[2] = voltage;
  at[2] = voltage;
  evaluate();
  for (let sample = 0; sample < last; sample++) {
    const from = acceleration[sample]!;
    const rise = (acceleration[sample + 1]! - from) / parts;
    if (sample % every === 0) show(sample);
    for (let part = 0; part < parts; part++) {
      const a = from + part * rise;
      const k1 = now[PUSH]!;
      const c1 = now[CHARGE]!;
      base[0] = a;
      count(false);
      const startAcceleration = -(stiffness * u + damping * v) / mass + k1 - a;
      const um = h00 * u + h01 * v + h02 * a + h03 * rise;
      const vm = h10 * u + h11 * v + h12 * a + h13 * rise;
      const kick = 0.5 * h * k1;
      const u2 = um + h01 * kick;
      const v2 = vm + h11 * kick;
      const voltage2 = voltage + 0.5 * h * c1;
      at[0] = u2;
      at[1] = v2;
      at[2] = voltage2;
      evaluate();
      const k2 = now[PUSH]!;
      const c2 = now[CHARGE]!;
      base[0] = a + 0.5 * rise;
      count(true);
      const v3 = vm + 0.5 * h * k2;
      const voltage3 = voltage + 0.5 * h * c2;
      at[0] = um;
      at[1] = v3;
      at[2] = voltage3;
      evaluate();
      const k3 = now[PUSH]!;
      const c3 = now[CHARGE]!;
      count(true);
      const ue = w00 * u + w01 * v + w02 * a + w03 * rise;
      const ve = w10 * u + w11 * v + w12 * a + w13 * rise;
      const u4 = ue + h * h01 * k3;
      const v4 = ve + h * h11 * k3;
      const voltage4 = voltage + h * c3;
      at[0] = u4;
      at[1] = v4;
      at[2] = voltage4;
      evaluate();
      const k4 = now[PUSH]!;
      const c4 = now[CHARGE]!;
      base[0] = a + rise;
      count(false);
      const middlePush = 2 * (k2 + k3);
      const uNext = ue + sixth * (w01 * k1 + h01 * middlePush);
      const vNext = ve + sixth * (w11 * k1 + h11 * middlePush + k4);
      if (bridge) voltage += sixth * (c1 + 2 * (c2 + c3) + c4);
      const before = u;
      const beforeV = v;
      u = uNext;
      v = vNext;
      at[0] = u;
      at[1] = v;
      at[2] = voltage;
      evaluate();
      const far = u < 0 ? -u : u;
      if (far > peak) peak = far;
      if (beforeV * v < 0) {
        const endAcceleration = -(stiffness * u + damping * v) / mass + now[PUSH]! - a - rise;
        const turn = Math.abs(innerTurn(h, before, beforeV, startAcceleration, u, v, endAcceleration));
        if (turn > peak) peak = turn;
      }
      const loud = Math.abs(now[EMF]!);
      if (loud > emfPeak) emfPeak = loud;
    }
    state[0] = u;
    state[1] = v;
    state[2] = voltage;
    if (!(peak < 1e300)) return null;
  }
  if (last % every === 0) show(last);
  if (restPosition - peak < low || restPosition + peak > high) return null;
  let steepest = 0;
  for (let n = -8; n <= 8; n++) steepest = Math.max(steepest, Math.abs(suspension.forceSlope((n / 8) * peak)));
  if (Math.sqrt(steepest / mass) * h > LARGEST_TURN) return null;
  const duration = last / rate;
  const [sumIn, sumV2, sumV3, sumI2, sumE2, sumU2, sumRectifier, sumVoltage, sumVoltage2, sumLoad] =
    sums as unknown as Ten;
  const loadEnergy = circuit.kind !== 'resistor' ? sumLoad : open ? 0 : circuit.resistance * sumI2;
  const loss = damping * sumV2 + quadraticDrag * sumV3;
  const stored =
    0.5 * mass * v * v + suspension.energy(u) + (bridge ? 0.5 * bridge.capacitance * voltage * voltage : 0);
  const into = mass * sumIn;
  const rest = into - loadEnergy - coilResistance * sumI2 - sumRectifier - loss - stored;
  const scale = Math.max(Math.abs(into), loadEnergy + loss);
  if (!(Math.abs(rest) <= 1e-4 * scale)) return null;
  const mean = (sum: number): number => sum / duration;
  return {
    completed: true,
    steps: last * parts,
    mean: {
      mechanicalIn: mean(into),
      mechanicalLoss: mean(loss),
      stops: 0,
      current2: mean(sumI2),
      load: mean(loadEnergy),
      rectifier: mean(sumRectifier),
      converter: 0,
      emf2: mean(sumE2),
      loadVoltage: table ? mean(sumVoltage) : 0,
      loadVoltage2: table ? mean(sumVoltage2) : open ? mean(sumE2) : load * load * mean(sumI2),
      displacement2: mean(sumU2),
    },
    stored: stored / duration,
    displacementPeak: peak,
    emfPeak,
    touched: false,
    finalVoltage: voltage,
    time,
    displacement,
    emf: emfShown,
    loadVoltage: loadShown,
    current: coilShown,
  };
}
