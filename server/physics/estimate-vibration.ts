import type { Tone, Vibration } from './models/device';
import { meanSquareOf } from './models/vibration';
import type { VibrationDocument } from './vibration-document';

const toneOf = (part: { frequency: number; acceleration: number; as: 'peak' | 'rms'; phase: number }): Tone => ({
  frequency: part.frequency,
  acceleration: part.as === 'rms' ? part.acceleration * Math.SQRT2 : part.acceleration,
  phase: part.phase,
});

/** The vibration as the solvers take it: tones by their peak. */
export function vibrationOf(document: VibrationDocument): Vibration {
  switch (document.kind) {
    case 'tone':
      return { kind: 'tone', tone: toneOf(document) };
    case 'tones':
      return { kind: 'tones', tones: document.tones.map(toneOf) };
    case 'spectrum':
      return { kind: 'spectrum', points: document.points, duration: document.duration, seed: document.seed };
    case 'recording':
      return { kind: 'recording', rate: document.rate, acceleration: Float64Array.from(document.acceleration) };
  }
}

/** rms of the base acceleration, m/s². */
export function accelerationRms(vibration: Vibration): number {
  switch (vibration.kind) {
    case 'tone':
      return vibration.tone.acceleration / Math.SQRT2;
    case 'tones':
      return Math.sqrt(vibration.tones.reduce((sum, tone) => sum + tone.acceleration ** 2 / 2, 0));
    case 'spectrum':
      return Math.sqrt(meanSquareOf(vibration.points));
    case 'recording': {
      const samples = vibration.acceleration;
      let sum = 0;
      // Straight lines between samples: each contributes (a² + ab + b²)/3
      for (let index = 1; index < samples.length; index += 1) {
        const a = samples[index - 1] ?? 0;
        const b = samples[index] ?? 0;
        sum += (a * a + a * b + b * b) / 3;
      }
      return Math.sqrt(sum / (samples.length - 1));
    }
  }
}

/**
 * Excursion from rest that a linear oscillator would not exceed by much, m: sets how far the coupling is tabulated, and
 * nothing else.
 *
 * @param damping viscous coefficient, N s/m
 * @param stiffness small-signal, N/m
 */
export function likelyExcursion(vibration: Vibration, mass: number, damping: number, stiffness: number): number {
  const omega0 = Math.sqrt(stiffness / mass);
  const least = 1e-12;
  switch (vibration.kind) {
    case 'tone': {
      // c ω X ≤ m A holds for any steady motion at the frequency of the tone
      const { frequency, acceleration } = vibration.tone;
      return (mass * acceleration) / Math.max(least, damping * 2 * Math.PI * frequency);
    }
    case 'tones':
      return vibration.tones.reduce(
        (sum, tone) => sum + (mass * tone.acceleration) / Math.max(least, damping * 2 * Math.PI * tone.frequency),
        0,
      );
    case 'spectrum': {
      const density = Math.max(...vibration.points.map(([, value]) => value));
      return 6 * Math.sqrt((mass * mass * density) / Math.max(least, 4 * damping * stiffness));
    }
    case 'recording': {
      let peak = 0;
      for (const sample of vibration.acceleration) peak = Math.max(peak, Math.abs(sample));
      const cycles = (vibration.acceleration.length * omega0) / (2 * Math.PI * vibration.rate);
      const quality = Math.sqrt(stiffness * mass) / Math.max(least, damping);
      return (peak / (omega0 * omega0)) * (1 + Math.min(quality, Math.PI * cycles));
    }
  }
}
