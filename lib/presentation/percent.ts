import { roundToQuantum, withMinus } from './round';

/** "5 %", "7.03 %": a figure without a sign, as few decimals as needed up to `decimals`. */
export function formatPercent(percent: number, decimals = 0): string {
  return `${withMinus(String(roundToQuantum(percent, Number((10 ** -decimals).toFixed(decimals)))))} %`;
}

/** Relative change as a signed percent: 1 → 1.02 is "+2 %"; what rounds to nothing is "±0 %". */
export function formatSignedPercent(now: number, tried: number): string {
  const change = roundToQuantum((tried / now - 1) * 100, 1);
  if (change === 0) return '±0 %';
  return `${change > 0 ? '+' : '−'}${Math.abs(change)} %`;
}

/** A share of 0–1 as a probability people read: never "0 %" or "100 %" for what is only nearly so. */
export function formatProbability(share: number): string {
  const percent = share * 100;
  if (percent > 0 && percent < 1) return '< 1 %';
  if (percent < 100 && percent > 99) return '> 99 %';
  return formatPercent(percent);
}
