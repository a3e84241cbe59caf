import { useMemo } from 'react';
import { parseQuantity } from '../../lib/quantities';
import { KeyFigures } from '../../ui/key-figures';
import { Plot } from '../../ui/plot';
import { Quantity } from '../../ui/quantity';
import { densityUnitWords, vibrationFields } from './vibration-fields';
import type { SpectrumFields, ToneFields } from './vibration-fields';

const si = (text: string, dimension: 'frequency' | 'acceleration' | 'angle' | 'time', unit: string): number | null => {
  const reading = parseQuantity(text, dimension, unit);
  return reading.ok ? reading.value : null;
};

function Tones({ tones }: { tones: readonly ToneFields[] }) {
  return (
    <KeyFigures
      ruled
      figures={tones.map((tone, index) => ({
        key: String(index),
        label: <Quantity value={si(tone.frequency, 'frequency', 'Hz')} dimension="frequency" className="text-ink" />,
        value: (
          <>
            <Quantity value={si(tone.acceleration, 'acceleration', 'm/s²')} dimension="acceleration" after={tone.as} />
            {tones.length > 1 ? (
              <>
                {' '}
                at <Quantity value={si(tone.phase, 'angle', 'deg')} dimension="angle" />
              </>
            ) : null}
          </>
        ),
      }))}
    />
  );
}

function Spectrum({ fields: { points, unit, duration } }: { fields: SpectrumFields }) {
  const series = useMemo(
    () => [
      {
        name: 'Asked for',
        x: points.map((point) => si(point.frequency, 'frequency', 'Hz') ?? Number.NaN),
        y: points.map((point) => Number.parseFloat(point.density)),
        role: 'predicted' as const,
      },
    ],
    [points],
  );
  return (
    <Plot
      title="Acceleration density"
      summary={`${points.length} points from ${points[0]?.frequency ?? '–'} to ${points[points.length - 1]?.frequency ?? '–'}, joined straight on log-log paper; ${duration} long.`}
      x={{ quantity: 'frequency', unit: 'Hz', logarithmic: true }}
      y={{ quantity: 'density', unit: densityUnitWords[unit], logarithmic: true }}
      series={series}
      height={220}
    />
  );
}

/** The excitation of a brief: its line in words, then its figures, drawn where it is a spectrum. */
export function VibrationSheet({ vibration, inWords }: { vibration: unknown; inWords: string }) {
  const fields = useMemo(() => vibrationFields(vibration), [vibration]);
  return (
    <div className="flex flex-col gap-3">
      <p className="text-lg font-semibold">{inWords}</p>
      {fields.kind === 'tone' ? <Tones tones={[fields.tone]} /> : null}
      {fields.kind === 'tones' ? <Tones tones={fields.tones} /> : null}
      {fields.kind === 'spectrum' ? <Spectrum fields={fields.spectrum} /> : null}
    </div>
  );
}
