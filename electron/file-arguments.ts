import { resolve } from "node:path";

/**
 * The files that a start of the program was given.
 * @param argv the process's arguments; switches are left out, and so is the program's own folder when it runs unpackaged.
 * @param folder the folder in which the start was made.
 */
export function fileArguments(argv: readonly string[], isPackaged: boolean, folder: string): readonly string[] {
  const given = argv.slice(1).filter((argument) => !argument.startsWith("-"));
  return (isPackaged ? given : given.slice(1)).map((name) => resolve(folder, name));
}
