/**
 * Runs in the page before its own scripts: gives the preload its `electron`, carries messages over one binding, and reports the keys that
 * the page left alone, as a menu bar would hear them.
 */
function pageSide(makeClone, runPreload) {
  const { pack, unpack } = makeClone();
  const send = window.__standInSend;
  const listeners = new Map();
  window.__standInReceive = (channel, text) => {
    for (const listener of listeners.get(channel) ?? []) listener({}, unpack(text));
  };
  const ipcRenderer = {
    invoke: async (channel, ...parts) => {
      const [good, text] = await send("invoke", channel, pack(parts));
      if (!good) throw new Error(`Error invoking remote method '${channel}': ${text}`);
      return unpack(text);
    },
    send: (channel, ...parts) => void send("send", channel, pack(parts)),
    on: (channel, listener) => listeners.set(channel, [...(listeners.get(channel) ?? []), listener]),
    removeListener: (channel, listener) =>
      listeners.set(
        channel,
        (listeners.get(channel) ?? []).filter((one) => one !== listener),
      ),
  };
  // Only copies cross to the page's world, functions as functions that copy.
  const crossing = (value) => {
    if (typeof value === "function") {
      return (...parts) => {
        const result = value(...parts.map((part) => (typeof part === "function" || part instanceof File ? part : structuredClone(part))));
        return typeof result === "function" ? crossing(result) : result;
      };
    }
    if (typeof value !== "object" || value === null) return value;
    return Object.freeze(Object.fromEntries(Object.entries(value).map(([key, item]) => [key, crossing(item)])));
  };
  const contextBridge = {
    exposeInMainWorld: (name, api) => Object.defineProperty(window, name, { value: crossing(api), enumerable: true }),
  };
  // A dropped file carries its path only where a test has said so.
  const webUtils = { getPathForFile: (file) => window.__standInPaths?.[file.name] ?? "" };
  const modules = { electron: { contextBridge, ipcRenderer, webUtils } };
  runPreload(
    (name) => {
      if (!(name in modules)) throw new Error(`module not found: ${name} (a sandboxed preload has electron alone)`);
      return modules[name];
    },
    { platform: "linux", contextIsolated: true, sandboxed: true },
  );
  window.addEventListener("keydown", (event) => {
    const { key, ctrlKey, shiftKey, altKey } = event;
    setTimeout(() => {
      if (!event.defaultPrevented) send("key", "", pack([{ key, ctrlKey, shiftKey, altKey }]));
    });
  });
}

module.exports = { pageSide };
