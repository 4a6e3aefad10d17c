import { useEffect, useRef } from "react";
import type { Settings } from "../../../shared-types/host";
import type { CloserLook } from "../../document/closer-look";

const COLOURS = "picture.colours";
const STEPS = "picture.steps";

/** Keeps the picture's colours and steps among the user's settings: who needs greys needs them tomorrow too. */
export function useKeptColours(closerLook: CloserLook, settings: Settings, onSettings: (change: Partial<Settings>) => void): void {
  const preferences = useRef(settings.preferences);
  preferences.current = settings.preferences;
  const { [COLOURS]: colours, [STEPS]: steps } = settings.preferences;
  useEffect(() => {
    if (colours === "hues" || colours === "greys") closerLook.look({ colours });
    if (typeof steps === "boolean") closerLook.look({ steps });
  }, [closerLook, colours, steps]);
  useEffect(
    () =>
      closerLook.subscribe((now, before) => {
        if (now.colours === before.colours && now.steps === before.steps) return;
        const { [COLOURS]: keptColours, [STEPS]: keptSteps } = preferences.current;
        if (keptColours === now.colours && keptSteps === now.steps) return;
        onSettings({ preferences: { ...preferences.current, [COLOURS]: now.colours, [STEPS]: now.steps } });
      }),
    [closerLook, onSettings],
  );
}
