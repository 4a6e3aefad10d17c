import type { SheetSource } from "./panels/sheets-desk";

/** @returns whoever makes the sheets: pages, pictures and PDF from the same page data. */
export async function createSheetSource(): Promise<SheetSource> {
  return { pageNames: [], presets: [], pictures: async () => [], pdf: () => Promise.reject(new Error("no page is ready yet")) };
}
