import { z } from 'zod';
import { route } from './route';

const Figure = z.number().nullable();
const Figures = z.array(z.number());

export const Caution = z.strictObject({
  code: z.string(),
  severity: z.enum(['info', 'caution', 'stop']),
  message: z.string(),
  path: z.string().nullable(),
});
export type Caution = z.infer<typeof Caution>;

/** Everything computed from one design document under one vibration. SI numbers; null where not computed (see notes). */
export const Estimate = z.strictObject({
  engine: z.string(),
  digest: z.string(),
  coil: z.strictObject({
    resistance: Figure,
    inductance: Figure,
    wireLength: Figure,
    fillFactor: Figure,
    copperMass: Figure,
    windable: z.boolean().nullable(),
  }),
  mechanics: z.strictObject({
    movingMass: Figure,
    restPosition: Figure,
    stiffness: Figure,
    cubic: Figure,
    naturalFrequency: Figure,
    dampingCoefficient: Figure,
    quality: Figure,
  }),
  curve: z.strictObject({
    position: Figures.optional(),
    fluxLinkage: Figures.optional(),
    coupling: Figures.optional(),
    couplingAtRest: Figure,
    couplingPeak: Figure,
    couplingPeakAt: Figure,
  }),
  response: z.strictObject({
    method: z.string(),
    converged: z.boolean(),
    openCircuitEmfRms: Figure,
    openCircuitEmfPeak: Figure,
    emfRms: Figure,
    loadVoltageRms: Figure,
    loadVoltageMean: Figure,
    coilCurrentRms: Figure,
    loadPower: Figure,
    displacementPeak: Figure,
    displacementRms: Figure,
    phase: Figure,
    harmonicDistortion: Figure,
    stopContact: z.boolean().nullable(),
    branches: z.array(z.strictObject({ displacementPeak: Figure, loadPower: Figure, stable: z.boolean().nullable() })),
  }),
  power: z.strictObject({
    mechanicalIn: Figure,
    load: Figure,
    coil: Figure,
    rectifier: Figure,
    converter: Figure,
    mechanicalLoss: Figure,
    stops: Figure,
    stored: Figure,
    residual: Figure,
  }),
  bounds: z.strictObject({
    resonant: Figure,
    travelLimited: Figure,
    broadband: Figure,
    effectiveness: Figure,
    normalisedPowerDensity: Figure,
    bestResistiveLoad: Figure,
    bestLoadPower: Figure,
  }),
  waveforms: z
    .strictObject({ time: Figures, displacement: Figures, emf: Figures, loadVoltage: Figures, coilCurrent: Figures })
    .nullable(),
  cautions: z.array(Caution),
  notes: z.array(z.string()),
});
export type Estimate = z.infer<typeof Estimate>;

/** Documents as typed (quantities with units) or canonical; the physics says what is wrong with them. */
export const EstimateRequest = z.strictObject({
  design: z.unknown(),
  vibration: z.unknown(),
  positions: z.array(z.number()).max(2001).optional(),
  quietArrays: z.boolean().optional(),
  /** Coldest and hottest temperature of the brief, °C: the magnets are checked there too. */
  temperatureRange: z.strictObject({ coldest: z.number(), hottest: z.number() }).optional(),
});
export type EstimateRequest = z.infer<typeof EstimateRequest>;

export const estimateRoutes = {
  estimate: route({
    method: 'post',
    path: '/estimates',
    summary: 'Estimate one design document under one vibration',
    allowed: 'signedIn',
    body: EstimateRequest,
    answer: Estimate,
  }),
};
