import { describe, expect, it } from 'vitest';
import { designField, readDesignDocument } from '#contracts/design-document';
import { textOfValue, valueOfResult, valueOfText } from '../../../src/features/design/typed-text';
import reference from '../../reference/cases/D1-01.json';

const length = { dimension: 'length', unit: 'mm' } as const;
const turns = { dimension: 'number', unit: '' } as const;

describe('between a field and the document', () => {
  it('keeps what is typed, letter for letter, where it says its own unit', () => {
    for (const typed of ['12 mm', '0.47 in', '1.2e-3 m', '4k7', '12 m m', 'wide']) {
      expect(valueOfText(typed, length)).toBe(typed);
    }
    expect(textOfValue('0.47 in', length)).toBe('0.47 in');
    expect(textOfValue('wide', length)).toBe('wide');
  });

  it('writes the shown unit to a bare number, which the document would take for metres', () => {
    expect(valueOfText('12', length)).toBe('12 mm');
    expect(valueOfText('−5.567', length)).toBe('−5.567 mm');
    expect(valueOfText('1000', turns)).toBe('1000');
    expect(textOfValue('12 mm', length)).toBe('12');
  });

  it('goes round: text to value to text', () => {
    for (const typed of ['12', '-5.567', '.5', '1e-3', '0.47 in', '2*3', 'half']) {
      expect(textOfValue(valueOfText(typed, length), length)).toBe(typed);
    }
  });

  it('shows canonical numbers in the unit of the field, without rounding noise', () => {
    expect(textOfValue(0.000117, length)).toBe('0.117');
    expect(textOfValue(-0.005567299, length)).toBe('-5.567299');
    expect(textOfValue(Math.PI / 2, { dimension: 'angle', unit: 'deg' })).toBe('90');
    expect(textOfValue(20, { dimension: 'temperature', unit: '°C' })).toBe('20');
  });

  it('takes an empty field for nothing said, so that the default holds', () => {
    expect(valueOfText('  ', length)).toBeUndefined();
    expect(textOfValue(undefined, length)).toBe('');
    expect(textOfValue(null, length)).toBe('');
  });

  it('keeps the result of a sum in the unit of the field', () => {
    expect(valueOfResult(0.006, length)).toBe('6 mm');
  });

  it('is understood by the document for every unit that a field shows', () => {
    const through = reference.design;
    const typed = {
      ...through,
      asMeasured: undefined,
      axisAngle: valueOfText('90', { dimension: 'angle', unit: 'deg' }),
      temperature: valueOfText('25', { dimension: 'temperature', unit: '°C' }),
      conductivity: valueOfText('58', { dimension: 'conductivity', unit: 'MS/m' }),
      movingMass: { total: valueOfText('25', { dimension: 'mass', unit: 'g' }) },
      suspension: {
        kind: 'spring',
        stiffness: valueOfText('2467', {
          dimension: 'stiffness',
          unit: designField('suspension.stiffness', 'spring')?.unit ?? '',
        }),
        cubic: valueOfText('0', {
          dimension: 'cubicStiffness',
          unit: designField('suspension.cubic', 'spring')?.unit ?? '',
        }),
      },
      damping: {
        coefficient: valueOfText('0.05', { dimension: 'dampingCoefficient', unit: 'N s/m' }),
        quadratic: valueOfText('0', { dimension: 'quadraticDrag', unit: 'N s²/m²' }),
      },
      circuit: { kind: 'resistor', resistance: valueOfText('804', { dimension: 'resistance', unit: 'Ω' }) },
    };
    const reading = readDesignDocument(typed);
    expect(reading.ok ? [] : reading.issues).toEqual([]);
    expect(reading.ok && reading.document.axisAngle).toBeCloseTo(Math.PI / 2, 12);
    expect(reading.ok && reading.document.conductivity).toBeCloseTo(58e6, 3);
  });
});
