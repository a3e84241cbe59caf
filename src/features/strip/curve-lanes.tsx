import { memo } from 'react';
import { formatNumber } from '../../lib/format';
import { pointsOf } from './curve';
import type { Curve, Lane } from './curve';
import { ticksOf } from './domain';
import type { Domain } from './domain';
import type { StripLayout } from './strip-layout';

/** A tick's text: as many decimals as its step needs. */
export const tickText = (value: number): string =>
  value === 0
    ? '0'
    : Math.abs(value) >= 1e5 || Math.abs(value) < 1e-3
      ? formatNumber(value, 2)
      : String(Number(value.toPrecision(6))).replace('-', '−');

export const laneY = (lane: Lane, { top, bottom }: { top: number; bottom: number }, value: number): number =>
  bottom - ((value - lane.from) / (lane.to - lane.from || 1)) * (bottom - top);

interface LaneProps {
  title: string;
  lane: Lane;
  curve: Curve;
  domain: Domain;
  layout: StripLayout;
  index: number;
  copper?: boolean;
  /** Of an earlier state of the document: dashed. */
  previous?: boolean;
}

/** One curve over the position axis, with its own scale at the left and its name in the corner where it is out of the way. */
export const CurveLane = memo(function CurveLane({
  title,
  lane,
  curve,
  domain,
  layout,
  index,
  copper = false,
  previous = false,
}: LaneProps) {
  const box = layout.lanes[index];
  if (!box) return null;
  const points = pointsOf(curve, lane, domain);
  const path = points
    .map(([mm, value], at) => `${at === 0 ? 'M' : 'L'}${layout.x(mm).toFixed(2)} ${laneY(lane, box, value).toFixed(2)}`)
    .join('');
  return (
    <g>
      {lane.ticks.map((tick) => {
        const y = laneY(lane, box, tick);
        return (
          <g key={tick}>
            <line
              x1={layout.left}
              x2={layout.right}
              y1={y}
              y2={y}
              className={tick === 0 ? 'stroke-graphite' : 'stroke-rule'}
              strokeWidth={1}
              strokeOpacity={tick === 0 ? 0.8 : 1}
            />
            <text
              x={layout.left - 6}
              y={y}
              dy="0.33em"
              textAnchor="end"
              fontSize={10.5}
              className="fill-graphite font-mono"
            >
              {tickText(tick)}
            </text>
          </g>
        );
      })}
      <path
        d={path}
        fill="none"
        className={copper ? 'stroke-copper' : 'stroke-ink'}
        strokeWidth={1.7}
        strokeLinejoin="round"
        strokeDasharray={previous ? '6 4' : undefined}
      />
      <text x={layout.right} y={box.top - 6} textAnchor="end" fontSize={11} className="fill-ink">
        <tspan fontWeight={650} className={copper ? 'fill-copper' : undefined}>
          {title}
        </tspan>
        <tspan className="fill-graphite">{` / ${lane.unit}`}</tspan>
      </text>
    </g>
  );
});

/** Place of a curve that was not computed. */
export function EmptyLane({
  title,
  layout,
  index,
  words,
}: {
  title: string;
  layout: StripLayout;
  index: number;
  words: string;
}) {
  const box = layout.lanes[index];
  if (!box) return null;
  const middle = (box.top + box.bottom) / 2;
  return (
    <g>
      <line x1={layout.left} x2={layout.right} y1={middle} y2={middle} className="stroke-rule" strokeDasharray="2 4" />
      <text x={layout.right} y={box.top - 6} textAnchor="end" fontSize={11} fontWeight={650} className="fill-ink">
        {title}
      </text>
      <text
        x={(layout.left + layout.right) / 2}
        y={middle}
        dy="-0.6em"
        textAnchor="middle"
        fontSize={12}
        fontStyle="italic"
        className="fill-graphite"
      >
        {words}
      </text>
    </g>
  );
}

interface AxisProps {
  domain: Domain;
  layout: StripLayout;
  rest: number | null;
  stops: { at: number; side: string }[];
}

/** The position axis, with marks for rest and stops under it. */
export const PositionAxis = memo(function PositionAxis({ domain, layout, rest, stops }: AxisProps) {
  const ticks = ticksOf(domain.from, domain.to, Math.max(3, Math.min(12, (layout.right - layout.left) / 64)));
  const y = layout.axis;
  const marks = [
    ...(rest !== null ? [{ at: rest, text: 'rest' }] : []),
    ...stops.map(({ at }) => ({ at, text: 'stop' })),
  ].filter(({ at }) => at >= domain.from && at <= domain.to);
  const placed = [...marks].sort((a, b) => a.at - b.at).map((mark) => ({ ...mark, px: layout.x(mark.at) }));
  // A word that would run into the one before it is left out; its mark stays.
  const words = placed.map((mark, index) => ({ ...mark, fits: mark.px - (placed[index - 1]?.px ?? -Infinity) > 26 }));
  return (
    <g>
      <line x1={layout.left} x2={layout.right} y1={y} y2={y} className="stroke-graphite" strokeWidth={1.2} />
      {ticks.map((tick) => (
        <g key={tick}>
          <line x1={layout.x(tick)} x2={layout.x(tick)} y1={y} y2={y + 4} className="stroke-graphite" strokeWidth={1} />
          <text x={layout.x(tick)} y={y + 15} textAnchor="middle" fontSize={10.5} className="fill-graphite font-mono">
            {tickText(tick)}
          </text>
        </g>
      ))}
      {words.map(({ px, text, fits }, index) => (
        <g key={index}>
          {text === 'stop' ? (
            <path d={`M${px} ${y - 8}V${y + 8}`} className="stroke-ink" strokeWidth={2.4} />
          ) : (
            <path d={`M${px} ${y - 1}l4.5 -7h-9z`} className="fill-copper" />
          )}
          {fits ? (
            <text x={px} y={y + 28} textAnchor="middle" fontSize={10.5} fontWeight={600} className="fill-ink">
              {text}
            </text>
          ) : null}
        </g>
      ))}
      <text x={layout.right} y={y + 40} textAnchor="end" fontSize={11.5} className="fill-graphite">
        position / mm
      </text>
    </g>
  );
});
