import { browserBench, desktopBench, type HostBench } from "./host-bench";
import { expect, test } from "./program";

/** What the window may rely on, whichever host it runs in: one suite, run against both. */

const hosts = ["desktop", "browser"] as const;
const TEXT = '{ "format": "fieldtray.setup" }\n';

for (const kind of hosts) {
  const contract = test.extend<{ on: HostBench }>({
    on: async ({ bench }, use) => {
      const on = kind === "desktop" ? await desktopBench(bench) : await browserBench();
      await use(on);
      await on.end();
    },
  });

  contract.describe(`the ${kind} host`, () => {
    contract("saves where the user says, opens the same file under the same handle, and notes it as recent", async ({ on }) => {
      await on.pickToSave("bars.fieldtray.json");
      const saved = await on.page().evaluate((text) => {
        return window.host.saveFile({ handle: null, suggestedName: "bars.fieldtray.json", text, overwrite: false });
      }, TEXT);
      expect(saved).toMatchObject({ kind: "saved", file: { name: "bars.fieldtray.json" } });
      expect(await on.get("bars.fieldtray.json")).toBe(TEXT);
      await on.pickToOpen("bars.fieldtray.json");
      const opened = await on.page().evaluate(() => window.host.openFile());
      expect(opened).toMatchObject({ kind: "opened", text: TEXT });
      if (opened.kind !== "opened" || saved.kind !== "saved") throw new Error("neither saved nor opened");
      expect(opened.file.handle).toBe(saved.file.handle);
      const recent = await on.page().evaluate(() => window.host.recentFiles());
      expect(recent.map(({ file }) => file)).toEqual([saved.file]);
      expect(await on.page().evaluate((handle) => window.host.readFile(handle), recent[0].file.handle)).toMatchObject({ text: TEXT });
      await on.page().evaluate((handle) => window.host.forgetRecent(handle), recent[0].file.handle);
      expect(await on.page().evaluate(() => window.host.recentFiles())).toEqual([]);
    });

    contract("takes a cancelled dialog for an answer", async ({ on }) => {
      await on.pickToOpen(null);
      await on.pickToSave(null);
      const answers = await on
        .page()
        .evaluate(async () => [
          (await window.host.openFile()).kind,
          (await window.host.saveFile({ handle: null, suggestedName: "a.json", text: "", overwrite: false })).kind,
          (await window.host.exportFile({ suggestedName: "a.pdf", kind: "pdf", bytes: new Uint8Array([1]) })).kind,
          (await window.host.importText("csv")).kind,
        ]);
      expect(answers).toEqual(["cancelled", "cancelled", "cancelled", "cancelled"]);
    });

    contract("never overwrites silently what another program wrote or took away", async ({ on }) => {
      await on.put("shared.json", "one");
      await on.pickToOpen("shared.json");
      const opened = await on.page().evaluate(() => window.host.openFile());
      if (opened.kind !== "opened") throw new Error("not opened");
      const save = (overwrite: boolean) =>
        on
          .page()
          .evaluate(([handle, over]) => window.host.saveFile({ handle, suggestedName: "x", text: "mine", overwrite: over }), [
            opened.file.handle,
            overwrite,
          ] as const);
      await on.page().waitForTimeout(20);
      await on.put("shared.json", "a colleague's");
      expect(await save(false)).toMatchObject({ kind: "changed", gone: false });
      expect(await on.get("shared.json")).toBe("a colleague's");
      expect((await save(true)).kind).toBe("saved");
      expect(await on.get("shared.json")).toBe("mine");
      expect((await save(false)).kind).toBe("saved");
      await on.remove("shared.json");
      expect(await save(false)).toMatchObject({ kind: "changed", gone: true });
    });

    contract("tells of a change on disk once", async ({ on }) => {
      await on.put("watched.json", "one");
      await on.pickToOpen("watched.json");
      const opened = await on.page().evaluate(() => window.host.openFile());
      if (opened.kind !== "opened") throw new Error("not opened");
      await on.page().evaluate((handle) => window.host.setTitle({ name: "Watched", handle, unsaved: false }), opened.file.handle);
      await on.page().waitForTimeout(20);
      await on.put("watched.json", "two");
      const changes = () => on.page().evaluate(() => window.heard.filter(({ kind: what }) => what === "changed-on-disk"));
      await expect.poll(changes, { timeout: 15_000 }).toMatchObject([{ file: { name: "watched.json" }, gone: false }]);
      await on.page().waitForTimeout(4500);
      expect(await changes()).toHaveLength(1);
    });

    contract("refuses files that are too large or no text, in words", async ({ on }) => {
      await on.put("bytes.json", Buffer.from([0xff, 0xfe, 0x00]));
      await on.pickToOpen("bytes.json");
      expect(await on.page().evaluate(() => window.host.openFile())).toMatchObject({
        kind: "failed",
        message: "bytes.json is not a text file (UTF-8).",
      });
      await on.put("large.json", Buffer.alloc(5 * 1024 * 1024 + 1, 32));
      await on.pickToOpen("large.json");
      const large = await on.page().evaluate(() => window.host.openFile());
      expect(large).toMatchObject({ kind: "failed", message: "large.json holds 5.0 MB, allowed: at most 5 MB." });
    });

    contract("hands over a finished document byte by byte", async ({ on }) => {
      await on.pickToSave("pack.csv");
      const saved = await on.page().evaluate(() => {
        return window.host.exportFile({ suggestedName: "pack.csv", kind: "csv", bytes: new TextEncoder().encode("n;x;y\r\n1;2,5;µ") });
      });
      expect(saved).toEqual({ kind: "saved", name: "pack.csv" });
      expect(await on.get("pack.csv")).toBe("n;x;y\r\n1;2,5;µ");
      await on.pickToOpen("pack.csv");
      expect(await on.page().evaluate(() => window.host.importText("csv"))).toMatchObject({ kind: "opened", text: "n;x;y\r\n1;2,5;µ" });
      expect(await on.page().evaluate(() => window.host.recentFiles())).toEqual([]);
    });

    contract("keeps settings from one session to the next", async ({ on }) => {
      const first = await on.page().evaluate(() => window.host.readSettings());
      expect(first).toMatchObject({ theme: "system", printers: [], paper: "a4" });
      const changed = {
        ...first,
        theme: "dark" as const,
        printers: [{ name: "Prep room", scaleX: 0.998, scaleY: 1.002 }],
        printer: "Prep room",
      };
      await on.page().evaluate((settings) => window.host.writeSettings(settings), changed);
      await on.crashAndReturn();
      expect(await on.page().evaluate(() => window.host.readSettings())).toEqual(changed);
    });

    contract("offers the draft of a window that went down, with its file, and not that of a window that lives", async ({ on }) => {
      await on.put("tray.json", "saved");
      await on.pickToOpen("tray.json");
      const opened = await on.page().evaluate(() => window.host.openFile());
      if (opened.kind !== "opened") throw new Error("not opened");
      await on.page().evaluate(async (handle) => {
        await window.host.writeDraft({ title: "First", handle, text: "older" });
        await window.host.writeDraft({ title: "Second", handle, text: "newer" });
      }, opened.file.handle);
      expect(await on.page().evaluate(() => window.host.keptDrafts())).toEqual([]);
      await on.crashAndReturn();
      const kept = await on.page().evaluate(() => window.host.keptDrafts());
      expect(kept).toMatchObject([{ title: "Second", text: "newer", file: { name: "tray.json" }, saved: "saved" }]);
      const handle = kept[0].file?.handle ?? "";
      const saved = await on
        .page()
        .evaluate((known) => window.host.saveFile({ handle: known, suggestedName: "x", text: "newer", overwrite: false }), handle);
      expect(saved.kind).toBe("saved");
      expect(await on.get("tray.json")).toBe("newer");
      await on.page().evaluate((id) => window.host.discardDraft(id), kept[0].id);
      expect(await on.page().evaluate(() => window.host.keptDrafts())).toEqual([]);
    });

    contract("leaves no draft of work that was saved", async ({ on }) => {
      await on.page().evaluate(async () => {
        await window.host.writeDraft({ title: "Saved after all", handle: null, text: "x" });
        await window.host.clearDraft();
      });
      await on.crashAndReturn();
      expect(await on.page().evaluate(() => window.host.keptDrafts())).toEqual([]);
    });

    contract("shows the setup's name and an unsaved mark in the title", async ({ on }) => {
      await on.page().evaluate(() => window.host.setTitle({ name: "Two bars", handle: null, unsaved: true }));
      await expect.poll(() => on.title()).toBe("• Two bars – Fieldtray");
      await on.page().evaluate(() => window.host.setTitle({ name: "Two bars", handle: null, unsaved: false }));
      await expect.poll(() => on.title()).toBe("Two bars – Fieldtray");
    });

    contract("sends a command for its key, once", async ({ on }) => {
      await on.page().keyboard.press("Control+4");
      const commands = () => on.page().evaluate(() => window.heard.filter(({ kind: what }) => what === "command"));
      await expect.poll(commands).toEqual([{ kind: "command", command: "desk-sheets" }]);
    });

    contract("takes a file that is dropped on the window", async ({ on }) => {
      await on.put("dropped.json", TEXT);
      await on.drop("dropped.json");
      const arrived = () => on.page().evaluate(() => window.heard.filter(({ kind: what }) => what === "file-arrived"));
      // The desktop's page holds the program's own host beside this one, and each of the two hands the file on.
      await expect.poll(async () => (await arrived()).at(0)).toMatchObject({ file: { name: "dropped.json" }, text: TEXT });
    });

    contract("gives details for a report that hold the log, and no contents of files", async ({ on }) => {
      await on.put("secret.json", "TOP-SECRET-CONTENT");
      await on.pickToOpen("secret.json");
      const details = await on.page().evaluate(async () => {
        await window.host.openFile();
        window.host.log({ level: "warning", message: "the probe table was odd" });
        return window.host.details();
      });
      expect(details).toContain("Fieldtray");
      expect(details).toContain("the probe table was odd");
      expect(details).not.toContain("TOP-SECRET-CONTENT");
      expect(await on.page().evaluate(() => window.host.copyText("copied"))).toBe(true);
    });
  });
}
