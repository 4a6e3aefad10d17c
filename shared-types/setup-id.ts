import { sha256 } from "@noble/hashes/sha2.js";
import { utf8ToBytes } from "@noble/hashes/utils.js";
import type { Setup } from "./setup";

/** Digits without I, L, O and U, which a hand confuses on paper (Crockford's base 32, a published alphabet). */
const DIGITS = "0123456789ABCDEFGHJKMNPQRSTVWXYZ";

/** What only holds parts for the hand that edits them is on no sheet: a setup locked after printing is still the printed one. */
const FOR_THE_HAND: ReadonlySet<string> = new Set(["group", "locked"]);

function canonical(value: unknown): string {
  if (Array.isArray(value)) return `[${value.map(canonical).join(",")}]`;
  if (typeof value === "object" && value !== null) {
    const entries = Object.entries(value).filter(([key, item]) => item !== undefined && !FOR_THE_HAND.has(key));
    entries.sort(([a], [b]) => (a < b ? -1 : 1));
    return `{${entries.map(([key, item]) => `${JSON.stringify(key)}:${canonical(item)}`).join(",")}}`;
  }
  return JSON.stringify(value);
}

/**
 * A short name for exactly this content: the first 40 bits of SHA-256 over the setup with its keys sorted, groups, locks and readings
 * left out: what was measured belongs to the layout and does not make another of it.
 * @returns eight digits with a dash, such as `K7Q2-9F3A`; equal for equal setups whatever the order of their keys.
 */
export function setupId(setup: Setup): string {
  const hash = sha256(utf8ToBytes(canonical({ ...setup, readings: undefined })));
  let bits = 0n;
  for (const byte of hash.subarray(0, 5)) bits = (bits << 8n) | BigInt(byte);
  let text = "";
  for (let shift = 35n; shift >= 0n; shift -= 5n) text += DIGITS[Number((bits >> shift) & 31n)];
  return `${text.slice(0, 4)}-${text.slice(4)}`;
}
