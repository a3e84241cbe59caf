import { useCallback, useEffect, useId, useMemo, useRef, useState } from 'react';
import type { KeyboardEvent, PointerEvent } from 'react';
import type { Estimate } from '#contracts/estimates';
import { acrossSection } from './across-section';
import { curveAt, curveOf, laneOf, laneText } from './curve';
import { CurveLane, EmptyLane, laneY, PositionAxis } from './curve-lanes';
import { describeStrip } from './describe';
import type { StripDevice } from './device';
import { domainOf, tightened } from './domain';
import type { Domain } from './domain';
import type { Drawing } from './drawing';
import { motionOf } from './motion';
import { Plan } from './plan-view';
import { Clashes, Dimensions, FixedParts, MovingParts, Springs } from './section-shapes';
import { formatPlace, StripHeader } from './strip-header';
import { placeDimensions, stripLayout } from './strip-layout';
import { throughSection } from './through-section';
import { usePlay } from './use-play';

/** Drawing of a device and the stretch of the position axis that shows it. */
export function drawDevice(device: StripDevice, travel = 0): { drawing: Drawing; domain: Domain } {
  const drawing = device.layout === 'through' ? throughSection(device, travel) : acrossSection(device, travel);
  return { drawing, domain: domainOf(device, drawing) };
}

export interface AlignedStripProps {
  device: StripDevice;
  /** What was estimated for it; without one the drawing stands alone and says so. */
  estimate: Estimate | null;
  /** The figures belong to an earlier state of the document: curves are drawn lighter. */
  previous?: boolean;
  /** Words in the place of curves that are not there. */
  absent?: string;
}

function useWidth() {
  const ref = useRef<HTMLDivElement>(null);
  const [width, setWidth] = useState(0);
  useEffect(() => {
    const element = ref.current;
    if (!element) return;
    setWidth(element.clientWidth);
    if (typeof ResizeObserver === 'undefined') return;
    const observer = new ResizeObserver(() => setWidth(element.clientWidth));
    observer.observe(element);
    return () => observer.disconnect();
  }, []);
  return { ref, width };
}

/**
 * The aligned strip: the device in section, to scale, and under it on the same position axis its flux linkage and coupling.
 * The cursor is the assembly: dragging it, the arrow keys, and play all move both.
 */
