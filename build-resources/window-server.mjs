import { randomBytes, timingSafeEqual } from "node:crypto";
import { createReadStream, existsSync, statSync } from "node:fs";
import { createServer } from "node:http";
import { extname, join, normalize, sep } from "node:path";

/**
 * Serves the built window to a browser on this machine alone: bound to 127.0.0.1, only under a path that holds a secret
 * made at this start, only when asked by its own host name, so that a page from elsewhere can neither guess nor read it.
 */

/** The port asked for first: an unchanging origin keeps the drafts that the browser stores for it. */
const PREFERRED_PORT = 47613;

const TYPES = {
  ".html": "text/html; charset=utf-8",
  ".js": "text/javascript; charset=utf-8",
  ".css": "text/css; charset=utf-8",
  ".svg": "image/svg+xml",
  ".png": "image/png",
  ".json": "application/json",
  ".woff2": "font/woff2",
  ".ttf": "font/ttf",
  ".wasm": "application/wasm",
};

const POLICY = [
  "default-src 'none'",
  "script-src 'self' 'wasm-unsafe-eval'",
  "worker-src 'self'",
  "style-src 'self' 'unsafe-inline'",
  "img-src 'self' data: blob:",
  "font-src 'self'",
  "connect-src 'self'",
  "frame-src blob:",
  "base-uri 'none'",
  "form-action 'none'",
  "frame-ancestors 'none'",
].join("; ");

const HEADERS = {
  "Content-Security-Policy": POLICY,
  "Cross-Origin-Opener-Policy": "same-origin",
  "Cross-Origin-Embedder-Policy": "require-corp",
  "Cross-Origin-Resource-Policy": "same-origin",
  "X-Content-Type-Options": "nosniff",
  "Referrer-Policy": "no-referrer",
  "Cache-Control": "no-store",
};

const same = (a, b) => a.length === b.length && timingSafeEqual(Buffer.from(a), Buffer.from(b));

function fileFor(folder, path) {
  const file = normalize(join(folder, path === "" ? "index.html" : path));
  if (!file.startsWith(folder + sep)) return null;
  return existsSync(file) && statSync(file).isFile() ? file : null;
}

function answer(request, response, folder, secret, hosts) {
  const refuse = (status) => response.writeHead(status, { ...HEADERS, "Content-Type": "text/plain" }).end();
  if (!hosts.includes(request.headers.host ?? "")) return refuse(403);
  if (request.method !== "GET" && request.method !== "HEAD") return refuse(405);
  const site = request.headers["sec-fetch-site"];
  if (site !== undefined && site !== "same-origin" && site !== "none") return refuse(403);
  let path;
  try {
    path = decodeURIComponent(new URL(request.url ?? "/", "http://local").pathname);
  } catch {
    return refuse(400);
  }
  const [, key = "", ...rest] = path.split("/");
  if (!same(key, secret)) return refuse(404);
  const file = fileFor(folder, rest.join("/"));
  if (file === null) return refuse(404);
  response.writeHead(200, { ...HEADERS, "Content-Type": TYPES[extname(file)] ?? "application/octet-stream" });
  if (request.method === "HEAD") response.end();
  else createReadStream(file).pipe(response);
}

/**
 * Starts serving `folder`.
 * @returns the secret address, the port, and a way to stop. Rejects when no port of the loopback interface can be had.
 */
export async function serveWindow(folder, port = PREFERRED_PORT) {
  const secret = randomBytes(24).toString("base64url");
  const hosts = [];
  const server = createServer((request, response) => answer(request, response, folder, secret, hosts));
  const listen = (wanted) =>
    new Promise((resolve, reject) => {
      server.once("error", reject);
      server.listen(wanted, "127.0.0.1", () => {
        server.off("error", reject);
        resolve();
      });
    });
  await listen(port).catch(() => listen(0));
  const taken = server.address().port;
  hosts.push(`127.0.0.1:${taken}`);
  return {
    address: `http://127.0.0.1:${taken}/${secret}/`,
    port: taken,
    stop: () =>
      new Promise((resolve) => {
        server.closeAllConnections();
        server.close(() => resolve());
      }),
  };
}
