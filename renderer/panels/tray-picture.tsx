import type { Setup } from "../../shared-types/setup";
import { chainOf, outlineOf } from "../engine/geometry/outline";
import { trayOutline, traySizeMm } from "../engine/geometry/tray-outline";

/** As much of a setup as its small picture needs. */
export interface Pictured {
  readonly tray: Setup["tray"];
  readonly parts: Setup["parts"];
  readonly slabs: Setup["water"]["slabs"];
}

export const picturedOf = ({ tray, parts, water }: Setup): Pictured => ({ tray, parts, slabs: water.slabs });

const pathOf = (loops: readonly (readonly (readonly [number, number])[])[], top: number): string =>
  loops.map((chain) => `M${chain.map(([x, y]) => `${x.toFixed(2)} ${(top - y).toFixed(2)}`).join("L")}Z`).join("");

const WALL_SHARE = 0.018;

/** A small picture of a tray, drawn from its setup: wall, water, plates on the bed, metal by its lead, insulators. */
export function TrayPicture({ tray, parts, slabs }: Pictured) {
  const [lengthMm, widthMm] = traySizeMm(tray);
  const size = Math.max(lengthMm, widthMm);
  const margin = 0.04 * size;
  const outlineFor = (thing: (typeof parts)[number] | (typeof slabs)[number]): string =>
    pathOf(
      outlineOf(thing).map((loop) => chainOf(loop, size / 400)),
      widthMm,
    );
  const wallPath = pathOf([chainOf(trayOutline(tray), size / 400)], widthMm);
  return (
    <svg
      className="tray-picture"
      viewBox={`${-margin} ${-margin} ${lengthMm + 2 * margin} ${widthMm + 2 * margin}`}
      aria-hidden="true"
      preserveAspectRatio="xMidYMid meet"
    >
      <path className="picture-wall" d={wallPath} strokeWidth={2 * WALL_SHARE * size} />
      <path className="picture-water" d={wallPath} />
      {slabs.map((slab) => (
        <path
          key={slab.id}
          className="picture-slab"
          d={outlineFor(slab)}
          strokeWidth={size / 160}
          strokeDasharray={`${size / 40} ${size / 60}`}
        />
      ))}
      {parts.map((part) => (
        <path
          key={part.id}
          className={`picture-${part.role}${part.role === "electrode" && part.tap >= 0.5 ? " picture-live" : ""}`}
          fillRule="evenodd"
          strokeWidth={size / 200}
          d={outlineFor(part)}
        />
      ))}
    </svg>
  );
}
