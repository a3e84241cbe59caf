import type { DesignDocument } from '../design-document';
import type { Caution } from '../estimate-shape';
import { formatQuantity } from '../quantity';
import { remembered } from '../remembered';
import type { Magnet } from './magnet';
import { operatingPoints } from './operating-point';
import { AIR_TRANSPORT, strayField } from './stray-field';

/** Share of the intrinsic coercivity taken as the knee: the curve bends before the coercivity itself is reached. */
export const KNEE_SHARE = 0.9;

const celsius = (temperature: number): string => formatQuantity(temperature, 'temperature');

/** Magnets in the coil's frame, which act on the moving ones and on the surroundings. */
const fixedMagnets = (document: DesignDocument): readonly Magnet[] =>
  document.suspension.kind === 'levitated' ? document.suspension.fixed : [];

/** Magnets too hot for their grade, or driven to their knee by themselves and their neighbours. */
export function magnetCautions(document: DesignDocument, temperatures: readonly number[]): Caution[] {
  const cautions: Caution[] = [];
  const hottest = Math.max(...temperatures);
  const points = temperatures.map((temperature) =>
    operatingPoints(document.magnets, temperature, document.recoil, fixedMagnets(document)),
  );
  document.magnets.forEach(({ material }, index) => {
    const path = `magnets.${index}.material`;
    if (hottest > material.maxTemperature) {
      cautions.push({
        code: 'magnet-temperature',
        severity: 'caution',
        message: `${celsius(hottest)} is above the highest working temperature of ${material.name}, ${celsius(material.maxTemperature)}.`,
        path: `${path}.maxTemperature`,
      });
    }
    const worst = temperatures
      .map((temperature, place) => ({ temperature, point: points[place]?.[index] }))
      .filter(({ point }) => (point?.reserve ?? 1) < 1 - KNEE_SHARE)
      .sort((a, b) => (a.point?.reserve ?? 0) - (b.point?.reserve ?? 0))[0];
    if (worst?.point) {
      const { demagnetisingField, coercivity, reserve } = worst.point;
      const beyond = (reserve ?? 0) < 0;
      cautions.push({
        code: 'demagnetisation',
        severity: beyond ? 'stop' : 'caution',
        message: `At ${celsius(worst.temperature)} a field of ${formatQuantity(demagnetisingField, 'fieldStrength')} acts against the magnet and ${beyond ? 'exceeds' : 'comes near'} its intrinsic coercivity of ${formatQuantity(coercivity, 'fieldStrength')}: it would lose magnetisation for good. Choose a longer shape or a grade of higher coercivity.`,
        path,
      });
    }
    if (points.some((at) => at[index]?.coercivity === null)) {
      cautions.push({
        code: 'coercivity-coefficient-unknown',
        severity: 'info',
        message: `The temperature coefficient of the coercivity of ${material.name} is not stated, so demagnetisation is checked at 20 °C only.`,
        path: `${path}.intrinsicCoercivityPerKelvin`,
      });
    }
  });
  return cautions;
}

interface Surroundings {
  readonly magnets: readonly Magnet[];
  readonly temperature: number;
  readonly recoil: boolean;
}

const strayFieldOf = remembered(
  ({ magnets, temperature, recoil }: Surroundings) => strayField(magnets, temperature, recoil),
  (surroundings) => JSON.stringify(surroundings),
);

/** How far the magnets reach: implants and media, and transport by air. */
export function strayFieldCautions(document: DesignDocument): Caution[] {
  const magnets = [...document.magnets, ...fixedMagnets(document)];
  const field = strayFieldOf({ magnets, temperature: document.temperature, recoil: document.recoil });
  const cautions: Caution[] = [];
  if (field.implantDistance) {
    cautions.push({
      code: 'implants',
      severity: 'info',
      message: `0.5 mT, the usual limit for pacemakers and other implants, is reached ${formatQuantity(field.implantDistance.fromMagnets, 'length', 2)} from the magnets. Strong magnets also pinch, shatter and wipe magnetic media.`,
      path: 'magnets',
    });
  }
  if (field.airTransport !== 'free') {
    const forbidden = field.airTransport === 'forbidden';
    const { free, accepted } = AIR_TRANSPORT;
    const here = forbidden ? field.fieldStrengthAtAccepted : field.fieldStrengthAtFree;
    const limit = forbidden ? accepted : free;
    cautions.push({
      code: 'air-transport',
      severity: 'caution',
      message: `Unshielded, the magnets make ${formatQuantity(here, 'fieldStrength')} at ${limit.distance} m, above the ${formatQuantity(limit.fieldStrength, 'fieldStrength')} from which ${forbidden ? 'aircraft do not take them' : 'they are magnetised material in air transport'}.`,
      path: 'magnets',
    });
  }
  return cautions;
}
