import { catalogueMagnet } from './catalogue';
import type { DesignDocument } from './design-document';

/** How far one input may be off: half-width of a rectangular distribution, in the input's own unit (SI). */
export interface Tolerance {
  /** Numbers of the canonical document that vary together, as paths. */
  readonly paths: readonly string[];
  readonly label: string;
  readonly value: number;
  /** ±, SI; for a list the relative part of every entry. */
  readonly halfWidth: number;
  /** Whether the half-width is relative to each value, as for a list. */
  readonly relative: boolean;
  /** Where the half-width comes from. */
  readonly basis: string;
}

interface Rule {
  readonly pattern: RegExp;
  readonly label: string;
  readonly halfWidth: (value: number) => number;
  readonly basis: string;
}

const share =
  (part: number) =>
  (value: number): number =>
    part * Math.abs(value);
const fixed = (size: number) => (): number => size;
const practice = 'workshop practice';

/** IEC 60317-0-1: thin wire is controlled by its resistance, thicker by its diameter. */
function wireHalfWidth(diameter: number): number {
  if (diameter <= 6.3e-5) return 0.05 * diameter;
  return diameter <= 2.24e-4 ? 3e-6 : 0.01 * diameter;
}

/** Default tolerances by kind of input; a user's own replace them. The first rule that fits a path holds. */
const rules: readonly Rule[] = [
  { pattern: /material\.remanence$/, label: 'remanence', halfWidth: share(0.015), basis: 'width of a grade' },
  {
    pattern: /(magnets|fixed)\.\d+\.(outerDiameter|length|size\.\d)$/,
    label: 'magnet size',
    halfWidth: fixed(5e-5),
    basis: practice,
  },
  { pattern: /(magnets|fixed)\.\d+\.at(\.\d)?$/, label: 'magnet place', halfWidth: fixed(1e-4), basis: practice },
  {
    pattern:
      /^coils\.\d+\.(innerDiameter|outerDiameter|length|straight|innerEndRadius|outerEndRadius|inner\.\d|outer\.\d)$/,
    label: 'winding size',
    halfWidth: fixed(1e-4),
    basis: practice,
  },
  { pattern: /^coils\.\d+\.at(\.\d)?$/, label: 'winding place', halfWidth: fixed(1e-4), basis: practice },
  { pattern: /^coils\.\d+\.turns$/, label: 'turns', halfWidth: share(0.005), basis: practice },
  { pattern: /^coils\.\d+\.wire\.diameter$/, label: 'wire diameter', halfWidth: wireHalfWidth, basis: 'IEC 60317-0-1' },
  { pattern: /^conductivity$/, label: 'conductivity', halfWidth: share(0.01), basis: '58 against 58.5 MS/m' },
  { pattern: /^movingMass\.(total|added)$/, label: 'moving mass', halfWidth: share(0.001), basis: 'weighed' },
  {
    pattern: /^suspension\.(stiffness|shearModulus)$/,
    label: 'stiffness',
    halfWidth: share(0.002),
    basis: 'resonance trimmed to 0.1 %',
  },
  { pattern: /^suspension\.cubic$/, label: 'cubic stiffness', halfWidth: share(0.1), basis: practice },
  { pattern: /^suspension\.neutralAt$/, label: 'neutral position', halfWidth: fixed(5e-5), basis: practice },
  {
    pattern: /^damping\.(quality|coefficient)$/,
    label: 'damping',
    halfWidth: share(0.1),
    basis: 'ring-down of a like device',
  },
  { pattern: /^damping\.quadratic$/, label: 'quadratic drag', halfWidth: share(0.2), basis: practice },
  { pattern: /^stops\.(lower|upper)$/, label: 'stop place', halfWidth: fixed(5e-5), basis: practice },
  { pattern: /^stops\.(stiffness|damping)$/, label: 'stop contact', halfWidth: share(0.2), basis: practice },
  { pattern: /^circuit\.(resistance|voltage)$/, label: 'load', halfWidth: share(0.01), basis: 'component tolerance' },
  {
    pattern: /^circuit\.inputResistance$/,
    label: 'converter input',
    halfWidth: share(0.03),
    basis: 'component tolerance',
  },
  { pattern: /^circuit\.efficiency$/, label: 'converter efficiency', halfWidth: share(0.02), basis: 'data sheet' },
  { pattern: /^circuit\.capacitance$/, label: 'capacitance', halfWidth: share(0.2), basis: 'component tolerance' },
  {
    pattern: /^circuit\.diode\.saturationCurrent$/,
    label: 'diode saturation current',
    halfWidth: share(0.5),
    basis: 'spread of parameter sets',
  },
  {
    pattern: /^circuit\.diode\.(emissionCoefficient)$/,
    label: 'diode emission coefficient',
    halfWidth: share(0.02),
    basis: 'spread of parameter sets',
  },
  { pattern: /^circuit\.diode\.drop$/, label: 'diode drop', halfWidth: share(0.1), basis: practice },
  {
    pattern: /^asMeasured\.coilResistance$/,
    label: 'coil resistance, measured',
    halfWidth: share(0.005),
    basis: 'hand meter',
  },
  {
    pattern: /^asMeasured\.coilInductance$/,
    label: 'coil inductance, measured',
    halfWidth: share(0.03),
    basis: 'hand meter',
  },
  { pattern: /^asMeasured\.coupling$/, label: 'coupling, measured', halfWidth: share(0.02), basis: 'bench practice' },
];

