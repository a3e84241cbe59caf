import type { CatalogueEntry } from '#contracts/catalogue';
import type { Estimate } from '#contracts/estimates';
import { formatQuantity } from '../../lib/quantities';
import { formatNumber, formatPercent } from '../../lib/format';

/** Derived figures under the fields they follow from; absent where they were not computed. */
export interface DesignHints {
  stiffness?: string | undefined;
  mass?: string | undefined;
  damping?: string | undefined;
  quality?: string | undefined;
  winding?: string | undefined;
  fill?: string | undefined;
  load?: string | undefined;
}

const joined = (parts: (string | null)[]): string | undefined => {
  const said = parts.filter((part) => part !== null);
  return said.length > 0 ? said.join(' · ') : undefined;
};

const figure = (value: number | null, dimension: Parameters<typeof formatQuantity>[1]): string | null =>
  value === null ? null : formatQuantity(value, dimension);

/** What the estimate says about the fields, in a few words each. */
export function hintsOf(estimate: Estimate | null): DesignHints {
  if (!estimate) return {};
  const { mechanics, coil, bounds } = estimate;
  const frequency = figure(mechanics.naturalFrequency, 'frequency');
  const mass = figure(mechanics.movingMass, 'mass');
  const best = figure(bounds.bestResistiveLoad, 'resistance');
  return {
    stiffness: frequency === null ? undefined : mass === null ? frequency : `${frequency} with ${mass}`,
    mass: mass === null ? undefined : `${mass} moves`,
    damping:
      mechanics.dampingCoefficient === null ? undefined : `damping ${formatNumber(mechanics.dampingCoefficient)} N·s/m`,
    quality: mechanics.quality === null ? undefined : `quality factor ${formatNumber(mechanics.quality)}`,
    winding: joined([figure(coil.resistance, 'resistance'), figure(coil.inductance, 'inductance')]),
    fill: joined([
      coil.fillFactor === null ? null : `fill ${formatPercent(coil.fillFactor, 3)}`,
      coil.windable === false ? 'cannot be wound' : null,
    ]),
    load: best === null ? undefined : `best ${best} here`,
  };
}

const propertyOf = (entry: CatalogueEntry | undefined, label: string): number | null =>
  entry?.properties.find((property) => property.label.startsWith(label))?.value ?? null;

/** “1.30 T at 20 °C · −0.12 %/K” of a magnet material in the catalogue. */
export function materialHint(entry: CatalogueEntry | undefined): string | undefined {
  const remanence = propertyOf(entry, 'Remanence at 20');
  const perKelvin = propertyOf(entry, 'Remanence over temperature');
  return joined([
    remanence === null ? null : `${formatNumber(remanence)} T at 20 °C`,
    perKelvin === null ? null : `${formatNumber(perKelvin * 100, 2)} %/K`,
  ]);
}

/** “0.117 mm overall” of a wire in the catalogue. */
export function wireHint(entry: CatalogueEntry | undefined): string | undefined {
  const overall = propertyOf(entry, 'Overall diameter');
  return overall === null ? undefined : `${formatNumber(overall * 1000)} mm overall`;
}
