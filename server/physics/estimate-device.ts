import type { CylinderMagnet, DesignDocument } from './design-document';
import { DocumentError } from './document-error';
import { likelyExcursion } from './estimate-vibration';
import { constantCoupling, measuredCoupling, tableOfLinkage, linkageOfDesign } from './models/coupling';
import type { CouplingTable } from './models/coupling';
import type { Circuit, Device, Diode, Vibration } from './models/device';
import { thermalVoltage } from './models/diode';
import { fitIssues } from './models/fit-check';
import type { Linkage } from './models/linkage';
import { suspensionOnCurve, tabulatedForce } from './models/force-curve';
import { movingSpringMass, springRate } from './models/helical-spring';
import { inductanceOfCoils } from './models/inductance';
import { levitationOfDesign } from './models/levitation';
import type { Levitation } from './models/levitation';
import { volumeOf } from './models/magnetisation';
import { NoRestError, springSuspension } from './models/suspension';
import type { RestingSuspension } from './models/suspension';
import { remembered } from './remembered';

/** What the magnets of the moving assembly weigh, kg. */
export function magnetMass(document: DesignDocument): number {
  let mass = 0;
  for (const magnet of document.magnets) mass += magnet.material.density * volumeOf(magnet);
  return mass;
}

/** Mass in the equation of motion: the assembly, and a third of what a helical spring weighs (Rayleigh), kg. */
export function movingMassOf(document: DesignDocument): number {
  const own =
    'total' in document.movingMass ? document.movingMass.total : document.movingMass.added + magnetMass(document);
  const { suspension } = document;
  return suspension.kind === 'helical' ? own + movingSpringMass(suspension, suspension.springs) : own;
}

/** Rest between fixed magnets, in the shape of the other suspensions. */
function levitatedSuspension(
  document: DesignDocument,
  fixed: readonly CylinderMagnet[],
  mass: number,
): RestingSuspension {
  let found: Levitation;
  try {
    found = levitationOfDesign(document, fixed, mass);
  } catch (error) {
    // The model's word for a moving magnet that stands in a fixed one
    if (error instanceof RangeError) throw new NoRestError(error.message);
    throw error;
  }
  if (!found.found) throw new NoRestError(found.reason);
  return {
    restPosition: found.rest.position,
    stiffness: found.rest.stiffness,
    cubic: found.rest.cubic,
    suspension: found.suspension,
  };
}

/** Farthest position that a document takes, m. */
const farthest = 10;

function suspensionOf(document: DesignDocument, mass: number): RestingSuspension {
  const { suspension, axisAngle } = document;
  switch (suspension.kind) {
    case 'spring': {
      const { stiffness, cubic, neutralAt } = suspension;
      // Below the last bit of the linear force over all the travel that a document can have, it is nothing
      const felt = Math.abs(cubic) * farthest ** 2 > Number.EPSILON * Math.abs(stiffness);
      return springSuspension({ stiffness, cubic: felt ? cubic : 0, neutralAt }, mass, axisAngle);
    }
    case 'helical': {
      const stiffness = suspension.springs * springRate(suspension);
      return springSuspension({ stiffness, cubic: 0, neutralAt: suspension.neutralAt }, mass, axisAngle);
    }
    case 'table':
      return suspensionOnCurve(tabulatedForce(suspension.displacement, suspension.force), mass, axisAngle);
    case 'levitated':
      return levitatedSuspension(document, suspension.fixed, mass);
  }
}

/** The suspension at its rest position under gravity; a device without a stable one is a bad document. */
function restingSuspension(document: DesignDocument, mass: number): RestingSuspension {
  try {
    return suspensionOf(document, mass);
  } catch (error) {
    if (!(error instanceof NoRestError)) throw error;
    throw new DocumentError([
      { path: 'suspension', value: document.suspension.kind, message: error.message, document: 'design' },
    ]);
  }
}

/** Viscous coefficient, N s/m: as stated, or c = √(k m)/Q at the rest position. */
function dampingOf(document: DesignDocument, stiffness: number, mass: number): number {
  const { damping } = document;
  return 'quality' in damping ? Math.sqrt(stiffness * mass) / damping.quality : damping.coefficient;
}

type DocumentCircuit = DesignDocument['circuit'];
type DocumentDiode = Extract<DocumentCircuit, { kind: 'bridge' }>['diode'];

function diodeOf(diode: DocumentDiode): Diode {
  if ('drop' in diode) return { kind: 'drop', drop: diode.drop };
  return {
    kind: 'shockley',
    saturationCurrent: diode.saturationCurrent,
    emissionCoefficient: diode.emissionCoefficient,
    seriesResistance: diode.seriesResistance,
    thermalVoltage: thermalVoltage(diode.temperature),
  };
}

