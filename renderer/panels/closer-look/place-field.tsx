import type { Tray } from "../../../shared-types/setup";
import { traySizeMm } from "../../engine/geometry/tray-outline";
import { texts } from "../../texts/texts";
import { NumberField } from "../number-field";

/** One coordinate of a place on the tray, mm; a number beyond the tray is refused in words. */
export function PlaceField(props: {
  readonly label: string;
  readonly axis: "x" | "y";
  readonly tray: Tray;
  readonly valueMm: number;
  readonly bare?: boolean;
  readonly onSet: (valueMm: number) => void;
}) {
  const { label, axis, tray, valueMm, bare = false, onSet } = props;
  const most = traySizeMm(tray)[axis === "x" ? 0 : 1];
  return (
    <NumberField
      label={label}
      unit="mm"
      value={valueMm}
      step={1}
      bare={bare}
      onSet={(next) => {
        if (next < 0 || next > most) return [{ where: "", message: texts.closer.outside("0", String(most)) }];
        onSet(next);
        return [];
      }}
    />
  );
}
