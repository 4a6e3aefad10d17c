import { useStore } from "zustand";
import type { Settings } from "../../shared-types/host";
import { texts } from "../texts/texts";
import { ChoiceField, choicesOf } from "./fields";
import { IconButton } from "./icon-button";
import type { WindowStore } from "./window-state";

const words = texts.window.settings;
const SIZES = ["0.8", "0.9", "1", "1.1", "1.25", "1.5", "1.75", "2"] as const;

export interface SettingsCardProps {
  readonly window: WindowStore;
  readonly settings: Settings;
  readonly onSettings: (change: Partial<Settings>) => void;
}

/** Units of lengths, and how large the interface is. */
export function SettingsCard({ window, settings, onSettings }: SettingsCardProps) {
  const shown = useStore(window, (state) => state.settingsShown);
  if (!shown) return null;
  return (
    <section className="float-card settings-card" aria-label={words.title}>
      <header className="card-head">
        <h2>{words.title}</h2>
        <IconButton icon="close" name={texts.window.keys.close} onPress={() => window.set({ settingsShown: false })} />
      </header>
      <ChoiceField
        label={words.lengths}
        value={settings.lengthUnit}
        choices={choicesOf<Settings["lengthUnit"]>(words.units)}
        onSet={(lengthUnit) => onSettings({ lengthUnit })}
      />
      <ChoiceField<string>
        label={words.size}
        value={String(settings.interfaceZoom)}
        choices={SIZES.map((size) => [size, words.percent(Number(size))])}
        onSet={(size) => onSettings({ interfaceZoom: Number(size) })}
      />
      <p className="hint">{words.paperStays}</p>
    </section>
  );
}
