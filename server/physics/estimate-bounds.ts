import type { DesignDocument } from './design-document';
import type { PreparedDevice } from './estimate-device';
import type { Estimate } from './estimate-shape';
import { accelerationRms } from './estimate-vibration';
import {
  bestResistiveLoad,
  broadbandBound,
  normalisedPowerDensity,
  resonantBound,
  travelLimitedBound,
} from './models/bounds';
import type { DeviceResponse, Vibration } from './models/device';

/** Half of the travel between two stops, m; null where the travel has no limit on both sides. */
function travelAmplitude(document: DesignDocument): number | null {
  const { stops } = document;
  if (stops === null || stops.lower === null || stops.upper === null) return null;
  return (stops.upper - stops.lower) / 2;
}

/** Volume that encloses the coils and the magnets over their excursion: a cylinder, or a box in the across layout, m³. */
export function enclosingVolume(document: DesignDocument, rest: number, excursion: number): number {
  if (document.layout === 'through') {
    const ends: number[] = [];
    let diameter = 0;
    for (const magnet of document.magnets) {
      ends.push(rest + magnet.at - magnet.length / 2 - excursion, rest + magnet.at + magnet.length / 2 + excursion);
      diameter = Math.max(diameter, magnet.outerDiameter);
    }
    for (const coil of document.coils) {
      ends.push(coil.at - coil.length / 2, coil.at + coil.length / 2);
      diameter = Math.max(diameter, coil.outerDiameter);
    }
    return ((Math.PI * diameter ** 2) / 4) * (Math.max(...ends) - Math.min(...ends));
  }
  const low = [Infinity, Infinity, Infinity];
  const high = [-Infinity, -Infinity, -Infinity];
  const include = (at: readonly number[], size: readonly number[], shift: number, slack: number): void => {
    for (let side = 0; side < 3; side += 1) {
      const middle = (at[side] ?? 0) + (side === 0 ? shift : 0);
      const half = (size[side] ?? 0) / 2 + (side === 0 ? slack : 0);
      low[side] = Math.min(low[side] ?? 0, middle - half);
      high[side] = Math.max(high[side] ?? 0, middle + half);
    }
  };
  for (const magnet of document.magnets) include(magnet.at, magnet.size, rest, excursion);
  for (const coil of document.coils) {
    const width =
      coil.shape === 'round'
        ? coil.outerDiameter
        : coil.shape === 'racetrack'
          ? 2 * coil.outerEndRadius
          : coil.outer[0];
    const across =
      coil.shape === 'rectangular' ? coil.outer[1] : coil.shape === 'racetrack' ? width + coil.straight : width;
    include(coil.at, [width, across, coil.length], 0, 0);
  }
  return low.reduce((volume, value, side) => volume * ((high[side] ?? 0) - value), 1);
}

/** Bounds and best loads of an estimate; each null has its reason pushed onto `notes`. */
export function boundsOf(
  document: DesignDocument,
  prepared: PreparedDevice,
  vibration: Vibration,
  couplingAtRest: number,
  answer: DeviceResponse,
  notes: string[],
): Estimate['bounds'] {
  const { mass, damping, device } = prepared;
  const { loadPower, displacementPeak } = answer.response;
  const acceleration = vibration.kind === 'tone' ? vibration.tone.acceleration : null;
  let resonant: number | null = null;
  let travelLimited: number | null = null;
  if (vibration.kind === 'tone') {
    resonant = resonantBound(mass, vibration.tone.acceleration, damping);
    if (resonant === null) notes.push('The resonant bound is not computed, because there is no linear damping.');
    const travel = travelAmplitude(document);
    if (travel === null)
      notes.push('The travel-limited bound is not computed, because no stops limit the travel on both sides.');
    else travelLimited = travelLimitedBound(mass, vibration.tone.frequency, vibration.tone.acceleration, travel);
  } else {
    notes.push('The resonant and travel-limited bounds are not computed, because they hold for one tone.');
  }
  let broadband: number | null = null;
  if (vibration.kind === 'spectrum') {
    broadband = broadbandBound(mass, Math.max(...vibration.points.map(([, density]) => density)));
    notes.push('The broadband bound m G/4 takes the highest density of the spectrum for G.');
  } else {
    notes.push('The broadband bound is not computed, because it holds for a spectrum.');
  }
  const applies = [resonant, travelLimited, broadband].filter((bound) => bound !== null);
  const bound = applies.length > 0 ? Math.min(...applies) : null;
  const effectiveness = bound !== null && bound > 0 && loadPower !== null ? loadPower / bound : null;
  if (effectiveness === null)
    notes.push('Effectiveness is not computed, because no bound applies or no load power was computed.');
  const best = bestResistiveLoad(mass, acceleration ?? 1, damping, couplingAtRest, device.coilResistance);
  if (best === null) {
    notes.push(
      'The best resistive load is not computed, because it needs linear damping and coupling at the rest position.',
    );
  } else if (acceleration === null) {
    notes.push('The power at the best resistive load is not computed, because it holds for one tone.');
  }
  let density: number | null = null;
  if (loadPower !== null && displacementPeak !== null) {
    const volume = enclosingVolume(document, prepared.rest.restPosition, displacementPeak);
    density = normalisedPowerDensity(loadPower, volume, accelerationRms(vibration));
    notes.push(
      'Normalised power density takes the volume that encloses coils and moving magnets, and the rms acceleration.',
    );
  } else {
    notes.push('Normalised power density is not computed, because no load power was computed.');
  }
  return {
    resonant,
    travelLimited,
    broadband,
    effectiveness,
    normalisedPowerDensity: density,
    bestResistiveLoad: best?.resistance ?? null,
    bestLoadPower: acceleration === null ? null : (best?.power ?? null),
  };
}
