import { mkdirSync, readdirSync, readFileSync, renameSync, rmSync, writeFileSync } from "node:fs";
import { join } from "node:path";

/**
 * Drafts and settings of the browser window, as files in the user's own folder: the browser's own store belongs to a port number and
 * would be lost with it.
 */

const KEY = /^[A-Za-z0-9-]{1,100}$/;
const LARGEST_VALUE_BYTES = 16 * 1024 * 1024;

/** @returns the whole body of a request, or null when it is larger than `limit` bytes. */
export async function bodyOf(request, limit) {
  const pieces = [];
  let size = 0;
  for await (const piece of request) {
    size += piece.length;
    if (size > limit) return null;
    pieces.push(piece);
  }
  return Buffer.concat(pieces);
}

/** Writes a file whole or not at all. */
function writeWhole(path, content) {
  const temporary = `${path}.${process.pid}.part`;
  writeFileSync(temporary, content, { mode: 0o600, flush: true });
  renameSync(temporary, path);
}

const isJson = (body) => {
  try {
    JSON.parse(body.toString("utf8"));
    return true;
  } catch {
    return false;
  }
};

/**
 * Answers requests for one key of the store, or for the list of its keys.
 * @param folder where the values are kept; made when it is missing.
 * @returns a function that answers `{ status, type?, body? }` for a method, a key and the request.
 */
export function windowStore(folder) {
  mkdirSync(folder, { recursive: true, mode: 0o700 });
  const at = (key) => join(folder, `${key}.json`);
  return async (method, key, request) => {
    if (key === "") {
      if (method !== "GET") return { status: 405 };
      const keys = readdirSync(folder).flatMap((name) => (name.endsWith(".json") ? [name.slice(0, -5)] : []));
      return { status: 200, type: "application/json", body: JSON.stringify(keys) };
    }
    if (!KEY.test(key)) return { status: 400, body: "a key holds letters, digits and dashes" };
    if (method === "GET") {
      try {
        return { status: 200, type: "application/json", body: readFileSync(at(key)) };
      } catch {
        // An absent value is an ordinary answer: an error status would only fill the window's console.
        return { status: 204 };
      }
    }
    if (method === "DELETE") {
      rmSync(at(key), { force: true });
      return { status: 204 };
    }
    if (method !== "PUT") return { status: 405 };
    const body = await bodyOf(request, LARGEST_VALUE_BYTES);
    if (body === null) return { status: 413, body: "the value is larger than 16 MB" };
    if (!isJson(body)) return { status: 400, body: "the value is not JSON" };
    try {
      writeWhole(at(key), body);
    } catch (error) {
      return { status: 507, body: `the draft cannot be kept in ${folder}: ${error.message}` };
    }
    return { status: 204 };
  };
}
