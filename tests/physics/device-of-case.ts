import { readFileSync } from 'node:fs';
import { constantCoupling, couplingTable, measuredCoupling } from '#physics/models/coupling';
import type { MagneticDesign } from '#physics/models/coupling';
import type { Circuit, Device, DeviceResponse, Diode, Vibration } from '#physics/models/device';
import { springSuspension } from '#physics/models/suspension';

interface StatedDiode {
  saturationCurrent: number;
  emissionCoefficient: number;
  seriesResistance: number;
  drop?: number;
}

export interface Case {
  id: string;
  title: string;
  design: MagneticDesign & {
    axisAngle: number;
    movingMass: { total: number };
    suspension: { kind: string; stiffness: number; cubic: number; neutralAt: number };
    damping: { quality: number; quadratic?: number };
    stops: { lower?: number; upper?: number; stiffness: number; damping: number } | null;
    circuit: { kind: string; diode?: StatedDiode } & Record<string, unknown>;
    asMeasured: {
      coilResistance?: number;
      coilInductance: number;
      coupling?: number | { position: number[]; coupling: number[] };
    };
  };
  vibration: {
    kind: string;
    frequency: number;
    acceleration: number | number[];
    rate: number;
    unit: string;
    points: [number, number][];
    duration: number;
    seed: number;
    tones: { frequency: number; acceleration: number; phase: number }[];
  };
  expect: {
    path: string;
    value: number | boolean;
    relative?: number;
    absolute?: number;
  }[];
}

export function readCase(id: string): Case {
  return JSON.parse(readFileSync(new URL(`../reference/cases/${id}.json`, import.meta.url), 'utf8')) as Case;
}

const GRAVITY = 9.80665;
const diodeOf = (stated: StatedDiode): Diode =>
  stated.drop === undefined
    ? { kind: 'shockley', ...stated, thermalVoltage: (1.380649e-23 * 300.15) / 1.602176634e-19 }
    : { kind: 'drop', drop: stated.drop };

/** The device of a reference case, built by hand from its document in SI numbers. */
export function deviceOf({ design }: Case): Device {
  const mass = design.movingMass.total;
  const placed = springSuspension(design.suspension, mass, design.axisAngle);
  const { coupling } = design.asMeasured;
  const table =
    typeof coupling === 'number'
      ? constantCoupling(coupling)
      : coupling
        ? measuredCoupling(coupling.position, coupling.coupling)
        : couplingTable(design, placed.restPosition - 0.012, placed.restPosition + 0.012);
  const circuit = { ...design.circuit, diode: design.circuit.diode && diodeOf(design.circuit.diode) };
  return {
    mass,
    damping: Math.sqrt(placed.stiffness * mass) / design.damping.quality,
    quadraticDrag: design.damping.quadratic ?? 0,
    suspension: placed.suspension,
    restPosition: placed.restPosition,
    stops: design.stops && { lower: null, upper: null, ...design.stops },
    coupling: table,
    coilResistance: design.asMeasured.coilResistance ?? 103.44827586206897,
    coilInductance: design.asMeasured.coilInductance,
    circuit: circuit as unknown as Circuit,
  };
}

export function vibrationOf({ vibration }: Case): Vibration {
  const scale = vibration.unit === 'g^2/Hz' ? GRAVITY ** 2 : vibration.unit === 'g' ? GRAVITY : 1;
  switch (vibration.kind) {
    case 'tone':
      return {
        kind: 'tone',
        tone: { frequency: vibration.frequency, acceleration: vibration.acceleration as number, phase: 0 },
      };
    case 'tones':
      return { kind: 'tones', tones: vibration.tones };
    case 'spectrum': {
      const points = vibration.points.map(([f, density]): [number, number] => [f, density * scale]);
      return { kind: 'spectrum', points, duration: vibration.duration, seed: vibration.seed };
    }
    default:
      return {
        kind: 'recording',
        rate: vibration.rate,
        acceleration: Float64Array.from(vibration.acceleration as number[], (a) => a * scale),
      };
  }
}

/** Every expectation of a case under `response` and `power` that the answer misses, with by how much. */
export function missesOf(stated: Case, answer: DeviceResponse): string[] {
  const misses: string[] = [];
  for (const { path, value, relative, absolute } of stated.expect) {
    const [part] = path.split('.');
    if (part !== 'response' && part !== 'power') continue;
    let got: unknown = answer;
    for (const key of path.split('.')) got = (got as Record<string, unknown> | undefined)?.[key];
    if (typeof value === 'boolean') {
      if (got !== value) misses.push(`${path}: ${String(got)} for ${value}`);
      continue;
    }
    const allowed = absolute ?? relative! * Math.abs(value);
    const error = Math.abs((got as number) - value);
    if (typeof got !== 'number' || !(error <= allowed))
      misses.push(`${path}: ${String(got)} for ${value}, off by ${(error / allowed).toPrecision(3)} tolerances`);
  }
  return misses;
}
