import { randomUUID } from 'node:crypto';
import type { BriefDocument } from '#contracts/briefs';
import type { InstrumentCreate } from '#contracts/instruments';
import type { Comparison, Requirement, RequirementQuantity, ShownBy } from '#contracts/requirement';
import type { Role } from '#workflows/revision';

/** One password for the whole invented team; it is printed when the demonstration data is put in. */
export const demoPassword = 'seven magnets on a spring';

/** Invented people of an invented team, Fennmark Condition Monitoring. */
export const people = {
  maren: { name: 'Maren Tolk', roles: ['designer'] },
  idris: { name: 'Idris Vane', roles: ['designer', 'reviewer'] },
  sunniva: { name: 'Sunniva Oakes', roles: ['reviewer'] },
  bram: { name: 'Bram Teller', roles: ['bench'] },
  edda: { name: 'Edda Quill', roles: ['bench', 'reviewer'] },
  ottilie: { name: 'Ottilie Grane', roles: ['releaseAuthority'] },
  jonna: { name: 'Jonna Reyk', roles: ['designer', 'releaseAuthority'] },
  hale: { name: 'Hale Winter', roles: ['administrator'] },
  rafe: { name: 'Rafe Dunmore', roles: ['observer'] },
} satisfies Record<string, { name: string; roles: Role[] }>;
export type PersonKey = keyof typeof people;

export const addressOf = (key: PersonKey): string =>
  `${people[key].name.toLowerCase().replace(' ', '.')}@fennmark.example`;

/** Days are relative to the day on which the data is put in, so that the analyser is always just out of calibration. */
export const instruments = {
  analyser: {
    name: 'Power analyser',
    serial: 'PA-2041',
    location: 'Shaker room',
    dueInDays: 210,
    uncertainty: '0.4 % of reading + 0.1 % of range, k = 2',
  },
  meter: {
    name: 'Digital multimeter, 6½ digits',
    serial: 'DM-0917',
    location: 'Shaker room',
    dueInDays: 95,
    uncertainty: '0.01 % of reading, k = 2',
  },
  scope: {
    name: 'Oscilloscope, 200 MHz',
    serial: 'OS-3310',
    location: 'Bench 2',
    dueInDays: -9,
    uncertainty: '1.5 % of reading, k = 2',
  },
  accelerometer: {
    name: 'Reference accelerometer with amplifier',
    serial: 'AC-0118',
    location: 'Shaker room',
    dueInDays: 160,
    uncertainty: '0.8 % from 10 Hz to 1 kHz, k = 2',
  },
} satisfies Record<string, Omit<InstrumentCreate, 'calibrationDue'> & { dueInDays: number }>;
export type InstrumentKey = keyof typeof instruments;

const line = (
  quantity: RequirementQuantity,
  title: string,
  comparison: Comparison,
  limit: number,
  unit: string,
  shownBy: ShownBy,
): Requirement => ({ id: randomUUID(), title, quantity, comparison, limit, unit, shownBy });

const notes = 'Invented for demonstration: machine, place, survey and figures are made up.';
const shared = { customerContact: '', massLimit: 0.18, lifeCycles: null, orientation: 'any', notes } as const;

