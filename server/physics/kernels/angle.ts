/** The same angle in (−π, π], rad. */
export function wrapAngle(angle: number): number {
  const turns = Math.ceil((angle - Math.PI) / (2 * Math.PI));
  return angle - 2 * Math.PI * turns;
}
