import { memo } from 'react';
import type { Arrow, CutWinding, Drawing, MagnetBody, Spring } from './drawing';
import { zigzag } from './drawing';
import { pxRect } from './strip-layout';
import type { PlacedDimension, StripLayout } from './strip-layout';

type Scales = Pick<StripLayout, 'x' | 'y' | 'scale'>;

/** Least px between conductors drawn; below it they stand for the winding, not for each wire. */
const leastPitch = 5.6;

function Winding({ winding, scales, id, small }: { winding: CutWinding; scales: Scales; id: string; small: boolean }) {
  const box = pxRect(winding.rect, scales.x, scales.y);
  const pitch = Math.max(winding.pitch * scales.scale, small ? 3.6 : leastPitch);
  const px = box.width / Math.max(1, Math.round(box.width / pitch));
  const py = box.height / Math.max(1, Math.round(box.height / pitch));
  const size = Math.min(px, py);
  const dots = size >= (small ? 2.4 : 3.2);
  // Drafting habit: a dot where the positive current comes out of the page, a cross where it goes in.
  const outward = winding.rect.y0 >= 0 === winding.sense > 0;
  const [cx, cy, r] = [px / 2, py / 2, size * 0.27];
  const arm = size * 0.22;
  return (
    <g>
      {dots ? (
        <pattern id={id} patternUnits="userSpaceOnUse" x={box.x} y={box.y} width={px} height={py}>
          {outward || size < 6.5 ? (
            <circle {...{ cx, cy, r }} className="fill-copper" />
          ) : (
            <path
              d={`M${cx - arm} ${cy - arm}L${cx + arm} ${cy + arm}M${cx + arm} ${cy - arm}L${cx - arm} ${cy + arm}`}
              className="stroke-copper"
              strokeWidth={Math.max(1, size * 0.16)}
              strokeLinecap="round"
            />
          )}
        </pattern>
      ) : null}
      <rect {...box} className="fill-copper" fillOpacity={dots ? 0.12 : 0.55} />
      {dots ? <rect {...box} fill={`url(#${id})`} /> : null}
      <rect {...box} fill="none" className="stroke-copper" strokeWidth={small ? 1 : 1.4} />
    </g>
  );
}

const arrowPath = (x0: number, y0: number, x1: number, y1: number, head: number) => {
  const angle = Math.atan2(y1 - y0, x1 - x0);
  const side = (turn: number) => `${x1 - head * Math.cos(angle + turn)} ${y1 - head * Math.sin(angle + turn)}`;
  return { line: `M${x0} ${y0}L${x1} ${y1}`, head: `M${x1} ${y1}L${side(0.4)}L${side(-0.4)}Z` };
};

function MagnetArrow({ arrow, scales }: { arrow: Arrow; scales: Scales }) {
  const thickness = arrow.thickness * scales.scale;
  const [x0, y0] = [scales.x(arrow.from[0]), scales.y(arrow.from[1])];
  const [x1, y1] = [scales.x(arrow.to[0]), scales.y(arrow.to[1])];
  // Shorter or in a thinner magnet it would run through the letters.
  if (Math.hypot(x1 - x0, y1 - y0) < 22 || thickness < 46) return null;
  const paths = arrowPath(x0, y0, x1, y1, 8);
  return (
    <g>
      <path d={paths.line} stroke="var(--on-pole)" strokeWidth={1.4} />
      <path d={paths.head} fill="var(--on-pole)" />
    </g>
  );
}

/** Magnets by their lettered halves. Where a half is too narrow for its letter, the letter stands outside on its own side. */
function Magnets({ body, scales, small }: { body: MagnetBody; scales: Scales; small: boolean }) {
  return (
    <g>
      {body.poles.map(({ rect, pole, magnet }, index) => {
        const box = pxRect(rect, scales.x, scales.y);
        const inside = Math.min(box.width, box.height) >= 9;
        const size = Math.min(small ? 11 : 17, Math.max(8, Math.min(box.width * 0.55, box.height * 0.42)));
        return (
          <g key={`${magnet} ${index}`}>
            <rect {...box} className={pole === 'N' ? 'fill-north' : 'fill-south'} />
            {inside ? (
              <text
                x={box.x + box.width / 2}
                y={box.y + box.height / 2}
                dy="0.35em"
                textAnchor="middle"
                fontSize={size}
                fontWeight={700}
                fill="var(--on-pole)"
              >
                {pole}
              </text>
            ) : small ? null : (
              <text
                x={box.x + box.width / 2}
                y={rect.y1 > 0 ? box.y - 3 : box.y + box.height + 9}
                textAnchor="middle"
                fontSize={9}
                fontWeight={700}
                className={pole === 'N' ? 'fill-north' : 'fill-south'}
              >
                {pole}
              </text>
            )}
          </g>
        );
      })}
      {small ? null : body.arrows.map((arrow, index) => <MagnetArrow key={index} {...{ arrow, scales }} />)}
      {body.outlines.map((rect, index) => (
        <rect
          key={index}
          {...pxRect(rect, scales.x, scales.y)}
          fill="none"
          className="stroke-sheet"
          strokeWidth={1}
          strokeOpacity={0.7}
        />
      ))}
    </g>
  );
}

interface FixedProps {
  drawing: Drawing;
  scales: Scales;
  id: string;
  small?: boolean;
}

