/** A place and the function there. */
interface Point {
  readonly x: number;
  readonly f: number;
}

/** Point on the other side of the root, by doubling steps; null where the floor is reached without crossing. */
function acrossFrom(f: (x: number) => number, from: Point, step: number, floor: number): [Point, Point] | null {
  const direction = from.f > 0 ? 1 : -1;
  let near = from;
  let reach = step;
  for (let i = 0; i < 1100; i++) {
    const x = Math.max(floor, near.x + direction * reach);
    const far = { x, f: f(x) };
    if (far.f > 0 !== from.f > 0) return [near, far];
    if (x === floor) return null;
    near = far;
    reach *= 2;
  }
  return null;
}

/**
 * Root of a falling, nearly linear function, by false position with the Illinois correction inside a bracket.
 * @param f falling function; may be infinite away from its root
 * @param start first guess
 * @param step how far the guess may be off, above 0
 * @param floor smallest place to look at; -Infinity unless given
 * @returns the root to 1e-14 max(1, |root|), or null where f is below 0 down to the floor
 * @source Dowell & Jarratt 1971, Illinois method; bisection where a value is infinite
 * @checked by hand, 1e-13; through the grids nct_ncp and ncf_ncp, 1e-11
 */
export function fallingRoot(f: (x: number) => number, start: number, step: number, floor = -Infinity): number | null {
  const first = { x: Math.max(start, floor), f: f(Math.max(start, floor)) };
  if (first.f === 0) return first.x;
  const bracket = acrossFrom(f, first, step, floor);
  if (bracket === null) return null;
  let [old, recent] = bracket;
  for (let i = 0; i < 300; i++) {
    let x = recent.x - (recent.f * (recent.x - old.x)) / (recent.f - old.f);
    if (!Number.isFinite(recent.f - old.f)) x = 0.5 * (old.x + recent.x);
    const next = { x, f: f(x) };
    const settled = Math.abs(x - recent.x) <= 1e-14 * Math.max(1, Math.abs(x));
    if (next.f === 0 || settled || x === old.x) return x;
    if (next.f > 0 !== recent.f > 0) old = recent;
    else old = { x: old.x, f: 0.5 * old.f };
    recent = next;
  }
  return recent.x;
}
