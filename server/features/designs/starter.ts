import type { BriefDocument } from '#contracts/briefs';
import { designFormat } from '#physics/design-document';
import type { Deps } from '../../app';
import { mainTone } from '../briefs/reads';

/** The device that a new design starts from, at full size: a well-understood one, small enough for most places. */
const reference = { diameter: 0.022, length: 0.032, mass: 0.025, turns: 1000, magnet: 0.01, loadResistance: 800 };
const neodymiumDensity = 7500;

/** Room across and along the travel. */
function room({ envelope }: BriefDocument): { diameter: number; length: number } {
  if (envelope.shape === 'cylinder') return { diameter: envelope.diameter, length: envelope.length };
  const [least = 0, middle = 0, most = 0] = [...envelope.size].sort((a, b) => a - b);
  return { diameter: Math.min(least, middle), length: most };
}

/** Four figures are enough for a starting point, and read better. */
const round = (value: number): number => Number(value.toPrecision(4));
const millimetres = (value: number): string => `${round(value * 1000)} mm`;

/**
 * A starting point for a brief: the reference device, made smaller where the envelope asks for it, its spring tuned to the
 * strongest tone, its load matched to coil and damping, with stops where it would else reach the wall.
 */
export async function starterFor(
  { estimator, log }: Pick<Deps, 'estimator' | 'log'>,
  brief: BriefDocument,
  title: string,
): Promise<Record<string, unknown>> {
  const { diameter, length } = room(brief);
  const size = Math.min(1, diameter / reference.diameter, length / reference.length);
  const magnet = reference.magnet * size;
  const magnetMass = (Math.PI / 4) * magnet ** 3 * neodymiumDensity;
  // A spring assembly needs some mass besides its magnet; half of the limit is left for coil and housing.
  const mass = Math.max(1.2 * magnetMass, Math.min(reference.mass * size ** 3, (brief.massLimit ?? Infinity) / 2));
  // The magnet travels half of what the envelope leaves beside it, less a millimetre of wall at each end.
  const travel = Math.max((length - magnet) / 2 - 0.001, magnet / 10);
  const frequency = mainTone(brief.vibration) ?? 50;
  const document = (resistance: number, stopped: boolean): Record<string, unknown> => ({
    format: designFormat,
    title,
    layout: 'through',
    axisAngle: brief.orientation === 'vertical' ? '90 deg' : '0 deg',
    temperature: '20 degC',
    magnets: [
      {
        shape: 'cylinder',
        outerDiameter: millimetres(magnet),
        innerDiameter: '0 mm',
        length: millimetres(magnet),
        at: '0 mm',
        polarity: 1,
        material: 'NdFeB N42',
      },
    ],
    coils: [
      {
        shape: 'round',
        innerDiameter: millimetres(0.012 * size),
        outerDiameter: millimetres(0.018 * size),
        length: millimetres(0.006 * size),
        at: millimetres(-0.005567 * size),
        turns: Math.max(10, Math.floor((reference.turns * size ** 2) / 10) * 10),
        sense: 1,
        wire: 'IEC 0.100 grade 1',
      },
    ],
    movingMass: { total: `${round(mass * 1000)} g` },
    suspension: {
      kind: 'spring',
      stiffness: `${Number((mass * (2 * Math.PI * frequency) ** 2).toPrecision(8))} N/m`,
      cubic: 0,
      neutralAt: '0 mm',
    },
    damping: { quality: 150 },
    stops: stopped
      ? { lower: millimetres(-travel), upper: millimetres(travel), stiffness: '50 kN/m', damping: '2 N*s/m' }
      : null,
    circuit: { kind: 'resistor', resistance: `${round(resistance)} ohm` },
  });
  const first = document(reference.loadResistance, false);
  try {
    const { bounds, response } = await estimator.estimate({
      design: first,
      vibration: brief.vibration,
      quietArrays: true,
    });
    const reachesWall = response.displacementPeak === null || response.displacementPeak > travel;
    return document(bounds.bestResistiveLoad ?? reference.loadResistance, reachesWall);
  } catch (error) {
    // The design is a draft in any case; its page tells what keeps it from being estimated.
    log.warn({ err: error }, 'A starting point was not matched to its load');
    return first;
  }
}