/** What does not move: tube, ends, bobbins, windings, fixed magnets, stops. */
export const FixedParts = memo(function FixedParts({ drawing, scales, id, small = false }: FixedProps) {
  const { x, y } = scales;
  return (
    <g>
      <pattern id={`${id}-hatch`} patternUnits="userSpaceOnUse" width={5} height={5} patternTransform="rotate(45)">
        <line x1={0} y1={0} x2={0} y2={5} className="stroke-graphite" strokeWidth={2} />
      </pattern>
      {drawing.tube.map((rect, index) => (
        <rect key={index} {...pxRect(rect, x, y)} className="fill-graphite" fillOpacity={0.34} />
      ))}
      {drawing.bobbins.map((rect, index) => (
        <rect key={index} {...pxRect(rect, x, y)} className="fill-graphite" fillOpacity={0.46} />
      ))}
      {drawing.walls.map((rect, index) => (
        <rect key={index} {...pxRect(rect, x, y)} className="fill-graphite" />
      ))}
      {drawing.stops.map(({ rects, side }) =>
        rects.map((rect, index) => (
          <rect
            key={`${side} ${index}`}
            {...pxRect(rect, x, y)}
            fill={`url(#${id}-hatch)`}
            fillOpacity={0.8}
            className="stroke-graphite"
            strokeWidth={0.8}
          />
        )),
      )}
      <Magnets body={drawing.fixed} {...{ scales, small }} />
      {drawing.windings.map((winding, index) => (
        <Winding key={index} {...{ winding, scales, small }} id={`${id}-winding-${index}`} />
      ))}
    </g>
  );
});

/** The moving assembly as drawn for x = 0; the caller shifts it. */
export const MovingParts = memo(function MovingParts({ drawing, scales, small = false }: Omit<FixedProps, 'id'>) {
  return <Magnets body={drawing.moving} {...{ scales, small }} />;
});

export function Springs({
  springs,
  scales,
  at,
  small = false,
}: {
  springs: readonly Spring[];
  scales: Scales;
  at: number;
  small?: boolean;
}) {
  return (
    <g fill="none" className="stroke-ink" strokeWidth={small ? 0.8 : 1.15} strokeLinejoin="round" strokeOpacity={0.85}>
      {springs.map((spring, index) => {
        const to = spring.attachedAt + at;
        // Held by hand beyond the spring's fixed end: there is no spring to draw.
        if ((to - spring.fixedAt) * (spring.attachedAt - spring.fixedAt) <= 0) return null;
        const turns = small && !spring.toScale ? 4 : spring.turns;
        const points = zigzag(spring.fixedAt, to, spring.y, spring.amplitude, turns);
        return (
          <polyline
            key={index}
            points={points.map(([px, py]) => `${scales.x(px).toFixed(1)},${scales.y(py).toFixed(1)}`).join(' ')}
          />
        );
      })}
    </g>
  );
}

/** Where magnet and winding would share space: hatched, and said. */
export function Clashes({ drawing, scales, id }: FixedProps) {
  const [first] = drawing.clashes;
  if (!first) return null;
  return (
    <g>
      <pattern id={`${id}-clash`} patternUnits="userSpaceOnUse" width={6} height={6} patternTransform="rotate(-45)">
        <line x1={0} y1={0} x2={0} y2={6} className="stroke-cinnabar" strokeWidth={2.4} />
      </pattern>
      {drawing.clashes.map((rect, index) => (
        <rect
          key={index}
          {...pxRect(rect, scales.x, scales.y)}
          fill={`url(#${id}-clash)`}
          className="stroke-cinnabar"
          strokeWidth={1.2}
        />
      ))}
    </g>
  );
}

interface DimensionsProps {
  placed: readonly PlacedDimension[];
  scales: Scales;
  sectionTop: number;
  sectionBottom: number;
}

/** Dimension lines with closed arrow heads, figures in mm as on any drawing. */
export const Dimensions = memo(function Dimensions({ placed, scales, sectionTop, sectionBottom }: DimensionsProps) {
  return (
    <g className="stroke-graphite fill-graphite" strokeWidth={0.8}>
      {placed.map(({ dimension, label }, index) => {
        const above = dimension.side === 'above';
        const line = above ? sectionTop - 8 : sectionBottom + 20;
        const [from, to] = [scales.x(dimension.from), scales.x(dimension.to)];
        const feature = scales.y(dimension.y) + (above ? -3 : 3);
        const end = line + (above ? -3 : 3);
        const head = Math.min(6, Math.max(0, (to - from) / 3));
        return (
          <g key={index}>
            <path
              d={`M${from} ${feature}V${end}M${to} ${feature}V${end}M${from} ${line}H${to}`}
              fill="none"
              strokeOpacity={0.75}
            />
            {head >= 2 ? (
              <path stroke="none" d={`M${from} ${line}l${head} -2v4zM${to} ${line}l${-head} -2v4z`} />
            ) : null}
            {label === '' ? null : (
              <text
                x={(from + to) / 2}
                y={line - 4}
                textAnchor="middle"
                fontSize={10.5}
                strokeWidth={3}
                paintOrder="stroke"
                className="fill-ink stroke-sheet font-mono"
              >
                {label}
              </text>
            )}
          </g>
        );
      })}
    </g>
  );
});
