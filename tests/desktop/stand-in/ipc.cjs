const { EventEmitter } = require("node:events");

class IpcMain extends EventEmitter {
  handlers = new Map();
  handle(channel, handler) {
    if (this.handlers.has(channel)) throw new Error(`a second handler for ${channel}`);
    this.handlers.set(channel, handler);
  }
  async answer(channel, event, parts) {
    const handler = this.handlers.get(channel);
    if (handler === undefined) throw new Error(`no handler registered for '${channel}'`);
    return handler(event, ...parts);
  }
}

module.exports = { ipcMain: new IpcMain() };
