/**
 * Proton gyromagnetic ratio over 2π [MHz/T], free proton. The shielded value differs by 26 ppm, far below any
 * digit shown here. Source: [codata-2018], from memory.
 */
export const PROTON_GYROMAGNETIC_RATIO_MHZ_PER_T = 42.577478518;

/** Shift of the main lipid peak below water [ppm of the field]. Source: [bernstein-2004], from memory. */
export const FAT_WATER_SHIFT_PPM = 3.5;
