import type { Stock } from "../../shared-types/stock";

/** The prep room of Saltmarsh College, a made-up place: a stock list to start from. It covers the first examples for two trays. */
export const saltmarshStock: Stock = {
  format: "fieldtray.stock",
  version: 1,
  owner: "Saltmarsh College, physics prep room",
  trays: [
    {
      name: "Bench tray",
      count: 6,
      tray: { shape: "rectangle", lengthMm: 300, widthMm: 200, wallHeightMm: 40, baseMm: 3, baseMaterial: "acrylic" },
    },
    { name: "Round tray", count: 2, tray: { shape: "circle", diameterMm: 240, wallHeightMm: 50, baseMm: 4, baseMaterial: "glass" } },
  ],
  parts: [
    { name: "Long bar", count: 8, insulates: false, material: "brass", heightMm: 24, shape: { kind: "bar", lengthMm: 100, widthMm: 10 } },
    { name: "Short bar", count: 4, insulates: false, material: "brass", heightMm: 24, shape: { kind: "bar", lengthMm: 60, widthMm: 10 } },
    { name: "Disc 30", count: 6, insulates: false, material: "brass", heightMm: 24, shape: { kind: "disc", diameterMm: 30 } },
    { name: "Ring 60", count: 2, insulates: false, material: "brass", heightMm: 24, shape: { kind: "ring", outerMm: 60, innerMm: 54 } },
    { name: "Block", count: 3, insulates: true, material: "acrylic", heightMm: 24, shape: { kind: "bar", lengthMm: 60, widthMm: 40 } },
  ],
  supplies: [
    { name: "Bench transformer", count: 6, waveform: "ac", mostVolts: 12, mostAmperes: 2, source: "safety-isolated" },
    { name: "Battery box", count: 4, waveform: "dc", mostVolts: 6, mostAmperes: 1, source: "battery" },
  ],
};
