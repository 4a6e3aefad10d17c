import { useStore } from "zustand";
import type { Document } from "../document/document";
import { texts } from "../texts/texts";
import type { Zoom } from "./commands";
import { IconButton } from "./icon-button";
import type { IconName } from "./icons";
import type { Shown, WindowStore } from "./window-state";

const words = texts.window.view;

const LAYERS: readonly (readonly [key: keyof Shown, icon: IconName, word: string, name: string])[] = [
  ["picture", "picture", words.picture, words.pictureLong],
  ["equipotentials", "equipotentials", words.equipotentials, words.equipotentialsLong],
  ["fieldLines", "field-lines", words.fieldLines, words.fieldLinesLong],
  ["points", "points", words.points, words.pointsLong],
  ["tags", "tags", words.tags, words.tagsLong],
];

export interface ViewBarProps {
  readonly document: Document;
  readonly window: WindowStore;
  readonly zoom: Zoom;
  readonly tapeOut: boolean;
  readonly onTape: () => void;
  readonly onSavePicture: () => void;
}

/** What the tray shows, how it is looked at, and the measuring tape: along the tray's lower edge on every desk. */
export function ViewBar({ document, window, zoom, tapeOut, onTape, onSavePicture }: ViewBarProps) {
  const closerShown = useStore(window, (state) => state.closerShown);
  const shown = useStore(window, (state) => state.shown);
  const snapping = useStore(document, (state) => state.snapping);
  return (
    <div className="view-bar" role="toolbar" aria-label={words.label}>
      <div className="view-group">
        {LAYERS.map(([key, icon, word, name]) => (
          <IconButton
            key={key}
            icon={icon}
            word={word}
            name={`${word}: ${name}`}
            hint={name}
            pressed={shown[key]}
            onPress={() => window.set({ shown: { ...shown, [key]: !shown[key] } })}
          />
        ))}
      </div>
      <div className="view-group">
        <IconButton
          icon="snap"
          name={words.snapLong}
          pressed={snapping}
          onPress={() => document.setSnapping(!document.getState().snapping)}
        />
        <IconButton
          icon="closer-look"
          name={words.closer}
          pressed={closerShown}
          onPress={() => window.set({ closerShown: !closerShown, settingsShown: false, keysShown: false, stockShown: false })}
        />
        <IconButton icon="tape" name={words.tape} pressed={tapeOut} onPress={onTape} />
        <IconButton icon="save-picture" name={words.savePicture} onPress={onSavePicture} />
        <IconButton icon="further" name={words.zoomOut} onPress={zoom.zoomOut} />
        <IconButton icon="whole" name={words.zoomToTray} onPress={zoom.fit} />
        <IconButton icon="closer" name={words.zoomIn} onPress={zoom.zoomIn} />
      </div>
    </div>
  );
}
