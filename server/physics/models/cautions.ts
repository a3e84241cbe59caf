import type { DesignDocument } from '../design-document';
import type { Caution, Estimate } from '../estimate-shape';
import { formatQuantity } from '../quantity';
import { sweptRadius, travelOf } from './fit-check';
import { magnetCautions, strayFieldCautions } from './magnet-cautions';
import { windingsOf } from './winding';

/** Peak voltage of a touchable part from which equipment standards ask for protection (30 V rms of a sine), V. */
export const TOUCH_VOLTAGE_PEAK = 42.4;

/** Share of mechanical power left unexplained above which an estimate is not to be trusted. */
export const TRUSTED_RESIDUAL = 0.005;

function coilCautions(document: DesignDocument): Caution[] {
  const cautions: Caution[] = [];
  const windings = windingsOf(document.coils, document.conductivity, document.temperature);
  windings.coils.forEach((winding, index) => {
    const turns = document.coils[index]?.turns ?? 0;
    const { fit } = winding;
    if (!winding.windable) {
      cautions.push({
        code: 'not-windable',
        severity: 'stop',
        message: `${turns} turns do not fit as layers: square ${fit.turnsSquare}, orthocyclic ${fit.turnsOrthocyclic} at most with the largest overall wire diameter.`,
        path: `coils.${index}.turns`,
      });
    } else if (winding.needsOrthocyclic) {
      cautions.push({
        code: 'orthocyclic-lay',
        severity: 'caution',
        message: `${turns} turns fit only as an orthocyclic lay (${fit.turnsOrthocyclic}); wound wild or square, ${fit.turnsSquare} are the most.`,
        path: `coils.${index}.turns`,
      });
    }
  });
  return cautions;
}

/** Extents of two parts along one axis overlap by more than rounding. */
const overlap = (a: number, halfA: number, b: number, halfB: number): boolean => halfA + halfB - Math.abs(a - b) > 1e-9;

function clashCautions(document: DesignDocument): Caution[] {
  const cautions: Caution[] = [];
  const clash = (kind: 'magnets' | 'coils', a: number, b: number): void => {
    cautions.push({
      code: 'parts-overlap',
      severity: 'stop',
      message: `${kind}.${a} and ${kind}.${b} occupy the same space.`,
      path: `${kind}.${b}.at`,
    });
  };
  const each = <Part>(kind: 'magnets' | 'coils', parts: readonly Part[], meet: (a: Part, b: Part) => boolean): void => {
    for (let a = 0; a < parts.length; a += 1) {
      for (let b = a + 1; b < parts.length; b += 1) {
        const first = parts[a];
        const second = parts[b];
        if (first !== undefined && second !== undefined && meet(first, second)) clash(kind, a, b);
      }
    }
  };
  if (document.layout === 'through') {
    const rings = (
      a: { innerDiameter: number; outerDiameter: number; length: number; at: number },
      b: { innerDiameter: number; outerDiameter: number; length: number; at: number },
    ): boolean =>
      overlap(a.at, a.length / 2, b.at, b.length / 2) &&
      Math.min(a.outerDiameter, b.outerDiameter) - Math.max(a.innerDiameter, b.innerDiameter) > 1e-9;
    each('magnets', document.magnets, rings);
    each('coils', document.coils, rings);
  } else {
    each('magnets', document.magnets, (a, b) =>
      ([0, 1, 2] as const).every((side) => overlap(a.at[side], a.size[side] / 2, b.at[side], b.size[side] / 2)),
    );
  }
  return cautions;
}

function massCautions(document: DesignDocument, magnetMass: number): Caution[] {
  if (!('total' in document.movingMass) || document.movingMass.total >= magnetMass * (1 - 1e-9)) return [];
  return [
    {
      code: 'lighter-than-magnets',
      severity: 'caution',
      message: `The moving mass of ${formatQuantity(document.movingMass.total, 'mass')} is less than the magnets alone weigh, ${formatQuantity(magnetMass, 'mass')}.`,
      path: 'movingMass.total',
    },
  ];
}

function suspensionCautions(document: DesignDocument): Caution[] {
  if (document.suspension.kind !== 'levitated') return [];
  return [
    {
      code: 'needs-guide',
      severity: 'caution',
      message:
        'A levitated assembly is unstable sideways, with half its axial stiffness (Earnshaw): it needs a guide, whose friction is not modelled.',
      path: 'suspension',
    },
  ];
}

