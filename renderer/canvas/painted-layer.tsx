import type { Context } from "konva/lib/Context";
import { useCallback } from "react";
import { Layer, Shape } from "react-konva";
import type { Pen } from "./paint/pen";

/** One sheet of the stage with a picture painted on it. It is painted again only when `paint` is another function. */
export function PaintedLayer({ name, paint }: { readonly name: string; readonly paint: (pen: Pen) => void }) {
  const scene = useCallback(
    (context: Context) => {
      const pen = context._context;
      pen.save();
      paint(pen);
      pen.restore();
    },
    [paint],
  );
  return (
    <Layer name={name} listening={false}>
      <Shape listening={false} perfectDrawEnabled={false} sceneFunc={scene} />
    </Layer>
  );
}
