interface Pressed {
  readonly key: string;
  readonly altKey: boolean;
  readonly ctrlKey: boolean;
  readonly metaKey: boolean;
  readonly target: EventTarget | null;
}

const CLICKER: Readonly<Record<string, number>> = { PageDown: 1, PageUp: -1 };
const KEYS: Readonly<Record<string, number>> = { ArrowRight: 1, ArrowDown: 1, ArrowLeft: -1, ArrowUp: -1, Home: -Infinity, End: Infinity };

/** Clickers send PageUp and PageDown, and those always step; arrows move a control that has the focus instead. */
export function stepOfKey({ key, altKey, ctrlKey, metaKey, target }: Pressed, index: number, last: number): number | null {
  if (altKey || ctrlKey || metaKey) return null;
  const inControl = target instanceof HTMLElement && target.matches('input, select, textarea');
  const step = CLICKER[key] ?? (inControl ? undefined : KEYS[key]);
  return step === undefined ? null : Math.min(last, Math.max(0, index + step));
}
