import { wrapAngle } from '../kernels/angle';
import type { PeriodicOrbit } from '../kernels/periodic-orbit';
import { driveOf, everyOrbit, onlyOrbit } from './branches';
import type { SteadyOrbit } from './branches';
import type { Device, DeviceResponse, Tone } from './device';
import { transferAt } from './linear-response';
import { figuresOf } from './orbit-figures';
import type { OrbitFigures } from './orbit-figures';
import { hasConstantCoupling, isMechanicallyLinear, oscillatorWith } from './oscillator';

/** Coefficients of the exact motion of a mechanically linear device with constant coupling. */
function phasorOrbit(device: Device, tone: Tone, resistance: number): SteadyOrbit {
  const omega = 2 * Math.PI * tone.frequency;
  const transfer = transferAt(
    {
      mass: device.mass,
      damping: device.damping,
      stiffness: -device.suspension.forceSlope(0),
      coupling: device.coupling.at(device.restPosition),
      coilResistance: device.coilResistance,
      coilInductance: device.coilInductance,
      resistance,
    },
    omega,
  );
  // a = A sin(ωt + φ) is the phasor A (sin φ − j cos φ) over cos ωt
  const re = tone.acceleration * Math.sin(tone.phase);
  const im = -tone.acceleration * Math.cos(tone.phase);
  const displacement = Float64Array.of(
    0,
    transfer.uRe * re - transfer.uIm * im,
    -(transfer.uRe * im + transfer.uIm * re),
  );
  return { omega, harmonics: 1, displacement, converged: true, residual: 0, tail: 0, iterations: 0, stable: true };
}

interface Steady {
  /** The headline orbit; null where none was found. */
  headline: SteadyOrbit | null;
  all: SteadyOrbit[];
  method: string;
  notes: string[];
}

/** All steady orbits of the device on a resistance, and the one that stands for them. */
export function steadyOrbits(
  device: Device,
  tone: Tone,
  resistance: number,
  constantCoupling = hasConstantCoupling(device),
): Steady {
  const open = !Number.isFinite(resistance);
  const linear = isMechanicallyLinear(device);
  if (linear && (open || constantCoupling)) {
    const orbit = phasorOrbit(device, tone, resistance);
    return { headline: orbit, all: [orbit], method: 'phasors', notes: [] };
  }
  const oscillator = oscillatorWith(device, resistance);
  const omega = 2 * Math.PI * tone.frequency;
  const drive = driveOf(device.mass, tone.acceleration, tone.phase);
  if (linear) {
    const orbit = onlyOrbit(oscillator, omega, drive);
    if (orbit.converged) {
      const notes =
        device.coilInductance * omega > 0.3 * (device.coilResistance + resistance)
          ? ['With this much coil inductance a second steady response is not excluded; one was sought and found.']
          : [];
      return { headline: orbit, all: [orbit], method: 'harmonic balance', notes };
    }
  }
  const all = everyOrbit(oscillator, omega, drive, device.suspension.equilibria);
  const stable = all.find((orbit) => orbit.stable);
  const notes: string[] = [];
  if (all.length === 0) notes.push('No steady response of period one was found.');
  else if (!stable)
    notes.push('No steady response of period one is stable: the device moves otherwise; the smallest is shown.');
  else if (all.length > 1)
    notes.push(
      `${all.length} steady responses coexist; the figures are of the smallest stable one, which a start from rest may well settle on.`,
    );
  if (!open)
    notes.push(
      'Responses were sought along amplitude and frequency and from random starts; one on a curve of its own may be missing, and only those that repeat every period of the tone are listed.',
    );
  return {
    headline: stable ?? all[0] ?? null,
    all,
    method: 'harmonic balance with continuation',
    notes,
  };
}

/** Phase of displacement relative to base acceleration, rad, in (−π, π]. */
export function phaseOf(orbit: Pick<PeriodicOrbit, 'displacement'>, tone: Tone): number {
  const [, cosine = 0, sine = 0] = orbit.displacement;
  // phasor (cosine − j sine) against A (sin φ − j cos φ)
  return wrapAngle(Math.atan2(-sine, cosine) - Math.atan2(-Math.cos(tone.phase), Math.sin(tone.phase)));
}

