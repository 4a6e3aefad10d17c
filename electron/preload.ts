import { contextBridge, type IpcRendererEvent, ipcRenderer, webUtils } from "electron";
import { BRIDGE_NAME, type Bridge, CHANNEL_NAMES, channelOf, DROP_CHANNEL, EVENT_CHANNEL } from "../shared-types/host-channel-names";

/** The narrow bridge between the page and the desktop process: one function for each door, and nothing of Electron's own. */

const doors = Object.fromEntries(CHANNEL_NAMES.map((name) => [name, (request?: unknown) => ipcRenderer.invoke(channelOf(name), request)]));

const bridge: Bridge = {
  platform: process.platform,
  ask: doors as Bridge["ask"],
  onEvent: (take) => {
    const receive = (_event: IpcRendererEvent, message: unknown): void => take(message);
    ipcRenderer.on(EVENT_CHANNEL, receive);
    return () => ipcRenderer.removeListener(EVENT_CHANNEL, receive);
  },
  dropped: (file) => {
    const path = webUtils.getPathForFile(file);
    if (path !== "") ipcRenderer.send(DROP_CHANNEL, path);
  },
};

contextBridge.exposeInMainWorld(BRIDGE_NAME, bridge);
