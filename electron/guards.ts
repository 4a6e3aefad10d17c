import { app, type Session } from "electron";

/** What no page of this program may do, whatever it holds: go elsewhere, open windows, frame other pages, use the machine's devices. */

/** Guards every page that is ever made. @param note is told of each refusal. */
export function guardPages(note: (message: string) => void): void {
  app.on("web-contents-created", (_event, contents) => {
    contents.on("will-navigate", (event) => {
      event.preventDefault();
      note(`refused to go to ${event.url.slice(0, 200)}`);
    });
    contents.on("will-redirect", (event) => {
      event.preventDefault();
      note(`refused a redirection to ${event.url.slice(0, 200)}`);
    });
    contents.on("will-attach-webview", (event) => {
      event.preventDefault();
      note("refused to put a page into a page");
    });
    contents.setWindowOpenHandler(({ url }) => {
      note(`refused a new window for ${url.slice(0, 200)}`);
      return { action: "deny" };
    });
  });
}

/** Denies every permission (camera, position, devices …); the program needs none. */
export function denyPermissions(session: Session): void {
  session.setPermissionRequestHandler((_contents, _permission, answer) => answer(false));
  session.setPermissionCheckHandler(() => false);
  session.setDevicePermissionHandler(() => false);
}
