import type { BriefDocument } from '#contracts/briefs';
import type { Estimate } from '#contracts/estimates';
import type { Instrument } from '#contracts/instruments';
import type { Requirement } from '#contracts/requirement';
import type { Revision } from '#contracts/revisions';
import type { Run } from '#contracts/runs';

/** Samples of answers, valid by their contracts; the tests change what they are about. */
export const idOf = (n: number): string => `00000000-0000-4000-8000-${String(n).padStart(12, '0')}`;
export const people = {
  designer: { id: idOf(1), name: 'Ilse Varga' },
  reviewer: { id: idOf(2), name: 'Bram Okafor' },
  bench: { id: idOf(3), name: 'Mei Lindqvist' },
};
const at = '2026-03-14T09:32:00.000Z';

export const powerRequirement: Requirement = {
  id: idOf(20),
  title: 'Power at 50 Hz',
  quantity: 'loadPower',
  comparison: 'atLeast',
  limit: 0.001,
  unit: 'mW',
  shownBy: 'both',
};

export const briefDocument: BriefDocument = {
  title: 'Pump-side node',
  machine: 'Circulation pump',
  place: 'Bearing housing',
  customerContact: '',
  vibration: { kind: 'tone', frequency: '50 Hz', acceleration: '1 m/s^2', as: 'peak' },
  powerNeeded: 0.001,
  loadNote: '',
  envelope: { shape: 'cylinder', diameter: 0.022, length: 0.04 },
  massLimit: null,
  temperature: { lowest: -20, highest: 60 },
  lifeCycles: null,
  orientation: 'any',
  requirements: [powerRequirement],
  notes: '',
};

export const digest = 'a1'.repeat(32);
export const revision: Revision = {
  id: idOf(10),
  letter: 'B',
  design: { id: idOf(11), number: 'FN-014', title: 'Pump-side node, 49 Hz' },
  brief: { id: idOf(12), number: 'BR-031', version: 1, document: briefDocument },
  state: 'inReview',
  version: 4,
  document: { format: 'tremolode-design/1', magnets: [{ length: 0.01, polarity: 1 }] },
  documentDigest: digest,
  documentIssues: [],
  estimate: null,
  digest,
  authors: [people.designer],
  createdAt: at,
  updatedAt: at,
  submittedAt: at,
  remarks: [],
  signatures: [],
  approvalsNeeded: 2,
  runs: [],
  continuedAs: null,
  continuedFrom: null,
  recordId: null,
  activity: [{ at, by: people.designer, sentence: 'Ilse Varga submitted revision B for review.' }],
  mayEdit: false,
  whyNotEdit: 'A submitted revision is frozen.',
  availableEvents: ['remark', 'approve', 'requestChanges'],
  whyNot: { closeRemark: 'No remark is open.', abandon: 'This needs the role designer or release authority.' },
};

export const instrument: Instrument = {
  id: idOf(30),
  number: 'IN-001',
  version: 1,
  name: 'Bench multimeter',
  serial: '4711',
  location: 'Bench 1',
  calibrationDue: '2027-01-31',
  inCalibration: true,
  uncertainty: '0.5 % of reading, k = 2',
};
export const overdueInstrument: Instrument = {
  ...instrument,
  id: idOf(31),
  number: 'IN-002',
  name: 'Power meter',
  calibrationDue: '2025-01-31',
  inCalibration: false,
};

export const run: Run = {
  id: idOf(40),
  number: 'RUN-007',
  state: 'open',
  result: null,
  startedAt: at,
  startedBy: people.bench,
  closedAt: null,
  revision: {
    id: revision.id,
    letter: 'B',
    version: 7,
    designId: revision.design.id,
    designNumber: 'FN-014',
    designTitle: revision.design.title,
    digest,
  },
  specimen: 'SN 0042',
  conditions: null,
  lines: [
    {
      requirement: powerRequirement,
      estimated: 0.0013,
      measured: null,
      readings: 0,
      margin: null,
      verdict: 'notComputed',
    },
  ],
  readings: [],
  statement: null,
  stopReason: null,
  mayRecord: true,
  whyNotRecord: null,
  availableEvents: ['stopRun'],
  whyNot: { signResult: 'Still without a reading: Power at 50 Hz.' },
};

export const estimate: Estimate = {
  engine: '1.0.0',
  digest,
  coil: { resistance: 103, inductance: 0.0137, wireLength: 47, fillFactor: 0.436, copperMass: 0.0033, windable: true },
  mechanics: {
    movingMass: 0.025,
    restPosition: 0,
    stiffness: 2467,
    cubic: 0,
    naturalFrequency: 50,
    dampingCoefficient: 0.0524,
    quality: 150,
  },
  curve: { couplingAtRest: -6.06, couplingPeak: 6.06, couplingPeakAt: -0.0111 },
  response: {
    method: 'phasors',
    converged: true,
    openCircuitEmfRms: 2.05,
    openCircuitEmfPeak: 2.9,
    emfRms: 1.15,
    loadVoltageRms: 1.02,
    loadVoltageMean: null,
    coilCurrentRms: 0.00127,
    loadPower: 0.0013,
    displacementPeak: 0.00086,
    displacementRms: 0.00061,
    phase: -1.57,
    harmonicDistortion: 0,
    stopContact: false,
    branches: [],
  },
  power: {
    mechanicalIn: 0.003,
    load: 0.0013,
    coil: 0.00017,
    rectifier: 0,
    converter: 0,
    mechanicalLoss: 0.0015,
    stops: 0,
    stored: 0,
    residual: 1e-9,
  },
  bounds: {
    resonant: 0.0015,
    travelLimited: null,
    broadband: null,
    effectiveness: 0.87,
    normalisedPowerDensity: null,
    bestResistiveLoad: 804,
    bestLoadPower: 0.0013,
  },
  waveforms: null,
  cautions: [],
  notes: [],
};
