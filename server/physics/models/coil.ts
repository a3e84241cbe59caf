/** Round winding. In the through layout `at` is a position along the travel, in the across layout a point. */
export interface RoundCoil {
  readonly shape: 'round';
  readonly innerDiameter: number;
  readonly outerDiameter: number;
  readonly length: number;
  readonly at: number | readonly number[];
  readonly turns: number;
  readonly sense: number;
}

/** Two straight sides along y joined by half circles; the turns nest evenly between inner and outer. */
export interface RacetrackCoil {
  readonly shape: 'racetrack';
  readonly straight: number;
  readonly innerEndRadius: number;
  readonly outerEndRadius: number;
  readonly length: number;
  readonly at: readonly number[];
  readonly turns: number;
  readonly sense: number;
}

/** Sharp-cornered rectangle, full sides along x and y. */
export interface RectangularCoil {
  readonly shape: 'rectangular';
  readonly inner: readonly number[];
  readonly outer: readonly number[];
  readonly length: number;
  readonly at: readonly number[];
  readonly turns: number;
  readonly sense: number;
}

export type CoilShape = RoundCoil | RacetrackCoil | RectangularCoil;
