import { BRIDGE_NAME, type Bridge, type Host } from "../../shared-types/host";
import { browserHost } from "./browser";
import { desktopHost } from "./desktop";

const isBridge = (value: unknown): value is Bridge =>
  typeof value === "object" &&
  value !== null &&
  ["invoke", "send", "listen"].every((name) => typeof Reflect.get(value, name) === "function");

/** @returns the surroundings of this window: the desktop's where the preload put its bridge, else the plain browser's. */
export function findHost(page: Window, version: string): Host {
  const bridge: unknown = Reflect.get(page, BRIDGE_NAME);
  return isBridge(bridge) ? desktopHost(bridge) : browserHost(page, version);
}
