/** The module `electron` as far as the program uses it. Anything else is an error, so that nothing is taken for tested that is not. */
const { EventEmitter } = require("node:events");
const { app } = require("./application.cjs");
const { ipcMain } = require("./ipc.cjs");
const { Menu } = require("./menus.cjs");
const { protocol, session } = require("./sessions.cjs");
const { BrowserWindow, WebContents } = require("./windows.cjs");

const unexpected = (name) => async () => {
  throw new Error(`${name} was asked for, and the test has no answer to it`);
};

const board = { text: "" };
const display = { id: 1, workArea: { x: 0, y: 0, width: 1280, height: 800 } };

const known = {
  app,
  BrowserWindow,
  clipboard: {
    writeText: (text) => {
      board.text = text;
    },
    readText: () => board.text,
  },
  dialog: {
    showOpenDialog: unexpected("a dialog to open"),
    showSaveDialog: unexpected("a dialog to save"),
    showMessageBox: unexpected("a question"),
  },
  ipcMain,
  Menu,
  nativeTheme: Object.assign(new EventEmitter(), { themeSource: "system", shouldUseDarkColors: false }),
  protocol,
  screen: { getPrimaryDisplay: () => display, getAllDisplays: () => [display] },
  session,
  shell: { showItemInFolder: () => {} },
  webContents: WebContents,
};

module.exports = new Proxy(known, {
  get: (target, name) => {
    if (typeof name === "string" && !(name in target) && !["then", "__esModule", "default"].includes(name)) {
      throw new Error(`the stand-in for electron has no ${name}`);
    }
    return target[name];
  },
});
