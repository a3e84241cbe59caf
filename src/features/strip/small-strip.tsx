import { memo, useId, useMemo } from 'react';
import { acrossSection } from './across-section';
import { describeStrip } from './describe';
import { readStripDevice } from './device';
import { hullOf } from './drawing';
import type { Rect } from './drawing';
import { FixedParts, MovingParts, Springs } from './section-shapes';
import { throughSection } from './through-section';

interface SmallStripProps {
  /** Design document, typed or canonical. */
  document: unknown;
  width?: number;
  height?: number;
}

/** The section alone, at the size of a list's row: to scale, without figures. */
export const SmallStrip = memo(function SmallStrip({ document, width = 168, height = 60 }: SmallStripProps) {
  const id = useId();
  const device = useMemo(() => readStripDevice(document), [document]);
  const drawing = useMemo(
    () => (device.layout === 'through' ? throughSection(device) : acrossSection(device)),
    [device],
  );
  if (device.magnets.length === 0 && device.coils.length === 0)
    return <span className="text-sm text-graphite italic">nothing to draw yet</span>;
  const box: Rect = hullOf([drawing.extent]) ?? drawing.extent;
  const pad = 3;
  const scale = Math.min((width - 2 * pad) / (box.x1 - box.x0), (height - 2 * pad) / (box.y1 - box.y0));
  const left = (width - (box.x1 - box.x0) * scale) / 2;
  const top = (height - (box.y1 - box.y0) * scale) / 2;
  const scales = {
    scale,
    x: (mm: number) => left + (mm - box.x0) * scale,
    y: (mm: number) => top + (box.y1 - mm) * scale,
  };
  return (
    <svg
      viewBox={`0 0 ${width} ${height}`}
      width={width}
      height={height}
      role="img"
      aria-label={describeStrip(device, null).replace(' Flux linkage and coupling are not computed.', '')}
      className="block max-w-full"
    >
      {drawing.centreLine ? (
        <line
          x1={0}
          x2={width}
          y1={scales.y(0)}
          y2={scales.y(0)}
          className="stroke-graphite"
          strokeOpacity={0.5}
          strokeDasharray="8 3 1 3"
        />
      ) : null}
      <FixedParts {...{ drawing, scales, id }} small />
      <Springs springs={drawing.springs} scales={scales} at={0} small />
      <MovingParts {...{ drawing, scales }} small />
    </svg>
  );
});
