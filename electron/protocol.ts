import { readFile } from "node:fs/promises";
import { extname, join, normalize, sep } from "node:path";
import { protocol, type Session } from "electron";

/**
 * The program's own pages, served under `app://fieldtray/` instead of file addresses: one origin of its own, a policy that allows nothing
 * from elsewhere, no inline script, no eval.
 */

export const SCHEME = "app";
export const WINDOW_ADDRESS = `${SCHEME}://fieldtray/index.html`;
const WINDOW_HOST = "fieldtray";

/** The same policy as that of `npm start`'s browser window (`build-resources/window-server.mjs`); a test holds the two together. */
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

const HEADERS = {
  "Content-Security-Policy": POLICY,
  "Cross-Origin-Opener-Policy": "same-origin",
  "Cross-Origin-Embedder-Policy": "require-corp",
  "Cross-Origin-Resource-Policy": "same-origin",
  "X-Content-Type-Options": "nosniff",
};

const TYPES: Readonly<Record<string, string>> = {
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

/** Has to run before the program is ready: makes the scheme a standard, secure origin. */
export function announceScheme(): void {
  protocol.registerSchemesAsPrivileged([
    { scheme: SCHEME, privileges: { standard: true, secure: true, supportFetchAPI: true, corsEnabled: true, codeCache: true } },
  ]);
}

const refusal = (status: number): Response => new Response(null, { status, headers: HEADERS });

async function answer(request: Request, folder: string): Promise<Response> {
  if (request.method !== "GET" && request.method !== "HEAD") return refusal(405);
  let path: string;
  try {
    const { host, pathname } = new URL(request.url);
    if (host !== WINDOW_HOST) return refusal(403);
    path = decodeURIComponent(pathname);
  } catch {
    return refusal(400);
  }
  const file = normalize(join(folder, path === "/" ? "index.html" : path));
  if (!file.startsWith(folder + sep)) return refusal(403);
  try {
    const content = await readFile(file);
    return new Response(new Uint8Array(content), {
      headers: { ...HEADERS, "Content-Type": TYPES[extname(file)] ?? "application/octet-stream" },
    });
  } catch {
    return refusal(404);
  }
}

/** Serves the files of `folder` to the windows of a session. */
export function servePages(session: Session, folder: string): void {
  session.protocol.handle(SCHEME, (request) => answer(request, folder));
}

/** Serves one PDF under an address of its own to a session that knows nothing else. @returns the address. */
export function servePdf(session: Session, bytes: Uint8Array): string {
  session.protocol.handle(SCHEME, () => new Response(new Uint8Array(bytes), { headers: { "Content-Type": "application/pdf" } }));
  return `${SCHEME}://sheets/sheets.pdf`;
}

/** @returns whether an address is the program's own page. */
export const isOwnPage = (address: string): boolean => address === WINDOW_ADDRESS || address.startsWith(`${WINDOW_ADDRESS}#`);
