import { randomBytes, timingSafeEqual } from "node:crypto";
import { createReadStream, existsSync, readFileSync, statSync } from "node:fs";
import { createServer } from "node:http";
import { extname, join, normalize, sep } from "node:path";
import { liveWindows } from "./live-windows.mjs";
import { bodyOf, windowStore } from "./window-store.mjs";

/**
 * Serves the built window to a browser on this machine alone: bound to 127.0.0.1, only under a path that holds a secret
 * made at this start, only when asked by its own host name, so that a page from elsewhere can neither guess nor read it.
 * Beside the window's files it keeps drafts and settings, shows a PDF for printing, and knows which windows are open.
 */

/** The port asked for first: an unchanging origin keeps what the browser itself stores for it. */
const PREFERRED_PORT = 47613;
const LARGEST_PDF_BYTES = 200 * 1024 * 1024;
const PDFS_KEPT = 4;

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

/** The same policy as the desktop's (`electron/protocol.ts`), and a test holds the two together. */
export const POLICY = [
  "default-src 'none'",
  "script-src 'self' 'wasm-unsafe-eval'",
  "worker-src 'self'",
  "style-src 'self'",
  "img-src 'self' data: blob:",
  "font-src 'self'",
  "connect-src 'self'",
  "base-uri 'none'",
  "form-action 'none'",
  "frame-ancestors 'none'",
].join("; ");

const COMMON = {
  "Cross-Origin-Resource-Policy": "same-origin",
  "X-Content-Type-Options": "nosniff",
  "Referrer-Policy": "no-referrer",
  "Cache-Control": "no-store",
};
const HEADERS = {
  ...COMMON,
  "Content-Security-Policy": POLICY,
  "Cross-Origin-Opener-Policy": "same-origin",
  "Cross-Origin-Embedder-Policy": "require-corp",
};

function same(a, b) {
  const [left, right] = [Buffer.from(a), Buffer.from(b)];
  return left.length === right.length && timingSafeEqual(left, right);
}

function fileFor(folder, path) {
  const file = normalize(join(folder, path === "" ? "index.html" : path));
  if (!file.startsWith(folder + sep)) return null;
  return existsSync(file) && statSync(file).isFile() ? file : null;
}

/** The page with the mark by which the window knows that drafts can be kept behind this server. */
const marked = (file) => readFileSync(file, "utf8").replace("<head>", '<head>\n    <meta name="fieldtray-window" content="1" />');

/** PDFs on their way to the printer, kept in memory. */
function pdfShelf() {
  const shelf = new Map();
  return async (method, name, request, response) => {
    if (method === "PUT") {
      const body = await bodyOf(request, LARGEST_PDF_BYTES);
      if (body === null) return { status: 413, body: "the PDF is larger than 200 MB" };
      shelf.delete(name);
      shelf.set(name, body);
      for (const old of [...shelf.keys()].slice(0, -PDFS_KEPT)) shelf.delete(old);
      return { status: 204 };
    }
    const body = shelf.get(name);
    if (method !== "GET" || body === undefined) return { status: 404 };
    // The browser's PDF viewer is a page of its own: the window's policy would keep it from loading.
    response.writeHead(200, { ...COMMON, "Content-Type": "application/pdf", "Content-Length": body.length }).end(body);
    return null;
  };
}

/**
 * Starts serving `folder`.
 * @param storeFolder where drafts and settings are kept.
 * @returns the secret address, the port, the open windows, and a way to stop. Rejects when no port of the loopback interface can be had.
 */
export async function serveWindow(folder, storeFolder, port = PREFERRED_PORT) {
  const secret = randomBytes(24).toString("base64url");
  const hosts = [];
  const store = windowStore(storeFolder);
  const prints = pdfShelf();
  const windows = liveWindows();

  async function answer(request, response) {
    const refuse = (status, text = "") => response.writeHead(status, { ...HEADERS, "Content-Type": "text/plain; charset=utf-8" }).end(text);
    const { method = "GET" } = request;
    if (!hosts.includes(request.headers.host ?? "")) return refuse(403);
    const site = request.headers["sec-fetch-site"];
    if (site !== undefined && site !== "same-origin" && site !== "none") return refuse(403);
    let path;
    try {
      path = decodeURIComponent(new URL(request.url ?? "/", "http://local").pathname);
    } catch {
      return refuse(400);
    }
    const [, key = "", room = "", ...rest] = path.split("/");
    if (!same(key, secret)) return refuse(404);
    const doors = { store, print: prints, live: windows.attend, arrive: windows.handOver };
    if (Object.hasOwn(doors, room)) {
      const reply = await doors[room](method, rest.join("/"), request, response);
      if (reply === null) return undefined;
      return response.writeHead(reply.status, { ...HEADERS, "Content-Type": reply.type ?? "text/plain; charset=utf-8" }).end(reply.body);
    }
    if (method !== "GET" && method !== "HEAD") return refuse(405);
    const file = fileFor(folder, [room, ...rest].join("/"));
    if (file === null) return refuse(404);
    response.writeHead(200, { ...HEADERS, "Content-Type": TYPES[extname(file)] ?? "application/octet-stream" });
    if (method === "HEAD") return response.end();
    if (file === join(folder, "index.html")) return response.end(marked(file));
    return createReadStream(file).pipe(response);
  }

  const server = createServer((request, response) => {
    answer(request, response).catch((error) => {
      if (response.headersSent) response.destroy(error);
      else response.writeHead(500, HEADERS).end();
    });
  });
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
    windows,
    stop: () =>
      new Promise((resolve) => {
        server.closeAllConnections();
        server.close(() => resolve());
      }),
  };
}