/** Briefs of the demonstration, with fresh ids for their requirements. */
export const briefs = (): Record<'feedPump' | 'circulationPump' | 'fan' | 'conveyor' | 'wagon', BriefDocument> => ({
  feedPump: {
    ...shared,
    title: 'Bearing watch, feed pump at 2 × 25 Hz',
    machine: 'Feed pump, two-pole motor on 50 Hz',
    place: 'Drive-end bearing housing, radial',
    vibration: { kind: 'tone', frequency: '50 Hz', acceleration: '1 m/s^2', as: 'peak' },
    powerNeeded: 1e-3,
    loadNote: 'Node sends once a minute; regulator takes 0.6 V and more',
    envelope: { shape: 'cylinder', diameter: 0.03, length: 0.06 },
    temperature: { lowest: 5, highest: 65 },
    requirements: [
      line('loadPower', 'Power into the load', 'atLeast', 1e-3, 'mW', 'both'),
      line('loadVoltageRms', 'Voltage at the load', 'atLeast', 0.8, 'V', 'both'),
      line('coilResistance', 'Coil resistance', 'atMost', 180, 'Ω', 'bench'),
      line('displacementPeak', 'Travel', 'atMost', 3e-3, 'mm', 'estimate'),
    ],
  },
  circulationPump: {
    ...shared,
    title: 'Bearing watch, circulation pump at 49 Hz',
    machine: 'Circulation pump, slip to 2940 rpm',
    place: 'Motor flange, axial',
    vibration: { kind: 'tone', frequency: '49 Hz', acceleration: '1.4 m/s^2', as: 'peak' },
    powerNeeded: 2e-3,
    loadNote: 'Sends every 20 s',
    envelope: { shape: 'cylinder', diameter: 0.03, length: 0.05 },
    temperature: { lowest: 0, highest: 70 },
    requirements: [
      line('loadPower', 'Power into the load', 'atLeast', 2e-3, 'mW', 'both'),
      line('naturalFrequency', 'Natural frequency, not below', 'atLeast', 48.5, 'Hz', 'bench'),
      line('naturalFrequency', 'Natural frequency, not above', 'atMost', 49.5, 'Hz', 'bench'),
    ],
  },
  fan: {
    ...shared,
    title: 'Bearing watch, supply-air fan at 24.5 Hz',
    machine: 'Supply-air fan, 1470 rpm',
    place: 'Bearing pedestal, vertical',
    vibration: { kind: 'tone', frequency: '24.5 Hz', acceleration: '0.06 g', as: 'rms' },
    powerNeeded: 1.8e-3,
    loadNote: 'Node with two temperature probes',
    envelope: { shape: 'box', size: [0.04, 0.04, 0.06] },
    temperature: { lowest: -10, highest: 50 },
    requirements: [
      line('loadPower', 'Power into the load', 'atLeast', 1.8e-3, 'mW', 'both'),
      line('displacementPeak', 'Travel', 'atMost', 4e-3, 'mm', 'both'),
    ],
  },
  conveyor: {
    ...shared,
    title: 'Bearing watch, screening conveyor at 15.8 Hz and its double',
    machine: 'Screening conveyor, two unbalance motors',
    place: 'Side plate above the rear spring',
    vibration: {
      kind: 'tones',
      tones: [
        { frequency: '15.8 Hz', acceleration: '1 m/s^2', as: 'peak' },
        { frequency: '31.6 Hz', acceleration: '0.4 m/s^2', as: 'peak' },
      ],
    },
    powerNeeded: 3.2e-3,
    loadNote: 'Node with accelerometer, sends spectra every 10 min',
    envelope: { shape: 'box', size: [0.06, 0.06, 0.09] },
    temperature: { lowest: -15, highest: 45 },
    requirements: [
      line('loadPower', 'Power into the load', 'atLeast', 3.2e-3, 'mW', 'both'),
      line('displacementPeak', 'Travel', 'atMost', 15e-3, 'mm', 'bench'),
    ],
  },
  wagon: {
    ...shared,
    title: 'Axle-box watch, freight wagon bogie',
    machine: 'Freight wagon, two-axle bogie',
    place: 'Axle-box cover',
    vibration: {
      kind: 'spectrum',
      points: [
        ['5 Hz', 0.002],
        ['20 Hz', 0.01],
        ['60 Hz', 0.01],
        ['200 Hz', 0.001],
      ],
      unit: 'g^2/Hz',
      duration: '10 s',
      seed: 7,
    },
    powerNeeded: 0.8e-3,
    loadNote: 'Reports position and bearing temperature every 15 min under way',
    envelope: { shape: 'cylinder', diameter: 0.05, length: 0.08 },
    massLimit: 0.4,
    temperature: { lowest: -25, highest: 60 },
    requirements: [
      line('loadPower', 'Power into the load, mean', 'atLeast', 0.8e-3, 'mW', 'both'),
      line('displacementPeak', 'Travel', 'atMost', 20e-3, 'mm', 'estimate'),
    ],
  },
});
export type BriefKey = keyof ReturnType<typeof briefs>;
