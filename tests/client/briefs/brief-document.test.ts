import { describe, expect, it } from 'vitest';
import { BriefDocument } from '#contracts/briefs';
import { briefFieldName, readBrief } from '../../../src/features/briefs/brief-document';
import { briefFields, emptyBrief, typed, unitInText } from '../../../src/features/briefs/brief-fields';
import type { BriefFields } from '../../../src/features/briefs/brief-fields';
import { readPastedPoints, readVibration } from '../../../src/features/briefs/vibration-document';
import { emptyVibration, vibrationFields } from '../../../src/features/briefs/vibration-fields';
import { briefDocument, idOf } from '../../support/client-samples';

const pathsOf = (reading: Awaited<ReturnType<typeof readBrief>>) =>
  reading.ok ? [] : reading.issues.map(({ path }) => path);
const complete = (): BriefFields => briefFields(briefDocument);

describe('a brief as it is typed', () => {
  it('goes into fields and back without losing anything', async () => {
    const full: BriefDocument = {
      ...briefDocument,
      envelope: { shape: 'box', size: [0.04, 0.03, 0.0225] },
      massLimit: 0.12,
      lifeCycles: 1e9,
      temperature: { lowest: -40, highest: 85 },
      requirements: [
        ...briefDocument.requirements,
        {
          id: idOf(21),
          title: 'Travel',
          quantity: 'displacementPeak',
          comparison: 'atMost',
          limit: 0.004,
          unit: 'mm',
          shownBy: 'estimate',
        },
        {
          id: idOf(22),
          title: 'Q',
          quantity: 'quality',
          comparison: 'atLeast',
          limit: 150,
          unit: '',
          shownBy: 'bench',
        },
      ],
    };
    expect(BriefDocument.parse(full)).toEqual(full);
    expect(await readBrief(briefFields(full))).toEqual({ ok: true, document: full });
  });

  it('understands what an engineer types, and keeps the unit of a limit for showing', async () => {
    const fields = complete();
    fields.powerNeeded = '1.3 mW';
    fields.envelope = { shape: 'cylinder', diameter: '0.875 in', length: '1.2e-2 m', size: ['', '', ''] };
    fields.massLimit = '2 oz';
    fields.temperature = { lowest: '-4 degF', highest: '333.15 K' };
    const [first] = fields.requirements;
    if (first) fields.requirements = [{ ...first, limit: '1300 µW' }];
    const reading = await readBrief(fields);
    if (!reading.ok) throw new Error(JSON.stringify(reading.issues));
    const { document } = reading;
    expect(document.powerNeeded).toBe(0.0013);
    expect(document.envelope).toEqual({ shape: 'cylinder', diameter: 0.022225, length: 0.012 });
    expect(document.massLimit).toBeCloseTo(0.056699, 6);
    expect(document.temperature.lowest).toBeCloseTo(-20, 10);
    expect(document.temperature.highest).toBeCloseTo(60, 10);
    expect(document.requirements[0]).toMatchObject({ limit: 0.0013, unit: 'µW' });
  });

  it('takes a bare number in the unit that the field shows', async () => {
    const fields = { ...complete(), powerNeeded: '2', massLimit: '120' };
    const reading = await readBrief(fields);
    expect(reading.ok && [reading.document.powerNeeded, reading.document.massLimit]).toEqual([0.002, 0.12]);
  });

  it('works out sums', async () => {
    const fields = complete();
    fields.envelope.diameter = '2*(10 mm + 0.5 mm)';
    const reading = await readBrief(fields);
    expect(reading.ok && reading.document.envelope).toEqual({ shape: 'cylinder', diameter: 0.021, length: 0.04 });
  });

  it('names everything that is missing in an empty brief at once, at the fields', async () => {
    const paths = pathsOf(await readBrief(emptyBrief()));
    expect(paths).toEqual(
      expect.arrayContaining([
        'title',
        'vibration.tone.frequency',
        'vibration.tone.acceleration',
        'powerNeeded',
        'envelope.diameter',
        'envelope.length',
        'requirements.0.limit',
      ]),
    );
    expect(new Set(paths).size).toBe(paths.length);
  });

  it('names value and limit', async () => {
    const fields = complete();
    fields.envelope.diameter = '3 m';
    fields.powerNeeded = '1,5 mW';
    const reading = await readBrief(fields);
    if (reading.ok) throw new Error('This must be refused.');
    const messages = Object.fromEntries(reading.issues.map(({ path, message }) => [path, message]));
    expect(messages['envelope.diameter']).toBe(
      '3\u2009000 mm is above the limit of 2000 mm.'.replace('3\u2009000', '3000'),
    );
    expect(messages.powerNeeded).toContain('1.5 mW');
  });

  it('refuses temperatures in the wrong order at the field of the highest', async () => {
    const fields = complete();
    fields.temperature = { lowest: '60 °C', highest: '-20 °C' };
    expect(pathsOf(await readBrief(fields))).toEqual(['temperature.highest']);
  });

  it('writes SI values as somebody would type them', () => {
    expect(typed(0.0013, 'power')).toBe('1.3 mW');
    expect(typed(0.022225, 'length', 'mm')).toBe('22.225 mm');
    expect(typed(null, 'mass')).toBe('');
    expect(unitInText('-1.5e-3 mV')).toBe('mV');
    expect(unitInText('12')).toBe('');
  });
});

