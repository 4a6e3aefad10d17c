import { useCallback, useEffect, useRef, useState } from "react";
import type { Host, Settings } from "../../shared-types/host";
import { settingsSchema } from "../../shared-types/host";
import type { Document } from "../document/document";
import { withPicture } from "./recent-pictures";

/** The settings that outlive a session, and a way to change some of them. Changes made before they are read win over what is read. */
export function useSettings(host: Host): readonly [Settings, (change: Partial<Settings>) => void] {
  const [settings, setSettings] = useState<Settings>(() => settingsSchema.parse({}));
  const latest = useRef(settings);
  const early = useRef<Partial<Settings>>({});
  const read = useRef(false);
  useEffect(() => {
    host.readSettings().then(
      (kept) => {
        read.current = true;
        latest.current = { ...kept, ...early.current };
        setSettings(latest.current);
        if (Object.keys(early.current).length > 0) host.writeSettings(latest.current).catch(() => {});
      },
      () => {
        read.current = true;
      },
    );
  }, [host]);
  const change = useCallback(
    (some: Partial<Settings>): void => {
      latest.current = { ...latest.current, ...some };
      setSettings(latest.current);
      if (read.current) host.writeSettings(latest.current).catch(() => {});
      else early.current = { ...early.current, ...some };
    },
    [host],
  );
  return [settings, change];
}

/** Keeps a small picture of every setup that is opened from or saved to a file, for the start page. */
export function useRecentPictures(document: Document, settings: Settings, onSettings: (change: Partial<Settings>) => void): void {
  const preferences = useRef(settings.preferences);
  preferences.current = settings.preferences;
  useEffect(
    () =>
      document.subscribe(({ file, saved }, before) => {
        if (file === null || saved === null || (file === before.file && saved === before.saved)) return;
        onSettings({ preferences: withPicture(preferences.current, file.handle, saved) });
      }),
    [document, onSettings],
  );
}