export function AlignedStrip({ device, estimate, previous = false, absent = 'not computed' }: AlignedStripProps) {
  const id = useId();
  const { ref, width } = useWidth();
  const travel = estimate?.response.displacementPeak ?? null;
  const rest = estimate?.mechanics.restPosition ?? null;
  const restMm = (rest ?? 0) * 1000;
  const motion = useMemo(() => motionOf(estimate), [estimate]);
  const play = usePlay(motion, estimate?.mechanics.naturalFrequency ?? null);
  const [held, setHeld] = useState<{ at: number; pinned: boolean } | null>(null);

  const drawn = useMemo(() => drawDevice(device, (travel ?? 0) * 1000), [device, travel]);
  const curve = useMemo(() => curveOf(estimate), [estimate]);
  const { drawing } = drawn;
  const domain = useMemo(
    () => (curve && !previous ? tightened(drawn.domain, drawing, curve.position) : drawn.domain),
    [drawn, drawing, curve, previous],
  );
  const lanes = useMemo(
    () =>
      curve ? { flux: laneOf(curve.fluxLinkage, 'V·s', 'milli'), coupling: laneOf(curve.coupling, 'V·s/m') } : null,
    [curve],
  );
  const layout = useMemo(
    () => stripLayout({ width: Math.max(width, 280), domain, drawing, lanes: 2 }),
    [width, domain, drawing],
  );
  const placed = useMemo(() => placeDimensions(drawing.dimensions, layout.x), [drawing, layout]);
  const fixedDimensions = useMemo(() => placed.filter(({ dimension }) => !dimension.moves), [placed]);
  const movingDimensions = useMemo(() => placed.filter(({ dimension }) => dimension.moves), [placed]);

  const position = play.time !== null ? restMm + play.displacement : (held?.at ?? restMm);
  const at = curve ? curveAt(curve, position) : null;
  const within = (mm: number) => Math.min(domain.to, Math.max(domain.from, mm));
  const cursor = layout.x(within(position));
  const step = domain.to - domain.from > 200 ? 1 : domain.to - domain.from > 8 ? 0.1 : 0.01;

  const { reset: stopPlay } = play;
  const hold = useCallback(
    (mm: number, pinned: boolean) => {
      stopPlay();
      setHeld({ at: mm, pinned });
    },
    [stopPlay],
  );
  const release = () => {
    stopPlay();
    setHeld(null);
  };
  const toggle = () => {
    setHeld(null);
    play.toggle();
  };

  const dragging = useRef(false);
  const placeOf = (event: PointerEvent<HTMLElement>) => {
    const box = event.currentTarget.getBoundingClientRect();
    return within(layout.positionAt(event.clientX - box.left));
  };
  const onPointerDown = (event: PointerEvent<HTMLElement>) => {
    if (event.button !== 0) return;
    dragging.current = true;
    event.currentTarget.setPointerCapture?.(event.pointerId);
    hold(placeOf(event), true);
  };
  const onPointerMove = (event: PointerEvent<HTMLElement>) => {
    if (dragging.current) hold(placeOf(event), true);
    else if (event.pointerType === 'mouse' && play.time === null && !held?.pinned) {
      const box = event.currentTarget.getBoundingClientRect();
      // Over the drawing the assembly waits to be taken; over the curves it follows at once.
      if (event.clientY - box.top > (layout.lanes[0]?.top ?? 0) - 8) hold(placeOf(event), false);
      else setHeld(null);
    }
  };
  const onPointerUp = () => {
    dragging.current = false;
  };
  const onPointerLeave = () => {
    if (!dragging.current && !held?.pinned) setHeld(null);
  };
  const onKeyDown = (event: KeyboardEvent<HTMLElement>) => {
    const stride = event.shiftKey ? step * 10 : step;
    const rounded = (mm: number) => Number((Math.round(mm / step) * step).toFixed(6));
    const targets: Record<string, number> = {
      ArrowLeft: rounded(position - stride),
      ArrowDown: rounded(position - stride),
      ArrowRight: rounded(position + stride),
      ArrowUp: rounded(position + stride),
      PageDown: rounded(position - step * 10),
      PageUp: rounded(position + step * 10),
      Home: domain.from,
      End: domain.to,
    };
    const target = targets[event.key];
    if (target !== undefined) {
      event.preventDefault();
      hold(within(target), true);
    } else if (event.key === 'Escape' && (held || play.time !== null)) {
      event.preventDefault();
      release();
    }
  };

  const band =
    travel === null || rest === null
      ? null
      : { from: Math.max(domain.from, restMm - travel * 1000), to: Math.min(domain.to, restMm + travel * 1000) };
  const spoken = [
    `${formatPlace(position)} mm`,
    ...(at
      ? [`coupling ${at.coupling.toPrecision(3)} V·s/m`, `flux linkage ${(at.fluxLinkage * 1000).toPrecision(3)} mV·s`]
      : []),
  ].join(', ');
  const bottom = layout.axis;

  return (
    <div className="flex flex-col gap-2">
      <StripHeader
        play={{ ...play, toggle }}
        {...{ motion, position, travel }}
        at={
          lanes && at
            ? {
                fluxLinkage: [laneText(lanes.flux, at.fluxLinkage), lanes.flux.unit],
                coupling: [laneText(lanes.coupling, at.coupling), lanes.coupling.unit],
              }
            : null
        }
        moved={held?.pinned === true || (play.time !== null && !play.playing)}
        onReset={release}
      />
      <div ref={ref} className="relative w-full" style={{ minHeight: layout.height }}>
        {width === 0 ? null : (
          <svg
            width={layout.width}
            height={layout.height}
            role="img"
            aria-label={describeStrip(device, estimate)}
            className="block max-w-full font-sans"
          >
            <clipPath id={`${id}-clip`}>
              <rect x={layout.left} y={0} width={layout.right - layout.left} height={layout.height} />
            </clipPath>
            {band && band.to > band.from ? (
              <g className="fill-copper stroke-copper">
                <rect
                  x={layout.x(band.from)}
                  y={layout.top}
                  width={Math.max(1, layout.x(band.to) - layout.x(band.from))}
                  height={bottom - layout.top}
                  fillOpacity={0.11}
                  stroke="none"
                />
                <path
                  d={`M${layout.x(band.from)} ${layout.lanes[0]?.top ?? 0}V${bottom}M${layout.x(band.to)} ${layout.lanes[0]?.top ?? 0}V${bottom}`}
                  strokeWidth={0.7}
                  strokeOpacity={0.5}
                />
              </g>
            ) : null}
            <g clipPath={`url(#${id}-clip)`}>
              {drawing.centreLine ? (
                <line
                  x1={layout.left}
                  x2={layout.right}
                  y1={layout.y(0)}
                  y2={layout.y(0)}
                  className="stroke-graphite"
                  strokeOpacity={0.6}
                  strokeDasharray="14 4 2 4"
                />
              ) : null}
              <FixedParts drawing={drawing} scales={layout} id={id} />
              <Springs springs={drawing.springs} scales={layout} at={position} />
              <g transform={`translate(${position * layout.scale} 0)`}>
                <MovingParts drawing={drawing} scales={layout} />
                <Dimensions
                  placed={movingDimensions}
                  scales={layout}
                  sectionTop={layout.sectionTop}
                  sectionBottom={layout.sectionBottom}
                />
              </g>
              <Clashes drawing={drawing} scales={layout} id={id} />
              <Dimensions
                placed={fixedDimensions}
                scales={layout}
                sectionTop={layout.sectionTop}
                sectionBottom={layout.sectionBottom}
              />
              {drawing.plan && layout.planY ? (
                <Plan plan={drawing.plan} layout={layout} planY={layout.planY} at={position} />
              ) : null}
            </g>
            <g>
              {curve && lanes ? (
                <>
                  <CurveLane
                    title="flux linkage"
                    lane={lanes.flux}
                    index={0}
                    {...{ curve, domain, layout, previous }}
                  />
                  <CurveLane
                    title="coupling"
                    lane={lanes.coupling}
                    index={1}
                    copper
                    {...{ curve, domain, layout, previous }}
                  />
                </>
              ) : (
                <>
                  <EmptyLane title="flux linkage" index={0} layout={layout} words={absent} />
                  <EmptyLane title="coupling" index={1} layout={layout} words={absent} />
                </>
              )}
            </g>
            <PositionAxis {...{ domain, layout, rest: rest === null ? null : restMm, stops: drawing.stops }} />
            <line
              x1={cursor}
              x2={cursor}
              y1={layout.top}
              y2={bottom}
              className="stroke-copper"
              strokeWidth={1.2}
              strokeDasharray="2 3"
            />
            {lanes && at
              ? (
                  [
                    [lanes.flux, at.fluxLinkage],
                    [lanes.coupling, at.coupling],
                  ] as const
                ).map(([lane, value], index) => {
                  const box = layout.lanes[index];
                  return box ? (
                    <circle
                      key={index}
                      cx={cursor}
                      cy={laneY(lane, box, value * lane.scale)}
                      r={4}
                      className="fill-sheet stroke-copper"
                      strokeWidth={1.7}
                    />
                  ) : null;
                })
              : null}
          </svg>
        )}
        <div
          role="slider"
          tabIndex={0}
          aria-label="Position of the moving assembly"
          aria-orientation="horizontal"
          aria-valuemin={domain.from}
          aria-valuemax={domain.to}
          aria-valuenow={Number(position.toFixed(3))}
          aria-valuetext={spoken}
          className="absolute inset-0 cursor-ew-resize touch-pan-y rounded"
          onPointerDown={onPointerDown}
          onPointerMove={onPointerMove}
          onPointerUp={onPointerUp}
          onPointerCancel={onPointerUp}
          onPointerLeave={onPointerLeave}
          onDoubleClick={release}
          onKeyDown={onKeyDown}
        />
      </div>
      {drawing.clashes.length > 0 ? (
        <p className="text-sm text-cinnabar">
          <span aria-hidden className="mr-1 font-bold">
            ×
          </span>
          Hatched: a magnet and a winding share space, so the assembly cannot pass.
        </p>
      ) : null}
    </div>
  );
}
