export interface ToneFields {
  frequency: string;
  acceleration: string;
  as: 'peak' | 'rms';
  phase: string;
}
export interface PointFields {
  frequency: string;
  density: string;
}
export const densityUnits = ['g^2/Hz', '(m/s^2)^2/Hz'] as const;
export type DensityUnit = (typeof densityUnits)[number];
export const densityUnitWords: Record<DensityUnit, string> = { 'g^2/Hz': 'g²/Hz', '(m/s^2)^2/Hz': '(m/s²)²/Hz' };

export interface SpectrumFields {
  points: PointFields[];
  unit: DensityUnit;
  duration: string;
  seed: string;
}

/** All kinds stay filled in while one is chosen, so that trying another loses nothing. */
export interface VibrationFields {
  kind: 'tone' | 'tones' | 'spectrum' | 'recording';
  tone: ToneFields;
  tones: ToneFields[];
  spectrum: SpectrumFields;
  /** A document that these fields cannot show (a recording) is handed on as it came. */
  kept: unknown;
}

export const emptyTone = (): ToneFields => ({ frequency: '', acceleration: '', as: 'peak', phase: '0 deg' });
export const emptyPoint = (): PointFields => ({ frequency: '', density: '' });

export const emptyVibration = (): VibrationFields => ({
  kind: 'tone',
  tone: emptyTone(),
  tones: [emptyTone(), emptyTone()],
  spectrum: { points: [emptyPoint(), emptyPoint()], unit: 'g^2/Hz', duration: '60 s', seed: '1' },
  kept: null,
});

const asRecord = (value: unknown): Record<string, unknown> =>
  value !== null && typeof value === 'object' ? (value as Record<string, unknown>) : {};

/** What stands in a vibration document, as text: strings as they were typed, numbers with their SI unit. */
function text(value: unknown, unit: string): string {
  if (typeof value === 'string') return value;
  if (typeof value !== 'number') return '';
  return unit === '' ? String(value) : `${Number(value.toPrecision(12))} ${unit}`;
}

const phaseText = (value: unknown): string =>
  typeof value === 'number' ? `${Number(((value * 180) / Math.PI).toPrecision(12))} deg` : text(value, '') || '0 deg';

function toneFields(value: unknown): ToneFields {
  const tone = asRecord(value);
  return {
    frequency: text(tone.frequency, 'Hz'),
    acceleration: text(tone.acceleration, 'm/s^2'),
    as: tone.as === 'rms' ? 'rms' : 'peak',
    phase: phaseText(tone.phase),
  };
}

/** The fields of a vibration document, typed or canonical. */
export function vibrationFields(document: unknown): VibrationFields {
  const empty = emptyVibration();
  const { kind, tones, points, unit, duration, seed } = asRecord(document);
  if (kind === 'tone') return { ...empty, kind, tone: toneFields(document) };
  if (kind === 'tones' && Array.isArray(tones)) return { ...empty, kind, tones: tones.map(toneFields) };
  if (kind === 'spectrum' && Array.isArray(points)) {
    const known = densityUnits.find((each) => each === unit) ?? '(m/s^2)^2/Hz';
    return {
      ...empty,
      kind,
      spectrum: {
        points: points.map((point: unknown) => {
          const [frequency, density] = Array.isArray(point) ? (point as unknown[]) : [];
          return { frequency: text(frequency, 'Hz'), density: text(density, '') };
        }),
        unit: known,
        duration: text(duration, 's') || empty.spectrum.duration,
        seed: text(seed, '') || empty.spectrum.seed,
      },
    };
  }
  return { ...empty, kind: 'recording', kept: document };
}
