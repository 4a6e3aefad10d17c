import fc from "fast-check";
import type { PlacedShape, Shape } from "../../../../shared-types/setup";

const size = (low: number, high: number): fc.Arbitrary<number> => fc.double({ min: low, max: high, noNaN: true });

/** Shapes of every kind, 4 to 60 mm across. */
export const anyShape: fc.Arbitrary<Shape> = fc.oneof(
  fc.record({ kind: fc.constant("bar" as const), lengthMm: size(4, 60), widthMm: size(2, 30) }),
  fc.record({ kind: fc.constant("disc" as const), diameterMm: size(4, 50) }),
  fc
    .record({ outerMm: size(10, 60), share: size(0.3, 0.95) })
    .map(({ outerMm, share }) => ({ kind: "ring" as const, outerMm, innerMm: outerMm * share })),
  fc
    .record({ outerMm: size(10, 60), share: size(0.3, 0.95), sweepDeg: size(20, 340) })
    .map(({ outerMm, share, sweepDeg }) => ({ kind: "arc" as const, outerMm, innerMm: outerMm * share, sweepDeg })),
  fc
    .record({ lengthMm: size(10, 60), widthMm: size(10, 60), share: size(0.05, 0.45) })
    .map(({ lengthMm, widthMm, share }) => ({ kind: "frame" as const, lengthMm, widthMm, wallMm: share * Math.min(lengthMm, widthMm) })),
  // A star round the origin is always simple.
  fc.array(size(4, 30), { minLength: 3, maxLength: 9 }).map((radii) => ({
    kind: "polygon" as const,
    pointsMm: radii.map((radius, index): [number, number] => {
      const angle = (2 * Math.PI * index) / radii.length;
      return [radius * Math.cos(angle), radius * Math.sin(angle)];
    }),
  })),
);

/** A shape somewhere within a square of the given half-side round the origin. */
export const placedWithin = (halfMm: number): fc.Arbitrary<PlacedShape> =>
  fc.record({
    id: fc.constant("part"),
    xMm: size(-halfMm, halfMm),
    yMm: size(-halfMm, halfMm),
    turnDeg: fc.oneof(fc.constantFrom(0, 90, 180, 270), size(-360, 360)),
    shape: anyShape,
  });
