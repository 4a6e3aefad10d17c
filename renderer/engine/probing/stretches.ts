import type { Place } from "./rounded-place";

/** An unbroken stretch of a line that the probe can follow. */
export interface Stretch {
  readonly places: readonly Place[];
  /** Distance along the stretch at each place, mm; of a loop the last place is the first again. */
  readonly along: readonly number[];
  readonly lengthMm: number;
  readonly closed: boolean;
}

/** Finest look along a line, mm, and how exactly the end of what can be reached is found. */
const LOOK_MM = 0.5;
const END_MM = 1e-4;
/** The sense in which open stretches are followed: mostly away from the reader, then to the right. */
const SENSE: Place = [0.3, 0.95];
/** A loop whose middle is nearer than this to the tray's (mm) counts as lying round it. */
const CENTRED_MM = 10;

const between = ([ax, ay]: Place, [bx, by]: Place, share: number): Place => [ax + share * (bx - ax), ay + share * (by - ay)];

function stretchOf(places: readonly Place[], closed: boolean): Stretch {
  const along = [0];
  for (let index = 1; index < places.length; index++) {
    along.push(along[index - 1] + Math.hypot(places[index][0] - places[index - 1][0], places[index][1] - places[index - 1][1]));
  }
  return { places, along, lengthMm: along[along.length - 1], closed };
}

/** The path with places at most LOOK_MM apart. */
function closelyPlaced(path: Float64Array): Place[] {
  const places: Place[] = [[path[0], path[1]]];
  for (let index = 2; index < path.length; index += 2) {
    const from: Place = [path[index - 2], path[index - 1]];
    const to: Place = [path[index], path[index + 1]];
    const count = Math.max(1, Math.ceil(Math.hypot(to[0] - from[0], to[1] - from[1]) / LOOK_MM));
    for (let step = 1; step <= count; step++) places.push(between(from, to, step / count));
  }
  return places;
}

function lastClear(clear: Place, hindered: Place, isClear: (place: Place) => boolean): Place {
  let near = clear;
  let far = hindered;
  while (Math.hypot(far[0] - near[0], far[1] - near[1]) > END_MM) {
    const middle = between(near, far, 0.5);
    if (isClear(middle)) near = middle;
    else far = middle;
  }
  return near;
}

function inSense(places: readonly Place[]): readonly Place[] {
  const [first, last] = [places[0], places[places.length - 1]];
  const forward = (last[0] - first[0]) * SENSE[0] + (last[1] - first[1]) * SENSE[1];
  return forward < 0 ? [...places].reverse() : places;
}

/** A loop followed counter-clockwise from the side that faces the tray's middle: right, upper, left or lower. */
function loopFrom(places: readonly Place[], [middleX, middleY]: Place): readonly Place[] {
  const ring = places.slice(0, -1);
  const x = ring.reduce((sum, place) => sum + place[0], 0) / ring.length;
  const y = ring.reduce((sum, place) => sum + place[1], 0) / ring.length;
  let twiceArea = 0;
  ring.forEach(([ax, ay], index) => {
    const [bx, by] = ring[(index + 1) % ring.length];
    twiceArea += (ax - x) * (by - y) - (bx - x) * (ay - y);
  });
  const ordered = twiceArea < 0 ? ring.reverse() : ring;
  const [dx, dy] = [middleX - x, middleY - y];
  const quarter = Math.hypot(dx, dy) < CENTRED_MM ? [1, 0] : Math.abs(dx) >= Math.abs(dy) ? [Math.sign(dx), 0] : [0, Math.sign(dy)];
  // The outermost crossing with the ray from the loop's middle; places on either side of it have across < 0 ≤ across.
  const across = ([px, py]: Place): number => (py - y) * quarter[0] - (px - x) * quarter[1];
  const outward = ([px, py]: Place): number => (px - x) * quarter[0] + (py - y) * quarter[1];
  let start = 0;
  let first = ordered[0];
  let farthest = -Infinity;
  ordered.forEach((place, index) => {
    const following = ordered[(index + 1) % ordered.length];
    const [here, there] = [across(place), across(following)];
    if (!(here < 0 && there >= 0)) return;
    const crossing = between(place, following, here / (here - there));
    if (outward(crossing) <= farthest) return;
    farthest = outward(crossing);
    start = (index + 1) % ordered.length;
    first = crossing;
  });
  return [first, ...ordered.slice(start), ...ordered.slice(0, start), first];
}

/**
 * The parts of a path that are clear, each followed in a sense that does not depend on how the path was traced.
 * @param path x, y, x, y … in mm; a closed path repeats its first point.
 * @param middle the tray's middle, mm.
 */
export function clearStretches(path: Float64Array, isClear: (place: Place) => boolean, middle: Place): readonly Stretch[] {
  const all = closelyPlaced(path);
  const closed = path.length >= 8 && path[0] === path[path.length - 2] && path[1] === path[path.length - 1];
  const clear = all.map(isClear);
  if (closed && clear.every((yes) => yes)) return [stretchOf(loopFrom(all, middle), true)];
  let places = all;
  let flags = clear;
  if (closed) {
    // A loop that is broken somewhere is an open line that begins there.
    const gap = clear.indexOf(false);
    places = [...all.slice(gap, -1), ...all.slice(0, gap + 1)];
    flags = [...clear.slice(gap, -1), ...clear.slice(0, gap + 1)];
  }
  const stretches: Stretch[] = [];
  let run: Place[] = [];
  const finish = (): void => {
    if (run.length > 1) stretches.push(stretchOf(inSense(run), false));
    run = [];
  };
  places.forEach((place, index) => {
    if (flags[index]) {
      if (run.length === 0 && index > 0) run.push(lastClear(place, places[index - 1], isClear));
      run.push(place);
    } else if (run.length > 0) {
      run.push(lastClear(places[index - 1], place, isClear));
      finish();
    }
  });
  finish();
  return stretches;
}

/** @returns the place (mm) at a distance along a stretch. */
export function placeAlong({ places, along, lengthMm }: Stretch, distanceMm: number): Place {
  const wanted = Math.min(lengthMm, Math.max(0, distanceMm));
  let low = 0;
  let high = along.length - 1;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if (along[middle] <= wanted) low = middle;
    else high = middle;
  }
  const span = along[high] - along[low];
  return between(places[low], places[high], span === 0 ? 0 : (wanted - along[low]) / span);
}

/** @returns how far along the sense of stretches the middle of one lies: stretches of one level are taken in this order. */
export function orderAlong(stretch: Stretch): number {
  const [x, y] = placeAlong(stretch, stretch.lengthMm / 2);
  return x * SENSE[0] + y * SENSE[1];
}
