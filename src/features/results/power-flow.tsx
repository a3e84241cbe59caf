import type { Estimate } from '#contracts/estimates';
import { formatPercent } from '../../lib/format';
import { formatQuantity } from '../../lib/quantities';
import { Quantity } from '../../ui/quantity';

interface Part {
  key: string;
  label: string;
  value: number;
  /** Fill and the hatch that tells it from its neighbour without colour. */
  fill: string;
  hatch: 'none' | 'up' | 'down' | 'dots';
}

const looks: Record<string, Pick<Part, 'fill' | 'hatch' | 'label'>> = {
  load: { label: 'Load', fill: 'var(--copper)', hatch: 'none' },
  coil: { label: 'Coil', fill: 'var(--copper)', hatch: 'up' },
  rectifier: { label: 'Rectifier', fill: 'var(--amber)', hatch: 'none' },
  converter: { label: 'Converter', fill: 'var(--amber)', hatch: 'up' },
  mechanicalLoss: { label: 'Mechanical loss', fill: 'var(--graphite)', hatch: 'down' },
  stops: { label: 'Stops', fill: 'var(--cinnabar)', hatch: 'down' },
  stored: { label: 'Stored', fill: 'var(--verdigris)', hatch: 'dots' },
};

/** Where the mechanical power goes: parts that were computed and are not zero. */
export function powerParts(power: Estimate['power']): Part[] {
  return Object.entries(looks).flatMap(([key, look]): Part[] => {
    const value = power[key as keyof Estimate['power']];
    return value === null || value === 0 ? [] : [{ key, value, ...look }];
  });
}

const width = 640;

/** One bar, as long as the power that enters, cut into where it goes. */
export function PowerFlow({ power }: { power: Estimate['power'] }) {
  const parts = powerParts(power);
  const total = power.mechanicalIn;
  if (total === null || total <= 0 || parts.length === 0)
    return <p className="text-graphite italic">The power flow was not computed; the notes say why.</p>;
  const scale =
    width /
    Math.max(
      total,
      parts.reduce((sum, { value }) => sum + Math.max(0, value), 0),
    );
  const starts = parts.map(
    (_, index) => parts.slice(0, index).reduce((sum, { value }) => sum + Math.max(0, value), 0) * scale,
  );
  return (
    <figure className="flex flex-col gap-3">
      <figcaption className="flex items-baseline justify-between gap-4">
        <span>
          <Quantity value={total} dimension="power" /> <span className="text-graphite">enters from the vibration</span>
        </span>
        <span className="text-sm text-graphite">
          balance open by {power.residual === null ? 'an unknown part' : formatPercent(Math.abs(power.residual), 2)}
        </span>
      </figcaption>
      <svg
        viewBox={`0 0 ${width} 44`}
        preserveAspectRatio="none"
        className="h-11 w-full"
        role="img"
        aria-label={flowInWords(total, parts)}
      >
        <defs>
          {(['up', 'down'] as const).map((hatch) => (
            <pattern
              key={hatch}
              id={`flow-${hatch}`}
              width={6}
              height={6}
              patternUnits="userSpaceOnUse"
              patternTransform={`rotate(${hatch === 'up' ? 45 : -45})`}
            >
              <rect width={2.4} height={6} fill="var(--sheet)" fillOpacity={0.75} />
            </pattern>
          ))}
          <pattern id="flow-dots" width={7} height={7} patternUnits="userSpaceOnUse">
            <circle cx={3.5} cy={3.5} r={1.5} fill="var(--sheet)" fillOpacity={0.85} />
          </pattern>
        </defs>
        {parts.map(({ key, value, fill, hatch }, index) => (
          <g key={key}>
            <rect x={starts[index]} y={4} width={Math.max(1, Math.max(0, value) * scale - 1)} height={36} fill={fill} />
            {hatch === 'none' ? null : (
              <rect
                x={starts[index]}
                y={4}
                width={Math.max(1, Math.max(0, value) * scale - 1)}
                height={36}
                fill={`url(#flow-${hatch})`}
              />
            )}
          </g>
        ))}
      </svg>
      <table className="w-full max-w-xl">
        <thead className="sr-only">
          <tr>
            <th scope="col">Goes to</th>
            <th scope="col">Power</th>
            <th scope="col">Share</th>
          </tr>
        </thead>
        <tbody>
          {parts.map(({ key, label, value, fill, hatch }) => (
            <tr key={key} className="border-b border-rule">
              <th scope="row" className="py-1.5 text-left font-normal">
                <svg width={16} height={12} aria-hidden className="mr-2 inline-block align-[-1px]">
                  <rect width={16} height={12} fill={fill} />
                  {hatch === 'none' ? null : <rect width={16} height={12} fill={`url(#flow-${hatch})`} />}
                </svg>
                {label}
              </th>
              <td className="text-right">
                <Quantity value={value} dimension="power" />
              </td>
              <td className="w-24 text-right text-graphite">{formatPercent(value / total, 3)}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </figure>
  );
}

const flowInWords = (total: number, parts: readonly Part[]): string =>
  `Of ${formatQuantity(total, 'power')}: ${parts
    .map(({ label, value }) => `${label.toLowerCase()} ${formatPercent(value / total, 2)}`)
    .join(', ')}.`;
