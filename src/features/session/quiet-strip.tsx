import { useEffect, useRef } from 'react';

/**
 * The aligned strip as a quiet drawing: a magnet that swings past a coil and, on the same axis, flux linkage and
 * coupling. The curves are those of a dipole on the axis of one loop, λ ∝ (1 + (x/a)²)^(−3/2), in units of the loop's
 * radius a; the drawing carries no figures and claims none.
 */
const scale = 62;
const centre = 290;
const toX = (u: number) => centre + u * scale;
const flux = (u: number) => (1 + u * u) ** -1.5;
const coupling = (u: number) => -3 * u * (1 + u * u) ** -2.5;
const fluxY = (u: number) => 402 - 92 * flux(u);
const couplingY = (u: number) => 478 - 52 * coupling(u);

const curve = (of: (u: number) => number) =>
  Array.from({ length: 145 }, (_, index) => -4.1 + (8.2 * index) / 144)
    .map((u, index) => `${index === 0 ? 'M' : 'L'}${toX(u).toFixed(1)} ${of(u).toFixed(1)}`)
    .join('');

/** One slow swing, about as long as a breath. */
const periodMs = 7000;
const swing = 1.05;
const rest = 0.9;

const turns = Array.from({ length: 9 }, (_, column) =>
  Array.from({ length: 4 }, (_, row) => [column, row] as const),
).flat();

function Winding({ y }: { y: number }) {
  return (
    <g>
      <rect x={centre - 46} y={y} width={92} height={42} className="fill-sheet stroke-copper" strokeWidth={1.4} />
      {turns.map(([column, row]) => (
        <circle
          key={`${column} ${row}`}
          cx={centre - 40 + column * 10}
          cy={y + 6 + row * 10}
          r={2.5}
          className="fill-copper"
        />
      ))}
      <rect x={centre - 53} y={y - 5} width={7} height={52} className="fill-rule" />
      <rect x={centre + 46} y={y - 5} width={7} height={52} className="fill-rule" />
    </g>
  );
}

const spring = (from: number, to: number) => {
  const count = 12;
  const step = (to - from) / count;
  return `M${from} 170${Array.from({ length: count }, (_, index) => `L${(from + step * (index + 0.5)).toFixed(1)} ${index % 2 ? 180 : 160}`).join('')}L${to} 170`;
};

export function QuietStrip({ className }: { className?: string }) {
  const root = useRef<SVGSVGElement>(null);
  useEffect(() => {
    const svg = root.current;
    if (!svg) return;
    const part = (name: string) => svg.querySelector(`[data-part="${name}"]`);
    const [magnet, cursor, onFlux, onCoupling, left, right] = [
      'magnet',
      'cursor',
      'flux',
      'coupling',
      'left',
      'right',
    ].map(part);
    const place = (u: number) => {
      const x = toX(u);
      magnet?.setAttribute('transform', `translate(${x} 0)`);
      cursor?.setAttribute('transform', `translate(${x} 0)`);
      onFlux?.setAttribute('cx', String(x));
      onFlux?.setAttribute('cy', String(fluxY(u)));
      onCoupling?.setAttribute('cx', String(x));
      onCoupling?.setAttribute('cy', String(couplingY(u)));
      left?.setAttribute('d', spring(62, x - 62));
      right?.setAttribute('d', spring(x + 62, 518));
    };
    place(rest);
    if (window.matchMedia('(prefers-reduced-motion: reduce)').matches) return;
    let frame = 0;
    const start = performance.now();
    const draw = (now: number) => {
      place(rest + swing * Math.sin(((now - start) / periodMs) * 2 * Math.PI));
      frame = requestAnimationFrame(draw);
    };
    frame = requestAnimationFrame(draw);
    return () => cancelAnimationFrame(frame);
  }, []);

  return (
    <svg ref={root} viewBox="0 0 580 560" className={className} aria-hidden focusable="false">
      <path d="M20 170H560" className="stroke-graphite" strokeWidth={0.8} strokeDasharray="14 4 2 4" opacity={0.6} />
      <rect
        x={toX(rest - swing)}
        y={52}
        width={2 * swing * scale}
        height={478}
        className="fill-copper"
        opacity={0.09}
      />
      <g fill="none" className="stroke-graphite" strokeWidth={1.3}>
        <path data-part="left" />
        <path data-part="right" />
      </g>
      <path d="M58 108V232M522 108V232" className="stroke-graphite" strokeWidth={5} />
      <path d="M58 106H522M58 234H522" className="stroke-rule" strokeWidth={6} />
      <g data-part="magnet">
        <rect x={-62} y={118} width={62} height={104} className="fill-south" />
        <rect x={0} y={118} width={62} height={104} className="fill-north" />
        <g className="fill-(--on-pole)" fontSize={20} fontWeight={700} textAnchor="middle">
          <text x={-31} y={177}>
            S
          </text>
          <text x={31} y={177}>
            N
          </text>
        </g>
      </g>
      <Winding y={60} />
      <Winding y={238} />
      <g className="stroke-rule" strokeWidth={1}>
        <path d="M36 402H544M36 340H544M36 478H544M36 426H544M36 530H544" />
      </g>
      <path d="M36 402H544M36 478H544" className="stroke-graphite" strokeWidth={0.8} opacity={0.7} />
      <path d={curve(fluxY)} fill="none" className="stroke-ink" strokeWidth={1.9} />
      <path d={curve(couplingY)} fill="none" className="stroke-copper" strokeWidth={1.9} />
      <g data-part="cursor">
        <path d="M0 52V530" className="stroke-copper" strokeWidth={1.2} strokeDasharray="3 3" />
      </g>
      <circle data-part="flux" r={4.5} className="fill-paper stroke-copper" strokeWidth={1.8} />
      <circle data-part="coupling" r={4.5} className="fill-paper stroke-copper" strokeWidth={1.8} />
      <g fontSize={13} textAnchor="end">
        <text x={544} y={332} className="fill-graphite">
          flux linkage
        </text>
        <text x={544} y={446} className="fill-graphite">
          coupling
        </text>
        <text x={544} y={550} className="fill-graphite">
          position
        </text>
      </g>
    </svg>
  );
}
