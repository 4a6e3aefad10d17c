import "./without-eval";
import type { Host } from "../../shared-types/host";
import { BRIDGE_NAME, type Bridge, CHANNEL_NAMES } from "../../shared-types/host-channel-names";
import { browserHost } from "./browser";
import { desktopHost } from "./desktop";

function isBridge(value: unknown): value is Bridge {
  if (typeof value !== "object" || value === null) return false;
  const ask: unknown = Reflect.get(value, "ask");
  return (
    typeof ask === "object" &&
    ask !== null &&
    CHANNEL_NAMES.every((name) => typeof Reflect.get(ask, name) === "function") &&
    ["onEvent", "dropped"].every((name) => typeof Reflect.get(value, name) === "function")
  );
}

/** @returns the surroundings of this window: the desktop's where the preload put its bridge, else the plain browser's. */
export function findHost(page: Window, version: string): Host {
  const bridge: unknown = Reflect.get(page, BRIDGE_NAME);
  return isBridge(bridge) ? desktopHost(page, bridge, version) : browserHost(page, version);
}
