import { circuitModel, Supercapacitor } from './circuit-model';
import type { Circuit, Device, NodeLoad } from './device';
import { Motion, SUM } from './motion';

/** A base acceleration over a time, from rest. */
export interface Excitation {
  /** s. */
  duration: number;
  /** m/s² at t (s). */
  accelerationAt(t: number): number;
  /** Interval at whose multiples the acceleration may have corners, s; Infinity where it is smooth. */
  corners: number;
  /** A size of the acceleration, m/s². */
  size: number;
  /** Time that is run through before the books are opened, s; the excitation must be known from −settling on. */
  settling?: number;
}

/** What a record did to a device; powers and squares are means over it. SI. */
export interface RecordRun {
  completed: boolean;
  steps: number;
  mean: Record<keyof typeof SUM, number>;
  stored: number;
  displacementPeak: number;
  emfPeak: number;
  touched: boolean;
  finalVoltage: number;
  time: Float64Array;
  displacement: Float64Array;
  emf: Float64Array;
  loadVoltage: Float64Array;
  current: Float64Array;
}

const SHOWN = 4096;
/** Steps past which a record is not followed further. */
export const MOST_STEPS = 10_000_000;

/** A recording as an excitation: straight lines between samples. */
export function recordedExcitation(acceleration: Float64Array, rate: number): Excitation {
  const last = acceleration.length - 1;
  let size = 0;
  for (let n = 0; n <= last; n++) size = Math.max(size, Math.abs(acceleration[n]!));
  return {
    duration: last / rate,
    corners: 1 / rate,
    size,
    accelerationAt: (t) => {
      const place = t * rate;
      const n = Math.min(last - 1, Math.max(0, Math.floor(place)));
      const before = acceleration[n]!;
      return before + (place - n) * (acceleration[n + 1]! - before);
    },
  };
}

/**
 * Steps a device from rest through an excitation; a node's bursts begin each of its periods. `circuit` null leaves the
 * coil open. The step is controlled; it ends at every corner of the acceleration and every switching of the node.
 *
 * @param tolerance error of a step relative to the motion so far.
 */
export function runRecord(
  device: Device,
  circuit: Circuit | null,
  excitation: Excitation,
  tolerance: number,
): RecordRun {
  const model = circuitModel(circuit);
  const stiffness = Math.abs(device.suspension.forceSlope(0));
  const own = Math.sqrt(stiffness / device.mass) || 1;
  const { duration, corners } = excitation;
  const motion = new Motion(device, model, excitation.accelerationAt, {
    tolerance,
    period: (2 * Math.PI) / own,
    most: MOST_STEPS,
    smallest: Math.max((0.3 * excitation.size) / (own * own), 1e-15),
  });
  const node = circuit?.kind === 'supercapacitor' ? circuit.node : null;
  const capacitor = model instanceof Supercapacitor ? model : null;
  if (node && capacitor) capacitor.demand = node.activeTime > 0 ? node.activeCurrent : node.sleepCurrent;
  motion.place(
    0,
    0,
    0,
    0,
    circuit?.kind === 'supercapacitor' ? [circuit.initialVoltage] : [0, 0].slice(0, model.capacitors),
  );
  let completed = true;
  if (excitation.settling) {
    const { u, v, current, voltage } = motion;
    motion.place(-excitation.settling, u, v, current, [...voltage]);
    completed = motion.advance(0, (2 * Math.PI) / own / 16);
    motion.openBooks();
  }
  const before = motion.energy();
  const shown = Math.min(SHOWN, Number.isFinite(corners) ? Math.round(duration / corners) + 1 : SHOWN);
  const every = duration / (shown - 1);
  const series = (): Float64Array => new Float64Array(shown);
  const [time, displacement, emf, loadVoltage, current] = [series(), series(), series(), series(), series()];
  const show = (n: number): void => {
    time[n] = motion.t;
    displacement[n] = motion.u;
    emf[n] = motion.emf;
    loadVoltage[n] = motion.loadVoltage;
    current[n] = motion.current;
  };
  show(0);
  let taken = 1;
  let corner = 1;
  const switches = node && capacitor && node.activeCurrent !== node.sleepCurrent ? switchings(node) : null;
  let nextSwitch = switches ? switches.next().value : { t: Infinity, demand: 0 };
  const longest = Math.min((2 * Math.PI) / own / 16, every);
  const least = 1e-9 / own;
  while (motion.t < duration - least) {
    let to = duration;
    const cornerAt = corner * corners;
    if (cornerAt < to) to = cornerAt;
    if (nextSwitch.t < to) to = nextSwitch.t;
    const shownAt = taken * every;
    if (!Number.isFinite(corners) && shownAt < to) to = shownAt;
    if (!motion.advance(to, longest)) {
      completed = false;
      break;
    }
    if (to === cornerAt) corner++;
    if (to === nextSwitch.t && capacitor && switches) {
      capacitor.demand = nextSwitch.demand;
      motion.demandChanged();
      nextSwitch = switches.next().value;
    }
    if (taken < shown && motion.t >= taken * every - least) show(taken++);
  }
  if (taken < shown) show(shown - 1);
  return {
    completed,
    steps: motion.steps,
    mean: Object.fromEntries(
      Object.entries(SUM).map(([key, place]) => [key, motion.sums[place]! / duration]),
    ) as RecordRun['mean'],
    stored: (motion.energy() - before) / duration,
    displacementPeak: motion.peak,
    emfPeak: motion.emfPeak,
    touched: motion.touched,
    finalVoltage: motion.loadVoltage,
    time,
    displacement,
    emf,
    loadVoltage,
    current,
  };
}

/** Times at which a node changes what it draws: at the end of each burst and at the start of the next. */
function* switchings(node: NodeLoad): Generator<{ t: number; demand: number }, never> {
  for (let cycle = 0; ; cycle++) {
    if (node.activeTime > 0 && node.activeTime < node.period)
      yield { t: cycle * node.period + node.activeTime, demand: node.sleepCurrent };
    const always = node.activeTime >= node.period;
    yield {
      t: (cycle + 1) * node.period,
      demand: always || node.activeTime > 0 ? node.activeCurrent : node.sleepCurrent,
    };
  }
}