function circuitOf(circuit: DocumentCircuit): Circuit {
  if (circuit.kind === 'resistor') return circuit;
  return { ...circuit, diode: diodeOf(circuit.diode) };
}

/** Only the windings' shapes decide: asked anew for every load and every tone, answered once. */
const inductanceOf = remembered(
  (document: DesignDocument) => inductanceOfCoils(document),
  ({ layout, coils }) => JSON.stringify([layout, coils]),
);

/** How far from rest the coupling can matter at all: several times the length of everything, m. */
function couplingReach(document: DesignDocument, rest: number): number {
  let reach = 0;
  let size = 0;
  if (document.layout === 'through') {
    for (const magnet of document.magnets) {
      size = Math.max(size, magnet.length, magnet.outerDiameter);
      for (const coil of document.coils) {
        size = Math.max(size, coil.length, coil.outerDiameter);
        reach = Math.max(reach, Math.abs(rest + magnet.at - coil.at) + (magnet.length + coil.length) / 2);
      }
    }
  } else {
    for (const magnet of document.magnets) {
      size = Math.max(size, ...magnet.size);
      for (const coil of document.coils) {
        const width =
          coil.shape === 'round'
            ? coil.outerDiameter
            : coil.shape === 'racetrack'
              ? 2 * coil.outerEndRadius
              : coil.outer[0];
        size = Math.max(size, width);
        reach = Math.max(reach, Math.abs(rest + magnet.at[0] - coil.at[0]) + (magnet.size[0] + width) / 2);
      }
    }
  }
  return reach + size;
}

/** A device ready for the solvers, with what the estimate reports besides. */
export interface PreparedDevice {
  readonly device: Device;
  readonly rest: RestingSuspension;
  readonly mass: number;
  readonly damping: number;
  /** The modelled linkage; null where a measured coupling takes its place. */
  readonly linkage: Linkage | null;
  /** Distance from rest beyond which the coupling has died away, m. */
  readonly reach: number;
}

/** Half-width about rest over which the coupling is tabulated, m. */
function tabulatedHalfWidth(document: DesignDocument, likely: number, rest: RestingSuspension, reach: number): number {
  const stops = document.stops;
  const wells = rest.suspension.equilibria.reduce((most, u) => Math.max(most, Math.abs(u)), 0);
  const free = Math.min(1.3 * likely + 2.5 * wells, reach);
  const contact = Math.max(
    stops?.upper === null || stops === null ? Infinity : stops.upper - rest.restPosition,
    stops?.lower === null || stops === null ? Infinity : rest.restPosition - stops.lower,
  );
  // Into a stop the motion goes on for a little
  return Math.max(Math.min(free, 1.5 * contact + 1e-4), reach / 200);
}

function couplingOf(document: DesignDocument, linkage: Linkage | null, from: number, to: number): CouplingTable {
  const measured = document.asMeasured.coupling;
  if (linkage) return tableOfLinkage(linkage, from, to);
  if (typeof measured === 'number' || measured === null) return constantCoupling(measured ?? 0);
  return measuredCoupling(measured.position, measured.coupling);
}

/**
 * Puts a device together from its document.
 *
 * @param coilResistance of all coils in series, as computed or measured (Ω)
 * @throws DocumentError where the parts do not fit, or the device has no stable rest position
 */
export function prepareDevice(document: DesignDocument, vibration: Vibration, coilResistance: number): PreparedDevice {
  const mass = movingMassOf(document);
  const rest = restingSuspension(document, mass);
  const misfits = fitIssues(document, rest.restPosition);
  if (misfits.length > 0) throw new DocumentError(misfits.map((issue) => ({ ...issue, document: 'design' })));
  const damping = dampingOf(document, rest.stiffness, mass);
  const linkage = document.asMeasured.coupling === null ? linkageOfDesign(document) : null;
  const reach = couplingReach(document, rest.restPosition);
  const likely = likelyExcursion(vibration, mass, damping, rest.stiffness);
  const half = tabulatedHalfWidth(document, likely, rest, reach);
  return {
    device: {
      mass,
      damping,
      quadraticDrag: document.damping.quadratic,
      suspension: rest.suspension,
      restPosition: rest.restPosition,
      stops: document.stops,
      coupling: couplingOf(document, linkage, rest.restPosition - half, rest.restPosition + half),
      coilResistance,
      coilInductance: document.asMeasured.coilInductance ?? inductanceOf(document),
      circuit: circuitOf(document.circuit),
    },
    rest,
    mass,
    damping,
    linkage,
    reach,
  };
}