function numbersWithin(value: unknown, path: string, found: [string, number][]): void {
  if (typeof value === 'number') found.push([path, value]);
  else if (Array.isArray(value) && value.length > 60) return;
  else if (value !== null && typeof value === 'object') {
    for (const [key, one] of Object.entries(value)) numbersWithin(one, path === '' ? key : `${path}.${key}`, found);
  }
}

/** The width that the catalogue promises where the material is one of its grades, unchanged. */
function gradeHalfWidth(document: DesignDocument, path: string, value: number): number | undefined {
  const index = Number(/^magnets\.(\d+)\.material\.remanence$/.exec(path)?.[1] ?? NaN);
  const name = document.magnets[index]?.material.name;
  const entry = name === undefined ? undefined : catalogueMagnet(name);
  if (!entry || entry.material.remanence !== value) return undefined;
  return (entry.remanenceRange[1] - entry.remanenceRange[0]) / 2;
}

/**
 * Tolerances of all inputs of a document that have one: the defaults by kind, or the user's own.
 *
 * @param own half-widths by path, SI; 0 leaves an input out, a path without a default rule is taken too
 */
export function tolerancesOf(document: DesignDocument, own: Readonly<Record<string, number>> = {}): Tolerance[] {
  const found: [string, number][] = [];
  numbersWithin(document, '', found);
  const tolerances: Tolerance[] = [];
  const grades = new Map<string, number>();
  for (const [path, value] of found) {
    const rule = rules.find(({ pattern }) => pattern.test(path));
    const stated = own[path];
    const halfWidth = stated ?? gradeHalfWidth(document, path, value) ?? rule?.halfWidth(value) ?? 0;
    if (!(halfWidth > 0)) continue;
    const tolerance: Tolerance = {
      paths: [path],
      label: rule?.label ?? path,
      value,
      halfWidth,
      relative: false,
      basis: stated === undefined ? (rule?.basis ?? '') : 'stated',
    };
    // Magnets of one material come from one batch: their remanence is off together
    const material = /^(.*)\.remanence$/.exec(path)?.[1];
    if (material !== undefined && stated === undefined) {
      const name = `${materialName(document, material)} ${value}`;
      const known = grades.get(name);
      const earlier = known === undefined ? undefined : tolerances[known];
      if (known !== undefined && earlier) {
        tolerances[known] = { ...earlier, paths: [...earlier.paths, path] };
        continue;
      }
      grades.set(name, tolerances.length);
    }
    tolerances.push(tolerance);
  }
  const coupling = document.asMeasured.coupling;
  if (coupling !== null && typeof coupling === 'object') {
    const halfWidth = own['asMeasured.coupling'] ?? 0.02;
    if (halfWidth > 0) {
      tolerances.push({
        paths: coupling.coupling.map((_, index) => `asMeasured.coupling.coupling.${index}`),
        label: 'coupling, measured',
        value: 1,
        halfWidth,
        relative: true,
        basis: own['asMeasured.coupling'] === undefined ? 'bench practice' : 'stated',
      });
    }
  }
  return tolerances;
}

function materialName(document: DesignDocument, path: string): string {
  let value: unknown = document;
  for (const key of path.split('.')) value = (value as Record<string, unknown> | undefined)?.[key];
  return String((value as { name?: string } | undefined)?.name ?? '');
}

/** A copy of the document with each of the inputs moved by its shift (SI, or relative where the tolerance is). */
export function shifted(
  document: DesignDocument,
  shifts: readonly { readonly tolerance: Tolerance; readonly shift: number }[],
): DesignDocument {
  const copy = structuredClone(document);
  for (const { tolerance, shift } of shifts) {
    for (const path of tolerance.paths) {
      const keys = path.split('.');
      const last = keys.pop() ?? '';
      let target = copy as unknown as Record<string, unknown>;
      for (const key of keys) target = target[key] as Record<string, unknown>;
      const value = Number(target[last]);
      target[last] = tolerance.relative ? value * (1 + shift) : value + shift;
    }
  }
  return copy;
}
