import { useMemo, useState } from 'react';
import type { Estimate } from '#contracts/estimates';
import { formatQuantity } from '../../lib/quantities';
import { Plot } from '../../ui/plot';
import type { PlotSeries } from '../../ui/plot';
import { RadioGroup } from '../../ui/radio-group';

type Waveforms = NonNullable<Estimate['waveforms']>;
type View = 'voltage' | 'displacement' | 'current';

const views = [
  { value: 'voltage', label: 'voltages' },
  { value: 'displacement', label: 'displacement' },
  { value: 'current', label: 'coil current' },
] as const;

/** Repeats one period so that its shape is seen to run on. */
function repeated(
  time: readonly number[],
  values: readonly number[],
  times: number,
  period: number,
): [number[], number[]] {
  const at = Array.from({ length: times }, (_, cycle) => time.map((t) => (t + cycle * period) * 1000)).flat();
  return [at, Array.from({ length: times }, () => values).flat()];
}

/** Length of one period; the samples stop one step before it would begin again, or at its very end. */
function periodOf({ time, displacement }: Waveforms): number {
  const count = time.length;
  const span = (time[count - 1] ?? 0) - (time[0] ?? 0);
  const size = Math.max(...displacement.map(Math.abs)) || 1;
  const closed = Math.abs((displacement[count - 1] ?? 0) - (displacement[0] ?? 0)) < 1e-6 * size;
  return closed ? span : span + (time[1] ?? 0) - (time[0] ?? 0);
}

const peakOf = (values: readonly number[]) => values.reduce((most, value) => Math.max(most, Math.abs(value)), 0);

interface WaveformsProps {
  waveforms: Estimate['waveforms'];
  /** The vibration is one tone, so that the record is one period. */
  periodic: boolean;
  previous: boolean;
}

export function WaveformPlots({ waveforms, periodic, previous }: WaveformsProps) {
  const [view, setView] = useState<View>('voltage');
  const plots = useMemo(() => {
    if (!waveforms) return null;
    const { time, emf, loadVoltage, displacement, coilCurrent } = waveforms;
    const period = periodOf(waveforms);
    const series = (name: string, values: readonly number[], scale: number, role: PlotSeries['role']): PlotSeries => {
      const scaled = values.map((value) => value * scale);
      const [x, y] = periodic ? repeated(time, scaled, 3, period) : [time.map((t) => t * 1000), scaled];
      return { name, x, y, role };
    };
    const over = periodic ? `a period of ${formatQuantity(period, 'time')}` : `${formatQuantity(period, 'time')}`;
    return {
      voltage: {
        title: 'EMF and load voltage',
        summary: `Over ${over} the EMF peaks at ${formatQuantity(peakOf(emf), 'voltage')} and the load voltage at ${formatQuantity(peakOf(loadVoltage), 'voltage')}.`,
        y: { quantity: 'voltage', unit: 'V' },
        series: [series('EMF', emf, 1, 'second'), series('across the load', loadVoltage, 1, 'predicted')],
      },
      displacement: {
        title: 'Displacement',
        summary: `Over ${over} the assembly moves up to ${formatQuantity(peakOf(displacement), 'length')} from its rest position.`,
        y: { quantity: 'displacement', unit: 'mm' },
        series: [series('displacement from rest', displacement, 1000, 'predicted')],
      },
      current: {
        title: 'Coil current',
        summary: `Over ${over} the coil current peaks at ${formatQuantity(peakOf(coilCurrent), 'current')}.`,
        y: { quantity: 'current', unit: 'mA' },
        series: [series('coil current', coilCurrent, 1000, 'second')],
      },
    };
  }, [waveforms, periodic]);
  if (!plots) return <p className="text-graphite italic">Waveforms were not computed; the notes say why.</p>;
  return (
    <div className="flex flex-col gap-2">
      <RadioGroup
        label="Show"
        labelHidden
        direction="across"
        choices={views}
        value={view}
        onChange={(next) => setView(next === '' ? 'voltage' : next)}
      />
      <Plot {...plots[view]} x={{ quantity: 'time', unit: 'ms' }} height={220} stale={previous} />
    </div>
  );
}
