import { readDesignDocument } from './design-document';
import type { DesignDocument } from './design-document';
import { digestOfInputs } from './digest';
import { DocumentError } from './document-error';
import type { DocumentIssue } from './document-error';
import { engineVersion } from './engine';
import { boundsOf } from './estimate-bounds';
import { curveOf, shownPositions } from './estimate-curve';
import { magnetMass, prepareDevice } from './estimate-device';
import type { Estimate } from './estimate-shape';
import { vibrationOf } from './estimate-vibration';
import { cautionsOf } from './models/cautions';
import { respond } from './models/response';
import { windingsOf } from './models/winding';
import type { Windings } from './models/winding';
import { readVibrationDocument } from './vibration-document';
import type { VibrationDocument } from './vibration-document';

export { DocumentError } from './document-error';
export type { DocumentIssue } from './document-error';
export type { Estimate } from './estimate-shape';

/** Most positions of a coupling curve. */
export const mostPositions = 20_001;

export interface EstimateOptions {
  /** Positions at which the curve is evaluated, m. */
  readonly positions?: Float64Array | readonly number[];
  /** False leaves curve and waveforms out. */
  readonly arrays?: boolean;
  /** Coldest and hottest temperature of the brief, °C; the magnets are checked there too. */
  readonly temperatureRange?: { readonly coldest: number; readonly hottest: number };
}

/** Positions as asked for; wrong ones are errors of the request. */
function readPositions(positions: Float64Array | readonly number[]): Float64Array {
  const issue = (path: string, value: string | number, message: string, limit?: number): DocumentError =>
    new DocumentError([{ path, value, message, ...(limit === undefined ? {} : { limit }) }]);
  if (!Array.isArray(positions) && !(positions instanceof Float64Array)) {
    throw issue('positions', typeof positions, 'must be a list of positions in metres');
  }
  if (positions.length > mostPositions) {
    throw issue('positions', positions.length, `at most ${mostPositions} positions are taken`, mostPositions);
  }
  positions.forEach((value: unknown, index: number) => {
    if (typeof value !== 'number' || !(Math.abs(value) <= 10)) {
      throw issue(`positions.${index}`, String(value), 'must be a number of metres between −10 and 10', 10);
    }
  });
  return Float64Array.from(positions);
}

/** Replaces what JSON cannot carry by null and says so once. */
function withoutInfinities<Part extends object>(part: Part, name: string, notes: string[]): Part {
  const clean: Record<string, unknown> = {};
  for (const [key, value] of Object.entries(part)) {
    const bad = typeof value === 'number' && !Number.isFinite(value);
    if (bad) notes.push(`${name}.${key} is not computed, because the computation gave no finite number.`);
    clean[key] = bad ? null : value;
  }
  return clean as Part;
}

function windingNotes(windings: Windings): string[] {
  return windings.coils.map(
    ({ fit }, index) =>
      `coils.${index} takes ${fit.turnsPerLayer} turns a layer: ${fit.layersSquare} layers square (${fit.turnsSquare} turns), ${fit.layersOrthocyclic} orthocyclic (${fit.turnsOrthocyclic} turns).`,
  );
}

/** The estimate of documents that are already in canonical form. */
export function estimateCanonical(
  design: DesignDocument,
  vibrationDocument: VibrationDocument,
  options: EstimateOptions = {},
): Estimate {
  const positions = options.positions === undefined ? null : readPositions(options.positions);
  const arrays = options.arrays ?? true;
  const vibration = vibrationOf(vibrationDocument);
  const windings = windingsOf(design.coils, design.conductivity, design.temperature);
  const resistance = design.asMeasured.coilResistance ?? windings.resistance;
  const prepared = prepareDevice(design, vibration, resistance);
  const answer = respond(prepared.device, vibration);
  const notes = [...answer.notes];
  const curve = curveOf(
    prepared,
    positions ?? (arrays ? shownPositions(prepared, answer.response.displacementPeak) : new Float64Array(0)),
    positions !== null,
  );
  const { mass, damping, rest } = prepared;
  const mechanics: Estimate['mechanics'] = {
    movingMass: mass,
    restPosition: rest.restPosition,
    stiffness: rest.stiffness,
    cubic: rest.cubic,
    naturalFrequency: Math.sqrt(rest.stiffness / mass) / (2 * Math.PI),
    dampingCoefficient: damping,
    quality: damping > 0 ? Math.sqrt(rest.stiffness * mass) / damping : null,
  };
  if (damping === 0) notes.push('Quality is not computed, because there is no linear damping.');
  const bounds = boundsOf(design, prepared, vibration, curve.couplingAtRest, answer, notes);
  notes.push(...windingNotes(windings));
  const response = withoutInfinities(answer.response, 'response', notes);
  const power = withoutInfinities(answer.power, 'power', notes);
  const { waveforms } = answer;
  return {
    engine: engineVersion,
    digest: digestOfInputs(design, vibrationDocument),
    coil: {
      resistance,
      inductance: prepared.device.coilInductance,
      wireLength: windings.wireLength,
      fillFactor: windings.fillFactor,
      copperMass: windings.copperMass,
      windable: windings.windable,
    },
    mechanics: withoutInfinities(mechanics, 'mechanics', notes),
    curve: {
      ...(arrays
        ? {
            position: Array.from(curve.position),
            fluxLinkage: Array.from(curve.fluxLinkage),
            coupling: Array.from(curve.coupling),
          }
        : {}),
      couplingAtRest: curve.couplingAtRest,
      couplingPeak: curve.couplingPeak,
      couplingPeakAt: curve.couplingPeakAt,
    },
    response,
    power,
    bounds: withoutInfinities(bounds, 'bounds', notes),
    waveforms:
      arrays && waveforms
        ? {
            time: Array.from(waveforms.time),
            displacement: Array.from(waveforms.displacement),
            emf: Array.from(waveforms.emf),
            loadVoltage: Array.from(waveforms.loadVoltage),
            coilCurrent: Array.from(waveforms.coilCurrent),
          }
        : null,
    cautions: cautionsOf(
      design,
      { response, power, mechanics },
      {
        magnetMass: magnetMass(design),
        rest: rest.restPosition,
        toneFrequency: vibration.kind === 'tone' ? vibration.tone.frequency : null,
        temperatures: [
          ...new Set([
            design.temperature,
            ...(options.temperatureRange ? [options.temperatureRange.coldest, options.temperatureRange.hottest] : []),
          ]),
        ],
      },
    ),
    notes,
  };
}

/**
 * The one door of the physics: two documents in, one estimate out. A pure function: the same documents give the same
 * estimate, bit for bit.
 *
 * @param design a design document, quantities as SI numbers or texts with units
 * @param vibration a vibration document
 * @throws DocumentError naming path, value, message and limit of everything that is wrong with the documents
 */
export function estimate(design: unknown, vibration: unknown, options: EstimateOptions = {}): Estimate {
  const designReading = readDesignDocument(design);
  const vibrationReading = readVibrationDocument(vibration);
  const issues: DocumentIssue[] = [];
  if (!designReading.ok)
    issues.push(...designReading.issues.map((issue) => ({ ...issue, document: 'design' as const })));
  if (!vibrationReading.ok) {
    issues.push(...vibrationReading.issues.map((issue) => ({ ...issue, document: 'vibration' as const })));
  }
  if (!designReading.ok || !vibrationReading.ok) throw new DocumentError(issues);
  return estimateCanonical(designReading.document, vibrationReading.document, options);
}
