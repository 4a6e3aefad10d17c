import { useEffect, useState } from "react";
import type { Settings } from "../../shared-types/host";

export const THEMES = ["system", "light", "dark", "contrast"] as const satisfies readonly Settings["theme"][];

const prefersDark = (): MediaQueryList => matchMedia("(prefers-color-scheme: dark)");

/** Puts the chosen colours and the chosen size on the page. @returns whether the colours are dark. */
export function useTheme({ theme, interfaceZoom }: Settings): boolean {
  const [systemDark, setSystemDark] = useState(prefersDark().matches);
  useEffect(() => {
    const query = prefersDark();
    const follow = (): void => setSystemDark(query.matches);
    query.addEventListener("change", follow);
    return () => query.removeEventListener("change", follow);
  }, []);
  const dark = theme === "dark" || (theme === "system" && systemDark);
  const root = globalThis.document.documentElement;
  root.dataset.theme = dark ? "dark" : "light";
  root.dataset.contrast = theme === "contrast" ? "more" : "normal";
  root.style.setProperty("--zoom", String(interfaceZoom));
  return dark;
}
