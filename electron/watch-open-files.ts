import type { KnownFiles } from "./known-files";
import type { OpenWindow, Windows } from "./windows";

/** How often the open files are looked at, ms. Looking is one question to the file system; it works on network drives too. */
const LOOK_EVERY_MS = 2000;

/** Tells each window once when another program changes or removes the file that is open in it. @returns a way to stop. */
export function watchOpenFiles(files: KnownFiles, windows: Windows): () => void {
  const told = new WeakMap<OpenWindow, string>();

  async function look(window: OpenWindow): Promise<void> {
    const { handle } = window.shown;
    if (handle === null) return;
    const change = await files.changeOf(handle).catch(() => null);
    if (change === null) {
      told.delete(window);
      return;
    }
    const sign = `${handle} ${change.gone}`;
    if (told.get(window) === sign) return;
    told.set(window, sign);
    windows.send(window, { kind: "changed-on-disk", ...change });
  }

  const timer = setInterval(() => {
    for (const window of windows.all()) void look(window);
  }, LOOK_EVERY_MS);
  return () => clearInterval(timer);
}