/** What the excursion does to parts that are not in the way at rest. */
function travelCautions(document: DesignDocument, rest: number, displacementPeak: number | null): Caution[] {
  const cautions: Caution[] = [];
  const { stops } = document;
  if (stops && ((stops.upper !== null && rest > stops.upper) || (stops.lower !== null && rest < stops.lower))) {
    cautions.push({
      code: 'rest-on-stop',
      severity: 'stop',
      message: `Without the stop the assembly would rest at ${formatQuantity(rest, 'length')}, beyond it: it leans on the stop, and the figures are not those of such a device.`,
      path: 'stops',
    });
  }
  if (displacementPeak === null || document.layout !== 'through') return cautions;
  const still = travelOf(document, rest);
  document.magnets.forEach((magnet, m) => {
    const swept = 2 * sweptRadius(document, magnet);
    document.coils.forEach((coil, c) => {
      if (swept < coil.innerDiameter) return;
      const half = (magnet.length + coil.length) / 2;
      const apart = Math.min(...still.map((x) => Math.abs(x + magnet.at - coil.at))) - half;
      if (displacementPeak > apart) {
        cautions.push({
          code: 'coil-in-path',
          severity: 'stop',
          message: `An excursion of ${formatQuantity(displacementPeak, 'length')} drives magnets.${m} into coils.${c}, whose bore is too narrow for it.`,
          path: `coils.${c}.at`,
        });
      }
    });
  });
  return cautions;
}

function resultCautions(
  estimate: Pick<Estimate, 'response' | 'power' | 'mechanics'>,
  toneFrequency: number | null,
): Caution[] {
  const cautions: Caution[] = [];
  const { response, power, mechanics } = estimate;
  const { naturalFrequency, quality } = mechanics;
  if (toneFrequency !== null && naturalFrequency !== null && quality !== null) {
    const off = toneFrequency - naturalFrequency;
    if (Math.abs(off) > naturalFrequency / (2 * quality) && quality > 1) {
      cautions.push({
        code: 'off-resonance',
        severity: 'info',
        message: `The tone lies ${formatQuantity(Math.abs(off), 'frequency')} ${off > 0 ? 'above' : 'below'} the small-signal resonance of ${formatQuantity(naturalFrequency, 'frequency', 4)}, more than half a bandwidth of the coil-open device.`,
        path: 'suspension',
      });
    }
  }
  if (response.openCircuitEmfPeak !== null && response.openCircuitEmfPeak > TOUCH_VOLTAGE_PEAK) {
    cautions.push({
      code: 'touch-voltage',
      severity: 'caution',
      message: `The open coil reaches ${formatQuantity(response.openCircuitEmfPeak, 'voltage')} peak, above the ${TOUCH_VOLTAGE_PEAK} V peak from which equipment standards ask for protection. A shock or drop gives more. Local codes and a competent person decide.`,
      path: 'coils',
    });
  }
  if (power.residual !== null && Math.abs(power.residual) > TRUSTED_RESIDUAL) {
    cautions.push({
      code: 'not-trustworthy',
      severity: 'stop',
      message: `The energy balance leaves ${(100 * Math.abs(power.residual)).toPrecision(3)} % of the mechanical power unexplained: this estimate is not to be trusted.`,
      path: null,
    });
  }
  if (!response.converged && response.method !== 'none') {
    cautions.push({
      code: 'not-converged',
      severity: 'stop',
      message: 'The solution did not converge: its figures are not to be relied on.',
      path: null,
    });
  }
  if (response.branches.filter((branch) => branch.stable === true).length > 1) {
    cautions.push({
      code: 'several-responses',
      severity: 'caution',
      message:
        'Several stable responses coexist: which one the device takes depends on how it got there. A knock can change it.',
      path: 'suspension',
    });
  }
  if (response.stopContact === true) {
    cautions.push({
      code: 'stop-contact',
      severity: 'info',
      message: 'The assembly strikes a stop. Wear, noise and loosening are not modelled.',
      path: 'stops',
    });
  }
  return cautions;
}

/** Everything that the person should know before relying on an estimate; worst first. */
export function cautionsOf(
  document: DesignDocument,
  estimate: Pick<Estimate, 'response' | 'power' | 'mechanics'>,
  facts: {
    readonly magnetMass: number;
    readonly rest: number;
    readonly toneFrequency: number | null;
    /** Coldest and hottest temperature to check the magnets at, °C. */
    readonly temperatures: readonly number[];
  },
): Caution[] {
  const all = [
    ...resultCautions(estimate, facts.toneFrequency),
    ...travelCautions(document, facts.rest, estimate.response.displacementPeak),
    ...clashCautions(document),
    ...coilCautions(document),
    ...magnetCautions(document, facts.temperatures),
    ...strayFieldCautions(document),
    ...suspensionCautions(document),
    ...massCautions(document, facts.magnetMass),
  ];
  const rank = { stop: 0, caution: 1, info: 2 } as const;
  return all.sort((a, b) => rank[a.severity] - rank[b.severity]);
}
