import type { Context } from "konva/lib/Context";
import type { Layer as KonvaLayer } from "konva/lib/Layer";
import { useCallback, useLayoutEffect, useRef } from "react";
import { Layer, Shape } from "react-konva";
import type { Pen } from "./paint/pen";

export interface PaintedLayerProps {
  readonly name: string;
  readonly paint: (pen: Pen) => void;
  /** Pixels of the window for a pixel of the stage: an enlarged interface is painted as sharply as a plain one. */
  readonly zoom: number;
}

/** One sheet of the stage with a picture painted on it. It is painted again only when `paint` is another function. */
export function PaintedLayer({ name, paint, zoom }: PaintedLayerProps) {
  const layer = useRef<KonvaLayer>(null);
  useLayoutEffect(() => {
    const canvas = layer.current?.getCanvas();
    const ratio = window.devicePixelRatio * zoom;
    if (canvas === undefined || canvas.getPixelRatio() === ratio) return;
    canvas.setPixelRatio(ratio);
    layer.current?.batchDraw();
  }, [zoom]);
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
    <Layer ref={layer} name={name} listening={false}>
      <Shape listening={false} perfectDrawEnabled={false} sceneFunc={scene} />
    </Layer>
  );
}