/** −m⟨a ẋ⟩, W. */
function mechanicalIn(device: Device, orbit: PeriodicOrbit, tone: Tone): number {
  const drive = driveOf(device.mass, tone.acceleration, tone.phase);
  const [, cosine = 0, sine = 0] = orbit.displacement;
  // ẋ has cos part ω·sine and sin part −ω·cosine
  return -0.5 * orbit.omega * (drive[1]! * sine - drive[2]! * cosine);
}

/**
 * Steady response of a device with a resistor to one tone: exact phasors where everything is linear, harmonic balance
 * with all coexisting responses otherwise. Stops are not for this method.
 */
export function respondToToneWithResistor(device: Device, tone: Tone, resistance: number): DeviceResponse {
  const constant = hasConstantCoupling(device);
  const open = steadyOrbits(device, tone, Infinity, constant);
  const openFigures = open.headline && figuresOf(device, open.headline, Infinity);
  const loaded = steadyOrbits(device, tone, resistance, constant);
  const notes = [...loaded.notes];
  const figured = loaded.all.map((orbit) => ({ orbit, figures: figuresOf(device, orbit, resistance) }));
  figured.sort((a, b) => a.figures.displacementPeak - b.figures.displacementPeak);
  const chosen = figured.find(({ orbit }) => orbit === loaded.headline) ?? null;
  const orbit = chosen?.orbit ?? null;
  const figures = chosen?.figures ?? null;
  notes.push(...rangeNotes(device, figures));
  if (figures && figures.harmonicDistortion === null)
    notes.push('Harmonic distortion is not computed, because the EMF has no part at the frequency of the tone.');
  const into = orbit && mechanicalIn(device, orbit, tone);
  return {
    response: {
      method: loaded.method,
      converged: orbit?.converged ?? false,
      openCircuitEmfRms: openFigures?.emfRms ?? null,
      openCircuitEmfPeak: openFigures?.emfPeak ?? null,
      emfRms: figures?.emfRms ?? null,
      loadVoltageRms: figures && resistance * figures.currentRms,
      loadVoltageMean: figures && 0,
      coilCurrentRms: figures?.currentRms ?? null,
      loadPower: figures?.load ?? null,
      displacementPeak: figures?.displacementPeak ?? null,
      displacementRms: figures?.displacementRms ?? null,
      phase: orbit && phaseOf(orbit, tone),
      harmonicDistortion: figures?.harmonicDistortion ?? null,
      stopContact: device.stops && false,
      branches: figured.map((one) => ({
        displacementPeak: one.figures.displacementPeak,
        loadPower: one.figures.load,
        stable: one.orbit.stable,
      })),
    },
    power: {
      mechanicalIn: into,
      load: figures?.load ?? null,
      coil: figures?.coil ?? null,
      rectifier: figures && 0,
      converter: figures && 0,
      mechanicalLoss: figures?.mechanicalLoss ?? null,
      stops: figures && 0,
      stored: figures && 0,
      residual: figures && into !== null ? residualOf(into, figures) : null,
    },
    waveforms: figures && {
      time: figures.time,
      displacement: figures.displacement,
      emf: figures.emf,
      loadVoltage: figures.current.map((current) => resistance * current),
      coilCurrent: figures.current,
    },
    solution: { harmonics: orbit?.harmonics ?? null, steps: null, residual: orbit?.residual ?? null },
    notes,
  };
}

function residualOf(into: number, figures: OrbitFigures): number {
  const out = figures.load + figures.coil + figures.mechanicalLoss;
  return Math.abs(into) > 0 ? Math.abs(into - out) / Math.abs(into) : Math.abs(out) > 0 ? 1 : 0;
}

/** Where a motion leaves the range in which force or coupling are known. */
export function rangeNotes(device: Device, figures: { displacementPeak: number } | null): string[] {
  if (!figures) return [];
  const peak = figures.displacementPeak;
  const { coupling, restPosition, suspension } = device;
  const notes: string[] = [];
  if (restPosition - peak < coupling.from || restPosition + peak > coupling.to)
    notes.push('The motion leaves the range over which the coupling was computed or measured.');
  if (-peak < suspension.from || peak > suspension.to)
    notes.push('The motion leaves the range over which the force of the suspension is known.');
  return notes;
}
