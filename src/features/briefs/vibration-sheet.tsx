import { useMemo } from 'react';
import { parseQuantity } from '../../lib/quantities';
import { DataTable } from '../../ui/data-table';
import type { TableColumn } from '../../ui/data-table';
import { Plot } from '../../ui/plot';
import { Quantity } from '../../ui/quantity';
import { densityUnitWords, vibrationFields } from './vibration-fields';
import type { SpectrumFields, ToneFields } from './vibration-fields';

const si = (text: string, dimension: 'frequency' | 'acceleration' | 'angle' | 'time', unit: string): number | null => {
  const reading = parseQuantity(text, dimension, unit);
  return reading.ok ? reading.value : null;
};

interface ToneRow {
  key: string;
  frequency: number | null;
  acceleration: number | null;
  as: 'peak' | 'rms';
  phase: number | null;
}

/** Of a sine: speed is acceleration over ω, displacement over ω². */
const speedOf = ({ frequency, acceleration }: ToneRow) =>
  frequency === null || acceleration === null ? null : acceleration / (2 * Math.PI * frequency);
const displacementOf = ({ frequency, acceleration }: ToneRow) =>
  frequency === null || acceleration === null ? null : acceleration / (2 * Math.PI * frequency) ** 2;

const toneColumns: readonly TableColumn<ToneRow>[] = [
  {
    id: 'frequency',
    title: 'Frequency',
    align: 'end',
    value: ({ frequency }) => frequency,
    cell: ({ frequency }) => <Quantity value={frequency} dimension="frequency" />,
  },
  {
    id: 'acceleration',
    title: 'Acceleration',
    align: 'end',
    value: ({ acceleration }) => acceleration,
    cell: ({ acceleration, as }) => <Quantity value={acceleration} dimension="acceleration" after={as} />,
  },
  {
    id: 'gravity',
    title: 'in g',
    align: 'end',
    value: ({ acceleration }) => acceleration,
    cell: ({ acceleration, as }) => <Quantity value={acceleration} dimension="acceleration" unit="g" after={as} />,
  },
  {
    id: 'speed',
    title: 'Speed',
    align: 'end',
    value: speedOf,
    cell: (tone) => <Quantity value={speedOf(tone)} dimension="speed" after={tone.as} />,
  },
  {
    id: 'displacement',
    title: 'Displacement',
    align: 'end',
    value: displacementOf,
    cell: (tone) => <Quantity value={displacementOf(tone)} dimension="length" after={tone.as} />,
  },
];
const phaseColumn: TableColumn<ToneRow> = {
  id: 'phase',
  title: 'Phase',
  align: 'end',
  value: ({ phase }) => phase,
  cell: ({ phase }) => <Quantity value={phase} dimension="angle" />,
};

function Tones({ tones }: { tones: readonly ToneFields[] }) {
  const rows = tones.map((tone, index): ToneRow => ({
    key: String(index),
    frequency: si(tone.frequency, 'frequency', 'Hz'),
    acceleration: si(tone.acceleration, 'acceleration', 'm/s^2'),
    as: tone.as,
    phase: si(tone.phase, 'angle', 'deg'),
  }));
  return (
    <DataTable
      plain
      label="Tones"
      rows={rows}
      columns={tones.length > 1 ? [...toneColumns, phaseColumn] : toneColumns}
      rowKey={({ key }) => key}
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
