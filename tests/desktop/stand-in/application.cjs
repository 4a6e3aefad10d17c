const { spawnSync } = require("node:child_process");
const { EventEmitter } = require("node:events");
const { mkdirSync, rmSync } = require("node:fs");
const { createConnection, createServer } = require("node:net");
const { tmpdir } = require("node:os");
const { join } = require("node:path");
const { openSchemes } = require("./sessions.cjs");
const { BrowserWindow, belongTo } = require("./windows.cjs");

class Application extends EventEmitter {
  name = "program";
  version = "0.0.0";
  isPackaged = false;
  isLeaving = false;
  paths = { userData: join(tmpdir(), "stand-in-program"), temp: tmpdir() };
  commandLine = { appendSwitch: () => {} };
  ready = new Promise((resolve) => {
    this.becameReady = resolve;
  });

  setPath(name, path) {
    this.paths[name] = path;
  }
  getPath(name) {
    if (!(name in this.paths)) throw new Error(`the stand-in knows no folder ${name}`);
    return this.paths[name];
  }
  addRecentDocument(path) {
    this.recentDocuments = [path, ...(this.recentDocuments ?? [])];
  }
  getVersion() {
    return this.version;
  }
  whenReady() {
    return this.ready;
  }
  isReady() {
    return this.nowReady === true;
  }
  async becomeReady() {
    await openSchemes();
    this.nowReady = true;
    this.becameReady();
    this.emit("ready");
  }

  /** One process for each data folder: the second one hands its message to the first over a socket there. */
  requestSingleInstanceLock(data) {
    mkdirSync(this.getPath("userData"), { recursive: true });
    const path = join(this.getPath("userData"), "stand-in.sock");
    if (this.answersAt(path)) {
      const line = createConnection(path, () => line.end(JSON.stringify({ argv: process.argv, folder: process.cwd(), data })));
      this.handingOver = new Promise((resolve) => line.on("close", resolve));
      return false;
    }
    rmSync(path, { force: true });
    this.door = createServer({ allowHalfOpen: true }, (line) => {
      let text = "";
      line.on("data", (piece) => {
        text += piece;
      });
      line.on("end", () => {
        line.end();
        // An empty message only asks whether somebody is there.
        if (text === "") return;
        const { argv, folder, data: message } = JSON.parse(text);
        this.emit("second-instance", {}, argv, folder, message);
      });
    }).listen(path);
    this.door.unref();
    return true;
  }
  /** The lock has to be known before the program goes on, so that the question is put by a process that is waited for. */
  answersAt(path) {
    const script = `require("node:net").createConnection(${JSON.stringify(path)}).on("connect", () => process.exit(0)).on("error", () => process.exit(1))`;
    return spawnSync(process.execPath, ["-e", script]).status === 0;
  }

  async quit() {
    if (this.isLeaving) return;
    this.isLeaving = true;
    await this.handingOver;
    this.emit("before-quit", { preventDefault: () => {} });
    for (const window of BrowserWindow.getAllWindows()) window.close();
    let stays = BrowserWindow.getAllWindows().length > 0;
    const preventDefault = () => {
      stays = true;
    };
    if (!stays) this.emit("will-quit", { preventDefault });
    if (stays) this.isLeaving = false;
    else this.exit(0);
  }
  exit(code = 0) {
    this.chromium?.end();
    process.exit(code);
  }
}

const app = new Application();
belongTo(app);
module.exports = { app };
