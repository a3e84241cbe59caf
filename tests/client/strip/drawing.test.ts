import { describe, expect, it } from 'vitest';
import { acrossSection } from '../../../src/features/strip/across-section';
import { readStripDevice } from '../../../src/features/strip/device';
import type { AcrossDevice, ThroughDevice } from '../../../src/features/strip/device';
import { domainOf, niceStep, positionsOf, ticksOf } from '../../../src/features/strip/domain';
import { zigzag } from '../../../src/features/strip/drawing';
import { placeDimensions, stripLayout } from '../../../src/features/strip/strip-layout';
import { throughSection } from '../../../src/features/strip/through-section';
import reference from '../../reference/cases/F2-01.json';

const device = readStripDevice(reference.design) as ThroughDevice;
const withMagnet = (change: object) =>
  readStripDevice({ ...reference.design, magnets: [{ ...reference.design.magnets[0], ...change }] }) as ThroughDevice;

describe('throughSection', () => {
  it('puts south on the left and north on the right of a magnet along +x, with the arrow from south to north', () => {
    const { moving } = throughSection(device);
    const [left, right] = moving.poles;
    expect(left).toMatchObject({ pole: 'S', rect: { x0: -5, x1: 0, y0: -5, y1: 5 } });
    expect(right).toMatchObject({ pole: 'N', rect: { x0: 0, x1: 5, y0: -5, y1: 5 } });
    const [arrow] = moving.arrows;
    expect(arrow?.to[0]).toBeGreaterThan(arrow?.from[0] ?? Infinity);
    const turned = throughSection(withMagnet({ polarity: -1 })).moving;
    expect(turned.poles.map(({ pole }) => pole)).toEqual(['N', 'S']);
    expect(turned.arrows[0]?.to[0]).toBeLessThan(turned.arrows[0]?.from[0] ?? -Infinity);
  });

  it('cuts the winding above and below the axis, true to size', () => {
    const { windings } = throughSection(device);
    expect(windings).toHaveLength(2);
    const [upper, lower] = windings.map(({ rect }) => rect);
    expect(upper?.y0).toBeCloseTo(6, 12);
    expect(upper?.y1).toBeCloseTo(9, 12);
    expect(lower?.y1).toBeCloseTo(-6, 12);
    expect((upper?.x0 ?? 0) + (upper?.x1 ?? 0)).toBeCloseTo(2 * -5.567299, 9);
    expect((upper?.x1 ?? 0) - (upper?.x0 ?? 0)).toBeCloseTo(6, 12);
  });

  it('cuts a ring twice and leaves its bore open', () => {
    const { moving } = throughSection(withMagnet({ innerDiameter: '4 mm' }));
    expect(moving.poles).toHaveLength(4);
    for (const { rect } of moving.poles) expect(rect.y0 >= 2 - 1e-9 || rect.y1 <= -2 + 1e-9).toBe(true);
  });

  it('marks where a magnet cannot pass the winding, wherever it stands at rest', () => {
    expect(throughSection(device).clashes).toEqual([]);
    const { clashes } = throughSection(withMagnet({ outerDiameter: '14 mm', at: '20 mm' }));
    expect(clashes[0]).toMatchObject({ y0: 6, y1: 7 });
    expect(clashes).toHaveLength(2);
  });

  it('draws stops where the assembly touches them', () => {
    const stopped = readStripDevice({
      ...reference.design,
      stops: { lower: '-4 mm', upper: '3 mm', stiffness: 1e5 },
    }) as ThroughDevice;
    const { stops } = throughSection(stopped);
    expect(stops.find(({ side }) => side === 'lower')?.rects[0]?.x1).toBeCloseTo(-9, 12);
    expect(stops.find(({ side }) => side === 'upper')?.rects[0]?.x0).toBeCloseTo(8, 12);
  });

  it('draws a helical spring by its own diameter and turns', () => {
    const helical = readStripDevice({
      ...reference.design,
      suspension: { kind: 'helical', wireDiameter: '0.5 mm', meanDiameter: '7 mm', activeTurns: 9 },
    }) as ThroughDevice;
    expect(throughSection(helical).springs).toMatchObject([{ amplitude: 3.5, turns: 9, toScale: true }]);
  });

  it('keeps every part inside its extent, whatever the dimensions', () => {
    for (const change of [{ length: 0.3 }, { outerDiameter: 1e-5, length: 1 }, { at: 0.5 }, { outerDiameter: 0.8 }]) {
      const drawing = throughSection(withMagnet(change), 2000);
      const { x0, x1, y0, y1 } = drawing.extent;
      for (const rect of [...drawing.moving.outlines, ...drawing.walls, ...drawing.windings.map((each) => each.rect)]) {
        expect(rect.x0).toBeGreaterThanOrEqual(x0);
        expect(rect.x1).toBeLessThanOrEqual(x1);
        expect(rect.y0).toBeGreaterThanOrEqual(y0);
        expect(rect.y1).toBeLessThanOrEqual(y1);
      }
      expect(Object.values(drawing.extent).every(Number.isFinite)).toBe(true);
    }
  });

  it('draws an empty device without failing', () => {
    const empty = readStripDevice({ layout: 'through' }) as ThroughDevice;
    const drawing = throughSection(empty);
    expect(drawing.moving.hull).toBeNull();
    expect(domainOf(empty, drawing).to).toBeGreaterThan(domainOf(empty, drawing).from);
  });
});

