import { mkdirSync, mkdtempSync, readdirSync, rmSync, writeFileSync } from "node:fs";
import { request } from "node:http";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { POLICY, serveWindow, type WindowServer } from "../../../build-resources/window-server.mjs";

/** What came back: the status, the headers and the body. */
interface Answer {
  readonly status: number;
  readonly headers: Readonly<Record<string, string | string[] | undefined>>;
  readonly body: string;
}

let folder = "";
let server: WindowServer;
beforeEach(async () => {
  folder = mkdtempSync(join(tmpdir(), "fieldtray-server-"));
  mkdirSync(join(folder, "pages"));
  writeFileSync(join(folder, "pages", "index.html"), "<html><head></head><body>the window</body></html>");
  writeFileSync(join(folder, "outside.txt"), "not for the window");
  server = await serveWindow(join(folder, "pages"), join(folder, "kept"), 0);
});
afterEach(async () => {
  await server.stop();
  rmSync(folder, { recursive: true, force: true });
});

/** Asks without a browser's good manners: paths are sent as they are. */
const ask = (path: string, headers: Record<string, string> = {}, method = "GET", body = ""): Promise<Answer> =>
  new Promise((resolve, reject) => {
    const asked = request({ host: "127.0.0.1", port: server.port, path, method, headers }, (answer) => {
      let text = "";
      answer.on("data", (piece) => {
        text += piece;
      });
      answer.on("end", () => resolve({ status: answer.statusCode ?? 0, headers: answer.headers, body: text }));
    });
    asked.on("error", reject);
    asked.end(body);
  });
const inside = (path: string): string => new URL(path, server.address).pathname;

describe("the local window server", () => {
  it("serves the window under its secret path alone", async () => {
    expect((await ask(inside(""))).body).toContain("the window");
    expect((await ask("/")).status).toBe(404);
    expect((await ask("/index.html")).status).toBe(404);
    expect((await ask(`/${"x".repeat(32)}/`)).status).toBe(404);
    expect((await ask("/%C3%A9/")).status).toBe(404);
    expect(new URL(server.address).pathname.length).toBeGreaterThan(30);
  });

  it("makes another secret at each start", async () => {
    const other = await serveWindow(join(folder, "pages"), join(folder, "kept"), 0);
    expect(new URL(other.address).pathname).not.toBe(new URL(server.address).pathname);
    await other.stop();
  });

  it("answers only to its own host name, so that a name that is pointed here from elsewhere gets nothing", async () => {
    for (const host of ["evil.example", `localhost:${server.port}`, `evil.example:${server.port}`]) {
      expect((await ask(inside(""), { Host: host })).status).toBe(403);
    }
  });

  it("refuses what a page elsewhere asks for", async () => {
    for (const site of ["cross-site", "same-site"]) expect((await ask(inside(""), { "Sec-Fetch-Site": site })).status).toBe(403);
    expect((await ask(inside(""), { "Sec-Fetch-Site": "none" })).status).toBe(200);
  });

  it("never leaves its folder", async () => {
    for (const path of ["../outside.txt", "%2e%2e/outside.txt", "..%2foutside.txt", "assets/../../outside.txt", "%00", "/etc/passwd"]) {
      const answer = await ask(`${inside("")}${path}`);
      expect(answer.status).toBeGreaterThanOrEqual(400);
      expect(answer.body).not.toContain("not for the window");
    }
  });

  it("sends the strict policy and isolates the window from other origins", async () => {
    const { headers } = await ask(inside(""));
    expect(headers["content-security-policy"]).toBe(POLICY);
    expect(headers["cross-origin-opener-policy"]).toBe("same-origin");
    expect(headers["cross-origin-embedder-policy"]).toBe("require-corp");
    expect(headers["cache-control"]).toBe("no-store");
    expect(headers["access-control-allow-origin"]).toBeUndefined();
  });

  it("keeps drafts as whole files, and knows when there is none", async () => {
    expect((await ask(inside("store/draft-1"))).status).toBe(204);
    expect((await ask(inside("store/draft-1"), {}, "PUT", '{"title":"Two bars"}')).status).toBe(204);
    expect(JSON.parse((await ask(inside("store/draft-1"))).body)).toEqual({ title: "Two bars" });
    expect(JSON.parse((await ask(inside("store/"))).body)).toEqual(["draft-1"]);
    expect(readdirSync(join(folder, "kept"))).toEqual(["draft-1.json"]);
    expect((await ask(inside("store/draft-1"), {}, "DELETE")).status).toBe(204);
    expect(JSON.parse((await ask(inside("store/"))).body)).toEqual([]);
  });

  it("keeps nothing that is no JSON, too large, or under a name that is a path", async () => {
    expect((await ask(inside("store/a"), {}, "PUT", "{")).status).toBe(400);
    expect((await ask(`${inside("store/")}..%2Fa`, {}, "PUT", "{}")).status).toBe(400);
    expect((await ask(inside("store/a"), {}, "POST", "{}")).status).toBe(405);
    expect(readdirSync(join(folder, "kept"))).toEqual([]);
  });

  it("shows a PDF without the window's policy, which would keep the viewer from loading", async () => {
    expect((await ask(inside("print/Two%20bars.pdf"), {}, "PUT", "%PDF-1.7")).status).toBe(204);
    const answer = await ask(inside("print/Two%20bars.pdf"));
    expect([answer.status, answer.body, answer.headers["content-type"]]).toEqual([200, "%PDF-1.7", "application/pdf"]);
    expect(answer.headers["content-security-policy"]).toBeUndefined();
    expect((await ask(inside("print/other.pdf"))).status).toBe(404);
  });

  it("hands a file of a second start to the next window, and knows when the last one has closed", async () => {
    await ask(inside("arrive"), {}, "POST", JSON.stringify({ name: "a.json", text: "{}" }));
    expect(server.windows.count()).toBe(0);
    const said = await new Promise<string>((resolve) => {
      const live = request({ host: "127.0.0.1", port: server.port, path: inside("live") }, (answer) => {
        answer.on("data", (piece) => {
          if (!String(piece).includes("data:")) return;
          resolve(String(piece));
          live.destroy();
        });
      });
      live.on("error", () => {});
      live.end();
    });
    expect(said).toContain('data: {"name":"a.json","text":"{}"}');
    await server.windows.gone();
    expect(server.windows.count()).toBe(0);
  });
});
