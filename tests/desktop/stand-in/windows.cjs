const { EventEmitter } = require("node:events");
const { readFileSync } = require("node:fs");
const { makeClone } = require("./clone.cjs");
const { ipcMain } = require("./ipc.cjs");
const { pageSide } = require("./page-side.cjs");
const { contentOf, fromLocal, session, toLocal } = require("./sessions.cjs");

const clone = makeClone();
const open = new Map();
let nextId = 1;
let app = null;
/** The application object arrives late, because it needs the windows too. */
const belongTo = (application) => {
  app = application;
};

/** An event whose listeners may forbid what it announces. */
function ask(emitter, name, extra = {}) {
  const event = { defaultPrevented: false, ...extra };
  event.preventDefault = () => {
    event.defaultPrevented = true;
  };
  emitter.emit(name, event);
  return !event.defaultPrevented;
}

class WebContents extends EventEmitter {
  constructor(preferences) {
    super();
    this.id = nextId++;
    this.preferences = preferences;
    this.session = preferences.session ?? session.defaultSession;
    this.page = null;
    this.address = "";
    this.mainFrame = Object.defineProperty({}, "url", { get: () => this.getURL() });
    this.opensWindows = () => ({ action: "allow" });
    this.expected = null;
  }
  getURL() {
    return this.page === null ? this.address : fromLocal(this.page.url());
  }
  setWindowOpenHandler(handler) {
    this.opensWindows = handler;
  }
  isDestroyed() {
    return this.page?.isClosed() ?? false;
  }
  async load(address) {
    this.emit("did-start-loading");
    this.address = address;
    const content = await contentOf(address, this.session);
    if (content?.headers.get("content-type") === "application/pdf") {
      this.pdf = new Uint8Array(await content.arrayBuffer());
      return;
    }
    if (this.page === null) await this.makePage();
    this.expected = toLocal(address, this.session);
    await this.page.goto(this.expected);
  }
  async makePage() {
    const page = await app.chromium.context.newPage();
    this.page = page;
    this.cdp = await page.context().newCDPSession(page);
    this.targetId = (await this.cdp.send("Target.getTargetInfo")).targetInfo.targetId;
    await page.exposeBinding("__standInSend", (_source, ...message) => this.receive(...message));
    const { preload } = this.preferences;
    if (preload !== undefined) {
      const source = readFileSync(preload, "utf8");
      await page.addInitScript(
        `(${pageSide})(${makeClone}, function (require, process) { const module = { exports: {} }, exports = module.exports; ${source}\n });`,
      );
    }
    page.on("popup", (popup) => {
      const { action } = this.opensWindows({ url: popup.url() });
      if (action === "deny") popup.close().catch(() => {});
    });
    page.on("crash", () => {
      this.page = null;
      this.emit("render-process-gone", {}, { reason: "crashed", exitCode: 1 });
    });
    page.on("domcontentloaded", () => this.emit("dom-ready"));
    await this.watchNavigation();
    await this.applyPermissions();
  }
  async watchNavigation() {
    this.cdp.on("Fetch.requestPaused", ({ requestId, request, frameId }) => {
      const wanted =
        request.url === this.expected || frameId !== this.targetId || request.url.split("#")[0] === this.page.url().split("#")[0];
      const go = wanted || ask(this, "will-navigate", { url: fromLocal(request.url) });
      const step = go ? ["Fetch.continueRequest", { requestId }] : ["Fetch.failRequest", { requestId, errorReason: "Aborted" }];
      this.cdp.send(...step).catch(() => {});
    });
    await this.cdp.send("Fetch.enable", { patterns: [{ resourceType: "Document", requestStage: "Request" }] });
  }
  async applyPermissions() {
    for (const name of ["geolocation", "notifications", "videoCapture", "audioCapture", "midi"]) {
      let allowed = true;
      this.session.mayRequest?.(this, name, (answer) => {
        allowed = answer;
      });
      await this.cdp.send("Browser.setPermission", { permission: { name }, setting: allowed ? "granted" : "denied" }).catch(() => {});
    }
  }
  async receive(kind, channel, text) {
    const parts = clone.unpack(text);
    const event = { sender: this, senderFrame: this.mainFrame };
    if (kind === "key") app.emit("stand-in-key", parts[0]);
    else if (kind === "send") ipcMain.emit(channel, event, ...parts);
    else {
      try {
        return [true, clone.pack(await ipcMain.answer(channel, event, parts))];
      } catch (error) {
        return [false, String(error)];
      }
    }
    return undefined;
  }
  send(channel, ...parts) {
    const [message] = parts;
    this.page.evaluate(([name, text]) => window.__standInReceive(name, text), [channel, clone.pack(message)]).catch(() => {});
  }
  /** What was printed last can be looked at by a test, which may also answer in a printer's place. */
  print(job, done) {
    WebContents.lastPrint = { job, bytes: this.pdf?.length ?? 0, head: Buffer.from(this.pdf?.subarray(0, 5) ?? []).toString("latin1") };
    setTimeout(() => done(...(WebContents.printerAnswers ?? [false, "no printer in the stand-in"])));
  }
  forcefullyCrashRenderer() {
    this.cdp.send("Page.crash").catch(() => {});
  }
  edit(command) {
    this.page.evaluate((name) => document.execCommand(name), command).catch(() => {});
  }
  close() {
    open.get(this.id)?.close();
  }
  static fromDevToolsTargetId(targetId) {
    return [...open.values()].map(({ webContents }) => webContents).find((contents) => contents.targetId === targetId);
  }
}
for (const command of ["undo", "redo", "cut", "copy", "paste", "delete", "selectAll"]) {
  WebContents.prototype[command] = function edit() {
    this.edit(command);
  };
}

