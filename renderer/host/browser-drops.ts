interface HandleItem {
  getAsFileSystemHandle?: () => Promise<FileSystemHandle | null | undefined>;
}

/** Files dropped on the window, with the browser's handle where it gives one. @returns a way to stop listening. */
export function listenForDrops(page: Window, take: (file: File, fileHandle: FileSystemFileHandle | null) => void): () => void {
  const hasFiles = (event: DragEvent): boolean => event.dataTransfer?.types.includes("Files") ?? false;
  const over = (event: DragEvent): void => {
    if (hasFiles(event)) event.preventDefault();
  };
  const drop = (event: DragEvent): void => {
    if (!hasFiles(event)) return;
    event.preventDefault();
    const file = event.dataTransfer?.files[0];
    if (file === undefined) return;
    // The handle has to be asked for before the event is over.
    const item = event.dataTransfer?.items[0] as (DataTransferItem & HandleItem) | undefined;
    const asked = item?.getAsFileSystemHandle?.() ?? Promise.resolve(null);
    void asked.catch(() => null).then((handle) => take(file, handle?.kind === "file" ? (handle as FileSystemFileHandle) : null));
  };
  page.addEventListener("dragover", over);
  page.addEventListener("drop", drop);
  return () => {
    page.removeEventListener("dragover", over);
    page.removeEventListener("drop", drop);
  };
}
