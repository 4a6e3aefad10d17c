import { readFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { expect, it } from "vitest";
import { POLICY } from "../../../build-resources/window-server.mjs";
import { CHANNEL_NAMES } from "../../../shared-types/host-channel-names";
import { CHANNELS } from "../../../shared-types/host-channels";

const source = (path: string): string => readFileSync(fileURLToPath(new URL(`../../../${path}`, import.meta.url)), "utf8");

it("the desktop and the local window server send the same policy", () => {
  const [, list] = /POLICY = \[([^\]]+)\]/.exec(source("electron/protocol.ts")) ?? [];
  expect([...(list ?? "").matchAll(/"([^"]+)"/g)].map(([, part]) => part).join("; ")).toBe(POLICY);
});

it("the policy allows no code but our own files and WebAssembly, and nothing from elsewhere", () => {
  const parts = new Map(POLICY.split("; ").map((part) => [part.split(" ")[0], part.split(" ").slice(1)]));
  expect(parts.get("default-src")).toEqual(["'none'"]);
  expect(parts.get("script-src")).toEqual(["'self'", "'wasm-unsafe-eval'"]);
  expect(POLICY).not.toMatch(/unsafe-inline|'unsafe-eval'|https?:|\*/);
});

it("the bridge has one schema for each door, and no door more", () => {
  expect(Object.keys(CHANNELS).sort()).toEqual([...CHANNEL_NAMES].sort());
});
