/** Properties of a magnet's material as the design document gives them (SI, °C). */
export interface MagnetMaterial {
  /** Remanence at 20 °C (T). */
  readonly remanence: number;
  /** Relative recoil permeability, 1 for rigid magnetisation. */
  readonly recoilPermeability: number;
  /** Relative change of remanence per kelvin from 20 °C (1/K). */
  readonly remanencePerKelvin: number;
}

/** Cylinder or ring on the axis of travel, magnetised along it. */
export interface CylinderMagnet<Material extends MagnetMaterial = MagnetMaterial> {
  readonly shape: 'cylinder';
  readonly outerDiameter: number;
  readonly innerDiameter: number;
  readonly length: number;
  /** Centre along the travel for x = 0 (m). */
  readonly at: number;
  readonly polarity: number;
  readonly material: Material;
}

/** Block magnetised along z, the normal of the coil's face. */
export interface BlockMagnet<Material extends MagnetMaterial = MagnetMaterial> {
  readonly shape: 'block';
  /** Sides along travel x, across y, and z (m). */
  readonly size: readonly number[];
  /** Centre for x = 0 (m). */
  readonly at: readonly number[];
  readonly polarity: number;
  readonly material: Material;
}

export type Magnet<Material extends MagnetMaterial = MagnetMaterial> = CylinderMagnet<Material> | BlockMagnet<Material>;
