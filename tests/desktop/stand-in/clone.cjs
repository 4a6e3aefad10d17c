/**
 * What structured clone does to a message, written so that it can travel as text: plain values, arrays, bytes, undefined.
 * The same source runs in this process and in the page.
 */
function makeClone() {
  const toBase64 = (bytes) => {
    let text = "";
    for (let at = 0; at < bytes.length; at += 32768) text += String.fromCharCode(...bytes.subarray(at, at + 32768));
    return btoa(text);
  };
  const fromBase64 = (text) => Uint8Array.from(atob(text), (letter) => letter.charCodeAt(0));
  const pack = (value) => {
    if (value === undefined) return { $undefined: true };
    if (typeof value === "function" || typeof value === "symbol")
      throw new DOMException("An object could not be cloned.", "DataCloneError");
    if (value instanceof Uint8Array) return { $bytes: toBase64(value) };
    if (Array.isArray(value)) return value.map(pack);
    if (typeof value === "number" && !Number.isFinite(value)) return { $number: String(value) };
    if (typeof value !== "object" || value === null) return value;
    return { $object: Object.fromEntries(Object.entries(value).map(([key, item]) => [key, pack(item)])) };
  };
  const unpack = (value) => {
    if (Array.isArray(value)) return value.map(unpack);
    if (typeof value !== "object" || value === null) return value;
    if ("$undefined" in value) return undefined;
    if ("$bytes" in value) return fromBase64(value.$bytes);
    if ("$number" in value) return Number(value.$number);
    return Object.fromEntries(Object.entries(value.$object).map(([key, item]) => [key, unpack(item)]));
  };
  return { pack: (value) => JSON.stringify(pack(value)), unpack: (text) => unpack(JSON.parse(text)) };
}

module.exports = { makeClone };