class BrowserWindow extends EventEmitter {
  constructor(options = {}) {
    super();
    this.options = options;
    this.bounds = { x: options.x ?? 0, y: options.y ?? 0, width: options.width ?? 800, height: options.height ?? 600 };
    this.title = options.title ?? "";
    this.visible = options.show !== false;
    this.destroyed = false;
    this.webContents = new WebContents(options.webPreferences ?? {});
    open.set(this.webContents.id, this);
    app.emit("web-contents-created", {}, this.webContents);
    this.webContents.once("dom-ready", () => this.emit("ready-to-show"));
  }
  loadURL(address) {
    return this.webContents.load(address);
  }
  show() {
    this.visible = true;
  }
  focus() {
    BrowserWindow.focused = this;
  }
  maximize() {
    this.maximized = true;
  }
  isMaximized() {
    return this.maximized === true;
  }
  isVisible() {
    return this.visible;
  }
  isDestroyed() {
    return this.destroyed;
  }
  getNormalBounds() {
    return { ...this.bounds };
  }
  getBounds() {
    return { ...this.bounds };
  }
  setBounds(bounds) {
    Object.assign(this.bounds, bounds);
  }
  setTitle(title) {
    this.title = title;
  }
  getTitle() {
    return this.title;
  }
  setDocumentEdited(edited) {
    this.edited = edited;
  }
  close() {
    if (!this.destroyed && ask(this, "close")) this.destroy();
  }
  destroy() {
    if (this.destroyed) return;
    this.destroyed = true;
    open.delete(this.webContents.id);
    this.webContents.page?.close().catch(() => {});
    this.emit("closed");
    if (open.size === 0) app.emit("window-all-closed");
  }
  static getAllWindows() {
    return [...open.values()];
  }
  static getFocusedWindow() {
    return BrowserWindow.focused?.destroyed === false ? BrowserWindow.focused : null;
  }
  static fromWebContents(contents) {
    return open.get(contents.id) ?? null;
  }
}

module.exports = { BrowserWindow, WebContents, belongTo, ask };
