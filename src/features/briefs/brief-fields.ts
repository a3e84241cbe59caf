import type { BriefDocument } from '#contracts/briefs';
import { requirementQuantities } from '#contracts/requirement';
import type { Comparison, Requirement, RequirementQuantity, ShownBy } from '#contracts/requirement';
import { quantityParts, textInUnit } from '../../lib/quantities';
import type { Dimension } from '../../lib/quantities';
import { emptyVibration, vibrationFields } from './vibration-fields';
import type { VibrationFields } from './vibration-fields';

export interface RequirementFields {
  id: string;
  title: string;
  quantity: RequirementQuantity;
  comparison: Comparison;
  limit: string;
  shownBy: ShownBy;
}

/** A brief as it is typed: quantities are the texts of their fields. */
export interface BriefFields {
  title: string;
  machine: string;
  place: string;
  customerContact: string;
  vibration: VibrationFields;
  powerNeeded: string;
  loadNote: string;
  envelope: { shape: 'cylinder' | 'box'; diameter: string; length: string; size: [string, string, string] };
  massLimit: string;
  temperature: { lowest: string; highest: string };
  lifeCycles: string;
  orientation: BriefDocument['orientation'];
  requirements: RequirementFields[];
  notes: string;
}

/** Unit meant where none is typed, and the limits of the contract, per quantity of a brief. */
export const briefUnits = {
  powerNeeded: { dimension: 'power', unit: 'mW', least: 1e-9, most: 1e3 },
  length: { dimension: 'length', unit: 'mm', least: 1e-4, most: 2 },
  massLimit: { dimension: 'mass', unit: 'g', least: 1e-4, most: 100 },
  temperature: { dimension: 'temperature', unit: '°C', least: -100, most: 300 },
  lifeCycles: { dimension: 'number', unit: '', least: 1, most: 1e15 },
} as const satisfies Record<string, { dimension: Dimension; unit: string; least: number; most: number }>;

const handyUnits: Partial<Record<Dimension, string>> = {
  power: 'mW',
  voltage: 'V',
  length: 'mm',
  current: 'mA',
  resistance: 'Ω',
  frequency: 'Hz',
  mass: 'g',
};
/** Unit a writer most likely thinks in for a requirement's quantity. */
export const requirementUnit = (quantity: RequirementQuantity): string =>
  handyUnits[requirementQuantities[quantity].dimension] ?? '';

/** The unit that stands in a typed text, or '' where none does. */
export const unitInText = (text: string): string =>
  text
    .trim()
    .replace(/^[+−-]?(\d+\.?\d*|\.\d+)(?:[eE][+−-]?\d+)?(?:\s*[×x*·]\s*10\s*\^\s*[+−-]?\d+)?/, '')
    .trim();

/** A large count as people write it: 1e9 and not a row of zeros to count. */
const countText = (value: number): string => (value < 1e6 ? String(value) : value.toExponential().replace('e+', 'e'));

/** An SI value as somebody would type it, losing nothing: 0.0013 W is “1.3 mW”. */
export function typed(value: number | null, dimension: Dimension, unit?: string): string {
  if (value === null) return '';
  const own = unit ?? quantityParts(value, dimension).unit;
  return `${textInUnit(value, dimension, own)}${own === '' ? '' : ` ${own}`}`;
}

export const emptyRequirement = (): RequirementFields => ({
  id: crypto.randomUUID(),
  title: '',
  quantity: 'loadPower',
  comparison: 'atLeast',
  limit: '',
  shownBy: 'both',
});

export const emptyBrief = (): BriefFields => ({
  title: '',
  machine: '',
  place: '',
  customerContact: '',
  vibration: emptyVibration(),
  powerNeeded: '',
  loadNote: '',
  envelope: { shape: 'cylinder', diameter: '', length: '', size: ['', '', ''] },
  massLimit: '',
  temperature: { lowest: '-20 °C', highest: '60 °C' },
  lifeCycles: '',
  orientation: 'any',
  requirements: [{ ...emptyRequirement(), title: 'Power into the load' }],
  notes: '',
});

const requirementFields = ({
  id,
  title,
  quantity,
  comparison,
  limit,
  unit,
  shownBy,
}: Requirement): RequirementFields => ({
  id,
  title,
  quantity,
  comparison,
  limit: typed(limit, requirementQuantities[quantity].dimension, unit === '' ? undefined : unit),
  shownBy,
});

export function briefFields(document: BriefDocument): BriefFields {
  const { envelope } = document;
  const length = (value: number) => typed(value, 'length', 'mm');
  return {
    title: document.title,
    machine: document.machine,
    place: document.place,
    customerContact: document.customerContact,
    vibration: vibrationFields(document.vibration),
    powerNeeded: typed(document.powerNeeded, 'power'),
    loadNote: document.loadNote,
    envelope: {
      shape: envelope.shape,
      diameter: envelope.shape === 'cylinder' ? length(envelope.diameter) : '',
      length: envelope.shape === 'cylinder' ? length(envelope.length) : '',
      size:
        envelope.shape === 'box'
          ? [length(envelope.size[0]), length(envelope.size[1]), length(envelope.size[2])]
          : ['', '', ''],
    },
    massLimit: typed(document.massLimit, 'mass'),
    temperature: {
      lowest: typed(document.temperature.lowest, 'temperature'),
      highest: typed(document.temperature.highest, 'temperature'),
    },
    lifeCycles: document.lifeCycles === null ? '' : countText(document.lifeCycles),
    orientation: document.orientation,
    requirements: document.requirements.map(requirementFields),
    notes: document.notes,
  };
}
