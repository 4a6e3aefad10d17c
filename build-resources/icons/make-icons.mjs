import { readFileSync, writeFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { chromium } from "playwright";

/**
 * Derives the icons of each system from `fieldtray.svg`: run `node build-resources/icons/make-icons.mjs` after changing the drawing.
 * ICO and ICNS are both short tables in front of PNG pictures.
 */

const at = (name) => fileURLToPath(new URL(name, import.meta.url));
const drawing = readFileSync(at("fieldtray.svg"), "utf8");

async function pictures(sizes) {
  const browser = await chromium.launch({
    executablePath: process.env.CHROMIUM_PATH || "/usr/bin/chromium",
    args: ["--no-sandbox", "--disable-gpu"],
  });
  const made = new Map();
  for (const size of sizes) {
    const page = await browser.newPage({ viewport: { width: size, height: size } });
    await page.setContent(`<style>*{margin:0}svg{display:block;width:${size}px;height:${size}px}</style>${drawing}`);
    made.set(size, await page.screenshot({ omitBackground: true }));
    await page.close();
  }
  await browser.close();
  return made;
}

/** Six bytes of head, sixteen for each picture (0 stands for 256), then the PNG files. */
function ico(images) {
  const head = Buffer.alloc(6 + 16 * images.length);
  head.writeUInt16LE(1, 2);
  head.writeUInt16LE(images.length, 4);
  let offset = head.length;
  images.forEach(([size, png], index) => {
    const entry = 6 + 16 * index;
    head.writeUInt8(size % 256, entry);
    head.writeUInt8(size % 256, entry + 1);
    head.writeUInt16LE(1, entry + 4);
    head.writeUInt16LE(32, entry + 6);
    head.writeUInt32LE(png.length, entry + 8);
    head.writeUInt32LE(offset, entry + 12);
    offset += png.length;
  });
  return Buffer.concat([head, ...images.map(([, png]) => png)]);
}

/** A name of four letters and a length in front of each PNG file. */
function icns(images) {
  const entries = images.map(([name, png]) => {
    const head = Buffer.alloc(8);
    head.write(name, "ascii");
    head.writeUInt32BE(png.length + 8, 4);
    return Buffer.concat([head, png]);
  });
  const head = Buffer.alloc(8);
  head.write("icns", "ascii");
  head.writeUInt32BE(8 + entries.reduce((sum, { length }) => sum + length, 0), 4);
  return Buffer.concat([head, ...entries]);
}

const made = await pictures([16, 24, 32, 48, 64, 128, 256, 512, 1024]);
const png = (size) => made.get(size);
writeFileSync(at("icon.png"), png(512));
writeFileSync(at("icon.ico"), ico([16, 24, 32, 48, 64, 128, 256].map((size) => [size, png(size)])));
const APPLE = [
  ["icp4", 16],
  ["icp5", 32],
  ["icp6", 64],
  ["ic07", 128],
  ["ic08", 256],
  ["ic09", 512],
  ["ic10", 1024],
];
writeFileSync(at("icon.icns"), icns(APPLE.map(([name, size]) => [name, png(size)])));
