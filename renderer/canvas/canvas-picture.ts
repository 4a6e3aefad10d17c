/** Colour under the tray's picture where the window has none. */
const PAPER = "#ffffff";

function groundUnder(element: Element | null): string {
  for (let at = element; at !== null; at = at.parentElement) {
    const { backgroundColor } = getComputedStyle(at);
    if (backgroundColor !== "" && !/^(transparent|rgba\(.*, 0\))$/.test(backgroundColor)) return backgroundColor;
  }
  return PAPER;
}

/** @returns the tray as the window shows it, its layers over each other at the screen's own dots, as PNG; null while no tray is shown. */
export async function canvasPicture(page: Document): Promise<Uint8Array<ArrayBuffer> | null> {
  const layers = [...page.querySelectorAll<HTMLCanvasElement>(".tray-surface canvas")];
  const [first] = layers;
  if (first === undefined) return null;
  const whole = page.createElement("canvas");
  whole.width = first.width;
  whole.height = first.height;
  const pen = whole.getContext("2d");
  if (pen === null) return null;
  pen.fillStyle = groundUnder(first);
  pen.fillRect(0, 0, whole.width, whole.height);
  for (const layer of layers) pen.drawImage(layer, 0, 0, whole.width, whole.height);
  const png = await new Promise<Blob | null>((resolve) => whole.toBlob(resolve, "image/png"));
  return png === null ? null : new Uint8Array(await png.arrayBuffer());
}
