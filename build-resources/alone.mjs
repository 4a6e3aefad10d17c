import { mkdirSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { dirname } from "node:path";

/** One process at a time: several commands may be started at once, and only the first may install or build. */

const LOOK_EVERY_MS = 200;

const isAlive = (pid) => {
  try {
    process.kill(pid, 0);
    return true;
  } catch (error) {
    return error.code === "EPERM";
  }
};

/** Takes away a lock whose owner was killed. */
function clearIfAbandoned(lock) {
  try {
    const pid = Number(readFileSync(lock, "utf8"));
    if (Number.isInteger(pid) && pid > 0 && !isAlive(pid)) rmSync(lock, { force: true });
  } catch {
    // Gone meanwhile: the next attempt will tell.
  }
}

function taken(lock) {
  try {
    writeFileSync(lock, String(process.pid), { flag: "wx" });
    return true;
  } catch (error) {
    if (error.code !== "EEXIST") throw error;
    return false;
  }
}

/**
 * Runs `work` while no other process does.
 * @param lock path of a file that stands for the right to do it.
 */
export async function alone(lock, work) {
  mkdirSync(dirname(lock), { recursive: true });
  while (!taken(lock)) {
    clearIfAbandoned(lock);
    await new Promise((resolve) => setTimeout(resolve, LOOK_EVERY_MS));
  }
  try {
    return await work();
  } finally {
    rmSync(lock, { force: true });
  }
}
