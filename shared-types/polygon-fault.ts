type PointMm = readonly [number, number];

const cross = (o: PointMm, a: PointMm, b: PointMm): number => (a[0] - o[0]) * (b[1] - o[1]) - (a[1] - o[1]) * (b[0] - o[0]);

const within = (a: PointMm, b: PointMm, p: PointMm): boolean =>
  Math.min(a[0], b[0]) <= p[0] && p[0] <= Math.max(a[0], b[0]) && Math.min(a[1], b[1]) <= p[1] && p[1] <= Math.max(a[1], b[1]);

function edgesMeet(a: PointMm, b: PointMm, c: PointMm, d: PointMm): boolean {
  const abc = Math.sign(cross(a, b, c));
  const abd = Math.sign(cross(a, b, d));
  const cda = Math.sign(cross(c, d, a));
  const cdb = Math.sign(cross(c, d, b));
  if (abc !== abd && cda !== cdb) return true;
  return (
    (abc === 0 && within(a, b, c)) || (abd === 0 && within(a, b, d)) || (cda === 0 && within(c, d, a)) || (cdb === 0 && within(c, d, b))
  );
}

/**
 * Says what keeps a list of vertices (mm) from being a simple polygon.
 * @returns a sentence fragment for an error message ("has …, allowed: …"), or null for a sound polygon.
 */
export function polygonFault(points: readonly PointMm[]): string | null {
  const count = points.length;
  const vertex = (index: number): PointMm => points[index % count] as PointMm;
  for (let i = 0; i < count; i++) {
    const [x0, y0] = vertex(i);
    const [x1, y1] = vertex(i + 1);
    if (Math.hypot(x1 - x0, y1 - y0) < 1e-3) {
      return `has vertices ${i} and ${(i + 1) % count} at the same place, allowed: neighbours at least 0.001 mm apart`;
    }
    const before = vertex(i + count - 1);
    const turn = cross(before, vertex(i), vertex(i + 1));
    const along = (x0 - before[0]) * (x1 - x0) + (y0 - before[1]) * (y1 - y0);
    if (turn === 0 && along < 0) return `folds back on itself at vertex ${i}, allowed: a simple polygon`;
  }
  for (let i = 0; i < count; i++) {
    for (let j = i + 2; j < count; j++) {
      if (i === 0 && j === count - 1) continue;
      if (edgesMeet(vertex(i), vertex(i + 1), vertex(j), vertex(j + 1))) {
        return `has edges ${i} and ${j} that meet, allowed: a simple polygon whose edges do not cross`;
      }
    }
  }
  let twiceArea = 0;
  for (let i = 0; i < count; i++) twiceArea += vertex(i)[0] * vertex(i + 1)[1] - vertex(i + 1)[0] * vertex(i)[1];
  return Math.abs(twiceArea) < 2e-2 ? "encloses no area, allowed: at least 0.01 mm²" : null;
}
