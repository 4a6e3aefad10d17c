import { type IpcMainEvent, type IpcMainInvokeEvent, ipcMain } from "electron";
import { CHANNEL_NAMES, type ChannelName, channelOf, DROP_CHANNEL } from "../shared-types/host-channel-names";
import { type Answer, CHANNELS, droppedPathSchema, type Request } from "../shared-types/host-channels";
import { isOwnPage } from "./protocol";
import type { OpenWindow, Windows } from "./windows";

type Door<Name extends ChannelName> = [Answer<Name>] extends [undefined]
  ? (window: OpenWindow, request: Request<Name>) => void
  : (window: OpenWindow, request: Request<Name>) => Promise<Answer<Name>> | Answer<Name>;

/** What the process does for each door of the bridge; a door whose answer is nothing may end without a value, at once or later. */
export type Doors = { readonly [Name in ChannelName]: Door<Name> };

/** @returns the window that a message comes from, null unless it comes from the top of one of our own pages. */
function senderOf(event: IpcMainInvokeEvent | IpcMainEvent, windows: Windows): OpenWindow | null {
  const frame = event.senderFrame;
  if (frame === null || frame !== event.sender.mainFrame || !isOwnPage(frame.url)) return null;
  return windows.ofContents(event.sender.id);
}

function openDoor<Name extends ChannelName>(name: Name, doors: Doors, windows: Windows, note: (message: string) => void): void {
  ipcMain.handle(channelOf(name), async (event, message: unknown) => {
    const window = senderOf(event, windows);
    if (window === null) {
      note(`refused ${name} from a page that is not ours`);
      throw new Error("refused");
    }
    const request = CHANNELS[name].request.safeParse(message);
    if (!request.success) {
      const issue = request.error.issues[0];
      note(`refused ${name}: ${issue?.path.join(".") ?? ""} ${issue?.message ?? ""}`);
      throw new Error(`the request ${name} does not fit its schema`);
    }
    try {
      return await doors[name](window, request.data as Request<Name>);
    } catch (error) {
      note(`${name} failed: ${error instanceof Error ? (error.stack ?? error.message) : String(error)}`);
      throw error;
    }
  });
}

/** Opens every door of the bridge. @param onDropped is told the path of a file that was dropped on a window. */
export function openDoors(
  doors: Doors,
  windows: Windows,
  onDropped: (window: OpenWindow, path: string) => void,
  note: (message: string) => void,
): void {
  for (const name of CHANNEL_NAMES) openDoor(name, doors, windows, note);
  ipcMain.on(DROP_CHANNEL, (event, message: unknown) => {
    const window = senderOf(event, windows);
    const path = droppedPathSchema.safeParse(message);
    if (window !== null && path.success) onDropped(window, path.data);
    else note("refused a dropped file");
  });
}