describe('acrossSection', () => {
  it('lays the poles on each other and shows in plan the pole that faces the coil', () => {
    const across = readStripDevice({
      layout: 'across',
      magnets: [{ shape: 'block', size: [0.01, 0.01, 0.004], at: [0, 0, 0.00375], polarity: 1 }],
      coils: [
        { shape: 'round', innerDiameter: 0.006, outerDiameter: 0.018, length: 0.0025, at: [0, 0, 0], turns: 500 },
      ],
    }) as AcrossDevice;
    const { moving, windings, plan, clashes } = acrossSection(across);
    const north = moving.poles.find(({ pole }) => pole === 'N');
    expect(north?.rect.y0).toBeCloseTo(3.75, 12);
    expect(windings).toHaveLength(2);
    expect(windings[0]?.rect.x0).toBeCloseTo(-9, 12);
    expect(windings[0]?.rect.x1).toBeCloseTo(-3, 12);
    expect(plan?.magnets[0]?.facing).toBe('S');
    expect(clashes).toEqual([]);
  });
});

describe('the shared scale', () => {
  const drawing = throughSection(device);
  const domain = domainOf(device, drawing);

  it('shows the whole drawing and where the coil meets the magnet, in round numbers', () => {
    expect(domain.from).toBeLessThanOrEqual(drawing.extent.x0);
    expect(domain.to).toBeGreaterThanOrEqual(drawing.extent.x1);
    expect(domain.from).toBeLessThan(-5.567 - 8);
    expect(Number.isInteger(domain.from * 2)).toBe(true);
  });

  it('asks the estimate for positions over just that stretch, in metres', () => {
    const positions = positionsOf(domain);
    expect(positions).toHaveLength(201);
    expect(positions[0]).toBeCloseTo(domain.from / 1000, 12);
    expect(positions.at(-1)).toBeCloseTo(domain.to / 1000, 12);
  });

  it('is equal in both directions at every width', () => {
    for (const width of [300, 640, 1400, 2400]) {
      const layout = stripLayout({ width, domain, drawing, lanes: 2 });
      const horizontal = layout.x(1) - layout.x(0);
      const vertical = layout.y(0) - layout.y(1);
      expect(vertical).toBeCloseTo(horizontal, 9);
      expect(layout.right).toBeLessThanOrEqual(width);
      expect(layout.sectionBottom - layout.sectionTop).toBeLessThanOrEqual(521);
      expect(layout.positionAt(layout.x(3.21))).toBeCloseTo(3.21, 9);
    }
  });

  it('leaves out wording that would run into its neighbour, never the dimension itself', () => {
    const close = [-4, 0, 4].map((at) => ({
      from: at - 1,
      to: at + 1,
      y: 5,
      side: 'above' as const,
      text: '2.00 · 1000 turns',
      shortText: '2.00',
      moves: false,
    }));
    const placed = placeDimensions(close, (mm) => mm * 12);
    expect(placed).toHaveLength(3);
    expect(placed.map(({ label }) => label)).toEqual(['2.00 · 1000 turns', '', '2.00']);
  });
});

describe('ticks and springs', () => {
  it('steps by 1, 2 or 5', () => {
    expect([0.3, 1, 1.7, 4.9, 6, 230].map(niceStep)).toEqual([0.5, 1, 2, 5, 10, 500]);
    expect(ticksOf(-21, 21, 8)).toEqual([-20, -15, -10, -5, 0, 5, 10, 15, 20]);
    expect(ticksOf(5, 5, 4)).toEqual([]);
  });

  it('joins the fixed end to the assembly', () => {
    const points = zigzag(-13, -5, 0, 0.8, 8);
    expect(points[0]).toEqual([-13, 0]);
    expect(points.at(-1)).toEqual([-5, 0]);
    expect(Math.max(...points.map(([, y]) => y))).toBeCloseTo(0.8, 12);
  });
});
