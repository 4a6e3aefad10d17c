import { drawTrays } from "../engine/tolerance/draws";
import type { DrawAnswer, DrawRequest } from "./draw-messages";

/** A worker that draws its share of trays. It is ended from outside when they are no longer wanted. */

const answer = (message: DrawAnswer): void => postMessage(message);

self.onmessage = (event: MessageEvent<DrawRequest>) => {
  const { task, first, count } = event.data;
  try {
    let draw = first;
    for (const row of drawTrays(task, first, count)) if (row !== null) answer({ draw: draw++, row });
  } catch (error) {
    answer({ fault: error instanceof Error ? error.message : String(error) });
  }
};