describe('the vibration of a brief', () => {
  it('keeps the typed text of tones in the document', async () => {
    const tone = { frequency: '49.5', acceleration: '0.5 g', as: 'rms', phase: '0 deg' } as const;
    const { document, issues } = await readVibration({ ...emptyVibration(), tone });
    expect(issues).toEqual([]);
    expect(document).toEqual({ kind: 'tone', frequency: '49.5 Hz', acceleration: '0.5 g', as: 'rms' });
    expect(vibrationFields(document)).toMatchObject({
      kind: 'tone',
      tone: { frequency: '49.5 Hz', acceleration: '0.5 g', as: 'rms' },
    });
  });

  it('reads canonical numbers back with their units', () => {
    const fields = vibrationFields({
      kind: 'tones',
      tones: [{ frequency: 50, acceleration: 9.80665, as: 'peak', phase: Math.PI / 2 }],
    });
    expect(fields.tones).toEqual([{ frequency: '50 Hz', acceleration: '9.80665 m/s^2', as: 'peak', phase: '90 deg' }]);
  });

  it('states densities in the unit chosen, whatever unit one of them was typed in', async () => {
    const spectrum = {
      points: [
        { frequency: '10', density: '0.015' },
        { frequency: '0.2 kHz', density: '9.61703842225 (m/s^2)^2/Hz' },
      ],
      unit: 'g^2/Hz' as const,
      duration: '60',
      seed: '1',
    };
    const { document, issues } = await readVibration({ ...emptyVibration(), kind: 'spectrum', spectrum });
    expect(issues).toEqual([]);
    expect(document).toEqual({
      kind: 'spectrum',
      points: [
        [10, 0.015],
        [200, expect.closeTo(0.1, 12)],
      ],
      unit: 'g^2/Hz',
      duration: '60 s',
      seed: 1,
    });
  });

  it('refuses frequencies that do not rise, and a seed that is no whole number', async () => {
    const points = [
      { frequency: '100', density: '1' },
      { frequency: '50', density: '1' },
    ];
    const spectrum = { points, unit: 'g^2/Hz' as const, duration: '60 s', seed: '1.5' };
    const { issues } = await readVibration({ ...emptyVibration(), kind: 'spectrum', spectrum });
    expect(issues.map(({ path }) => path)).toEqual([
      'vibration.spectrum.points.1.frequency',
      'vibration.spectrum.seed',
    ]);
  });

  it('hands a recording on as it came', async () => {
    const recording = { kind: 'recording', rate: '1 kHz', unit: 'g', acceleration: [0, 1] };
    expect((await readVibration(vibrationFields(recording))).document).toBe(recording);
  });

  it('takes pasted points and says what it left out', () => {
    const pasted = 'f / Hz\tG\n10\t0.015\n20; 0.02\n40, 0.04\n80 0.08\n';
    expect(readPastedPoints(pasted)).toEqual({
      points: [
        { frequency: '10', density: '0.015' },
        { frequency: '20', density: '0.02' },
        { frequency: '40', density: '0.04' },
        { frequency: '80', density: '0.08' },
      ],
      skipped: ['f / Hz\tG'],
    });
  });

  it('finds the field that a path of the server means', () => {
    expect(briefFieldName('document.vibration.frequency', 'tone')).toBe('vibration.tone.frequency');
    expect(briefFieldName('vibration.tones.1.phase', 'tones')).toBe('vibration.tones.1.phase');
    expect(briefFieldName('vibration.points.3.1', 'spectrum')).toBe('vibration.spectrum.points.3.density');
    expect(briefFieldName('document.envelope.size.2', 'tone')).toBe('envelope.size.2');
  });
});
