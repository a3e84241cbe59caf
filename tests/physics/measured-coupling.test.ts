import { describe, expect, it } from 'vitest';
import { constantCoupling, measuredCoupling } from '../../server/physics/models/coupling';

describe('measured coupling', () => {
  it('a constant has no slope and a flux linkage in proportion to x', () => {
    const table = constantCoupling(-6.05);
    expect(table.at(0.3)).toBe(-6.05);
    expect(table.slopeAt(0.3)).toBe(0);
    expect(table.fluxAt(2e-3)).toBeCloseTo(-0.0121, 15);
    expect(() => constantCoupling(NaN)).toThrow(/finite/);
  });

  it('a curve passes its points, and the flux linkage is its integral, inside and outside', () => {
    const position = [-3e-3, -1e-3, 0, 2e-3, 3e-3];
    const coupling = [-1, 2, 5, 4, 4.5];
    const table = measuredCoupling(position, coupling);
    position.forEach((x, i) => expect(table.at(x)).toBeCloseTo(coupling[i]!, 12));
    const h = 1e-7;
    for (const x of [-5e-3, -2.2e-3, -0.4e-3, 0.9e-3, 2.9e-3, 4e-3]) {
      expect((table.fluxAt(x + h) - table.fluxAt(x - h)) / (2 * h)).toBeCloseTo(table.at(x), 7);
      expect((table.at(x + h) - table.at(x - h)) / (2 * h)).toBeCloseTo(table.slopeAt(x), 2);
    }
    for (const x of position) expect(table.fluxAt(x + 1e-12)).toBeCloseTo(table.fluxAt(x - 1e-12), 10);
    expect(table.at(-1)).toBe(-1);
    expect(table.at(1)).toBe(4.5);
  });
});
