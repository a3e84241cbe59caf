import type { PlanView } from './drawing';
import type { StripLayout } from './strip-layout';
import { pxRect } from './strip-layout';

type Coil = PlanView['coils'][number];

function outline(
  { at, shape }: Coil,
  [halfX, halfY]: [number, number],
  x: (mm: number) => number,
  y: (mm: number) => number,
): string {
  const [left, right] = [x(at[0] - halfX), x(at[0] + halfX)];
  const [top, bottom] = [y(at[1] + halfY), y(at[1] - halfY)];
  if (shape === 'rectangular') return `M${left} ${top}H${right}V${bottom}H${left}Z`;
  // Half circles at both ends of the straight sides; for a round coil the sides have no length.
  const radius = (right - left) / 2;
  return `M${left} ${top + radius}A${radius} ${radius} 0 0 1 ${right} ${top + radius}V${bottom - radius}A${radius} ${radius} 0 0 1 ${left} ${bottom - radius}Z`;
}

interface PlanProps {
  plan: PlanView;
  layout: StripLayout;
  planY: (mm: number) => number;
  /** Where the assembly stands, mm. */
  at: number;
}

/** The coils and the magnets over them, seen along the normal of the coil's face. */
export function Plan({ plan, layout, planY, at }: PlanProps) {
  const { x, scale } = layout;
  return (
    <g>
      <text x={layout.left} y={planY(plan.y1) - 6} fontSize={10.5} className="fill-graphite">
        plan
      </text>
      {plan.coils.map((coil, index) => (
        <path
          key={index}
          d={`${outline(coil, coil.outer, x, planY)} ${outline(coil, coil.inner, x, planY)}`}
          fillRule="evenodd"
          className="fill-copper stroke-copper"
          fillOpacity={0.28}
          strokeWidth={1.2}
        />
      ))}
      <g transform={`translate(${at * scale} 0)`}>
        {plan.magnets.map(({ rect, facing }, index) => {
          const box = pxRect(rect, x, planY);
          const north = facing === 'N';
          return (
            <g key={index}>
              <rect
                {...box}
                className={north ? 'fill-north stroke-north' : 'fill-south stroke-south'}
                fillOpacity={0.22}
                strokeWidth={1.3}
              />
              {Math.min(box.width, box.height) >= 10 ? (
                <text
                  x={box.x + box.width / 2}
                  y={box.y + box.height / 2}
                  dy="0.35em"
                  textAnchor="middle"
                  fontSize={12}
                  fontWeight={700}
                  className="fill-ink"
                >
                  {facing}
                </text>
              ) : null}
            </g>
          );
        })}
      </g>
    </g>
  );
}
