/** A line with fewer points: Douglas and Peucker's method (Cartographica 10(2), 1973, 112-122). */
type Point = readonly [number, number];

/** Which points stay so that none of the others is further than `tolerance` from the line; the first and the last always do. */
export function kept(points: readonly Point[], tolerance: number): number[] {
  const stay = new Uint8Array(points.length);
  stay[0] = 1;
  stay[points.length - 1] = 1;
  const open: [number, number][] = [[0, points.length - 1]];
  for (let piece = open.pop(); piece !== undefined; piece = open.pop()) {
    const [from, to] = piece;
    const [at, distance] = furthest(points, from, to);
    if (distance <= tolerance) continue;
    stay[at] = 1;
    open.push([from, at], [at, to]);
  }
  return Array.from(stay.keys()).filter((k) => stay[k] === 1);
}

function furthest(points: readonly Point[], from: number, to: number): [number, number] {
  const [p, q] = [points[from]!, points[to]!];
  const [dr, dz] = [q[0] - p[0], q[1] - p[1]];
  const length = Math.hypot(dr, dz);
  let [at, most] = [from, 0];
  for (let k = from + 1; k < to; k++) {
    const [r, z] = [points[k]![0] - p[0], points[k]![1] - p[1]];
    // Of a closed line first and last are one point: the distance to it counts.
    const distance = length < 1e-12 ? Math.hypot(r, z) : Math.abs(r * dz - z * dr) / length;
    if (distance > most) [at, most] = [k, distance];
  }
  return [at, most];
}
