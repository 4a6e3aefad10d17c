import { type ImageItem, type Ink, type Item, type Page, type PathItem, plateOf, type TextItem } from "./page";

/** A page as SVG for the screen, from the very data that the PDF is drawn from. */

const escaped = (words: string): string => words.replace(/&/g, "&amp;").replace(/</g, "&lt;").replace(/>/g, "&gt;").replace(/"/g, "&quot;");
const mm = (value: number): string => String(Math.round(value * 1000) / 1000);

function colour(ink: Ink): string {
  if (typeof ink !== "number") return `rgb(${ink.join(" ")})`;
  const grey = Math.round(255 * ink);
  return `rgb(${grey} ${grey} ${grey})`;
}

function pathSvg({ chains, closed, stroke, fill, lineMm, dashMm }: PathItem, height: number): string {
  const d = chains.map((chain) => `M${chain.map(([x, y]) => `${mm(x)} ${mm(height - y)}`).join("L")}${closed ? "Z" : ""}`).join("");
  const dash = dashMm === undefined ? "" : ` stroke-dasharray="${dashMm.join(" ")}"`;
  return `<path d="${d}" fill="${fill === null ? "none" : colour(fill)}" fill-rule="evenodd" stroke="${stroke === null ? "none" : colour(stroke)}" stroke-width="${lineMm}"${dash}/>`;
}

function textSvg(item: TextItem, height: number): string {
  const { x, y, text, sizeMm, anchor, bold, turnDeg, ink } = item;
  const plate = plateOf(item);
  const under =
    plate === null
      ? ""
      : `<rect x="${mm(plate[0])}" y="${mm(height - plate[1] - plate[3])}" width="${mm(plate[2])}" height="${mm(plate[3])}" fill="#fff"/>`;
  const turn = turnDeg === undefined ? "" : ` transform="rotate(${-turnDeg} ${mm(x)} ${mm(height - y)})"`;
  return `${under}<text x="${mm(x)}" y="${mm(height - y)}" font-size="${sizeMm}"${bold ? ' font-weight="700"' : ""} text-anchor="${anchor}" fill="${colour(ink ?? 0)}"${turn}>${escaped(text)}</text>`;
}

/** A picture as a device-independent bitmap of 24 bits a dot, rows from below (BITMAPINFOHEADER), which needs no compression. */
function bitmap({ columns, rows, rgb }: ImageItem): string {
  const stride = 4 * Math.ceil((3 * columns) / 4);
  const bytes = new Uint8Array(54 + stride * rows);
  const view = new DataView(bytes.buffer);
  bytes.set([0x42, 0x4d]);
  view.setUint32(2, bytes.length, true);
  view.setUint32(10, 54, true);
  view.setUint32(14, 40, true);
  view.setInt32(18, columns, true);
  view.setInt32(22, rows, true);
  view.setUint16(26, 1, true);
  view.setUint16(28, 24, true);
  for (let row = 0; row < rows; row++) {
    for (let column = 0; column < columns; column++) {
      const from = 3 * ((rows - 1 - row) * columns + column);
      bytes.set([rgb[from + 2], rgb[from + 1], rgb[from]], 54 + stride * row + 3 * column);
    }
  }
  let binary = "";
  for (let start = 0; start < bytes.length; start += 0x8000) binary += String.fromCharCode(...bytes.subarray(start, start + 0x8000));
  return `data:image/bmp;base64,${btoa(binary)}`;
}

const imageSvg = (item: ImageItem, height: number): string =>
  `<image x="${mm(item.x)}" y="${mm(height - item.y - item.heightMm)}" width="${mm(item.widthMm)}" height="${mm(item.heightMm)}" preserveAspectRatio="none" href="${bitmap(item)}"/>`;

function itemSvg(item: Item, height: number, next: () => number): string {
  if (item.kind === "path") return pathSvg(item, height);
  if (item.kind === "text") return textSvg(item, height);
  if (item.kind === "image") return imageSvg(item, height);
  const id = `window${next()}`;
  const [left, bottom, right, top] = item.window;
  const [dx, dy] = item.offset;
  return (
    `<clipPath id="${id}"><rect x="${mm(left)}" y="${mm(height - top)}" width="${mm(right - left)}" height="${mm(top - bottom)}"/></clipPath>` +
    `<g clip-path="url(#${id})"><g transform="translate(${mm(dx)} ${mm(-dy)})">${item.items.map((one) => itemSvg(one, height, next)).join("")}</g></g>`
  );
}

/**
 * @param fontCss a style that brings the sheets' own font into the picture, or "" to use the page's.
 * @returns the page as an SVG document of its true size.
 */
export function pageSvg(page: Page, fontCss = ""): string {
  let count = 0;
  const body = page.items.map((item) => itemSvg(item, page.heightMm, () => count++)).join("");
  return (
    `<svg xmlns="http://www.w3.org/2000/svg" width="${mm(page.widthMm)}mm" height="${mm(page.heightMm)}mm" viewBox="0 0 ${mm(page.widthMm)} ${mm(page.heightMm)}" ` +
    `font-family="Tray Sans, DejaVu Sans Condensed, DejaVu Sans, sans-serif"><title>${escaped(page.title)}</title>${fontCss}<rect width="100%" height="100%" fill="#fff"/>${body}</svg>`
  );
}
