/** Constants of nature and of water, each with its source; imported wherever a formula needs one. */

/** Charge of one mole of electrons, C/mol (CODATA 2018, exact by the SI of 2019). */
export const FARADAY_C_PER_MOL = 96_485.332_12;
/** Molar gas constant, J/(mol K) (CODATA 2018, exact). */
export const GAS_CONSTANT_J_PER_MOL_K = 8.314_462_618;
/** Standard atmosphere, Pa (by definition). */
export const ATMOSPHERE_PA = 101_325;
export const KELVIN_AT_0_C = 273.15;

/** Density of water at 20 °C, kg/m³ (IAPWS-95); 997.05 at 25 °C, so that one value serves a tray within 0.2 %. */
export const WATER_DENSITY_KG_PER_M3 = 998.21;
/** Specific heat of water at 20 °C, J/(kg K) (IAPWS-95). */
export const WATER_SPECIFIC_HEAT_J_PER_KG_K = 4182;
/** Heat that evaporates a kilogram of water near 20 °C, J/kg (IAPWS-95, rounded). */
export const WATER_EVAPORATION_J_PER_KG = 2.45e6;

/** Molar mass of NaCl, g/mol (IUPAC atomic weights). */
export const SODIUM_CHLORIDE_G_PER_MOL = 58.44;
