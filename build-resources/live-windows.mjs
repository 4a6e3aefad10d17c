import { bodyOf } from "./window-store.mjs";

/**
 * Which windows are open: each keeps one answer of the server open for as long as it lives. Files that a second start hands over go to the
 * window that opens next.
 */

const LARGEST_FILE_BYTES = 6 * 1024 * 1024;
const BEAT_MS = 15_000;

/** @returns the doors `attend` and `handOver` for the server, the number of open windows, and a wait for the last one to close. */
export function liveWindows() {
  const open = new Set();
  const waiting = [];
  const whenOne = [];
  let ever = false;
  const whenNone = [];

  const send = (response, event) => response.write(`data: ${JSON.stringify(event)}\n\n`);

  function attend(method, _name, request, response) {
    if (method !== "GET") return { status: 405 };
    response.writeHead(200, {
      "Content-Type": "text/event-stream",
      "Cache-Control": "no-store",
      "Cross-Origin-Resource-Policy": "same-origin",
    });
    response.write(": open\n\n");
    for (const file of waiting.splice(0)) send(response, file);
    open.add(response);
    ever = true;
    for (const tell of whenOne.splice(0)) tell();
    const beat = setInterval(() => response.write(": still here\n\n"), BEAT_MS);
    request.on("close", () => {
      clearInterval(beat);
      open.delete(response);
      if (open.size === 0) for (const tell of whenNone.splice(0)) tell();
    });
    return null;
  }

  async function handOver(method, _name, request) {
    if (method === "GET") return { status: 200, body: "fieldtray" };
    if (method !== "POST") return { status: 405 };
    const body = await bodyOf(request, LARGEST_FILE_BYTES);
    if (body === null) return { status: 413 };
    waiting.push(JSON.parse(body.toString("utf8")));
    return { status: 204 };
  }

  return {
    attend,
    handOver,
    /** Puts a file in line for the next window. */
    await: (file) => waiting.push(file),
    count: () => open.size,
    /** Resolves once a window has been open, or after that time. */
    came: (withinMs) =>
      ever
        ? Promise.resolve()
        : new Promise((resolve) => {
            whenOne.push(resolve);
            setTimeout(resolve, withinMs);
          }),
    /** Resolves once no window is open. */
    gone: () => (open.size === 0 ? Promise.resolve() : new Promise((resolve) => whenNone.push(resolve))),
  };
}
