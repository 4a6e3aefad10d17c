import { baseConducts } from "../bench/base-materials";
import type { SetupRule } from "./rule";
import { finding } from "./wording";

/** A metal tray carries the current itself: the plan takes walls and bed for insulators. */
export const trayMaterial: SetupRule = (setup) => {
  const { baseMaterial } = setup.tray;
  if (!baseConducts(baseMaterial)) return [];
  return [
    finding({
      code: "tray-conducts",
      severity: "stop",
      about: "tray.baseMaterial",
      message: `A tray of ${baseMaterial} carries the current itself and joins the electrodes that stand on it.`,
      measured: baseMaterial,
      limit: { text: "an insulating tray", source: "the plan takes walls and bed for insulators" },
      remedy: "Use a tray of acrylic or glass.",
      edit: { path: "tray.baseMaterial", value: "acrylic" },
      safety: true,
    }),
  ];
};
