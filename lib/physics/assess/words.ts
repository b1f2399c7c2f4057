import type { PatientAxis, Side } from '../model/axes';

/** At most one decimal, without a trailing zero. */
export const figure = (value: number): string =>
  (Math.round(value * 10 + 1e-6) / 10).toFixed(1).replace(/\.0$/, '');

/** Whole millimetres, never "0" for something that is there. */
export const millimetres = (value: number): string =>
  value > 0 && value < 1 ? 'under 1 mm' : `${Math.round(value)} mm`;

/** Share of the nominal FOV or slab acquired beyond it, in percent. */
export const percentBeyond = (acquired: number, nominal: number): string =>
  `${figure((acquired / nominal - 1) * 100)} %`;

export const OPPOSITE_SIDE: Readonly<Record<Side, Side>> = {
  right: 'left',
  left: 'right',
  anterior: 'posterior',
  posterior: 'anterior',
  superior: 'inferior',
  inferior: 'superior',
};

export const AXIS_LETTERS: Readonly<Record<PatientAxis, string>> = { RL: 'R–L', AP: 'A–P', SI: 'S–I' };

export const capitalised = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1);

/** Square centimetres, one significant figure below 1 cm². */
export const squareCentimetres = (mm2: number): string => {
  const cm2 = mm2 / 100;
  return cm2 >= 1 ? `${Math.round(cm2)} cm²` : `${figure(Math.max(cm2, 0.1))} cm²`;
};
