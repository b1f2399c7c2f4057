interface Pressed {
  readonly key: string;
  readonly altKey: boolean;
  readonly ctrlKey: boolean;
  readonly metaKey: boolean;
  readonly target: EventTarget | null;
}

const CLICKER: Readonly<Record<string, number>> = { PageDown: 1, PageUp: -1 };
const KEYS: Readonly<Record<string, number>> = { ArrowRight: 1, ArrowDown: 1, ArrowLeft: -1, ArrowUp: -1, Home: -Infinity, End: Infinity };

/** Keys that presentations are blanked by; a clicker's blank button sends one of them. Common practice, no source. */
const BLANK = new Set(['b', 'B', '.']);

const inControl = (target: EventTarget | null): boolean => target instanceof HTMLElement && target.matches('input, select, textarea');

export function isBlankKey({ key, altKey, ctrlKey, metaKey, target }: Pressed): boolean {
  const typing = target instanceof HTMLElement && target.matches('input:not([type=range]):not([type=radio]), select, textarea');
  return BLANK.has(key) && !altKey && !ctrlKey && !metaKey && !typing;
}

/** Clickers send PageUp and PageDown, and those always step; arrows move a control that has the focus instead. */
export function stepOfKey({ key, altKey, ctrlKey, metaKey, target }: Pressed, index: number, last: number): number | null {
  if (altKey || ctrlKey || metaKey) return null;
  const step = CLICKER[key] ?? (inControl(target) ? undefined : KEYS[key]);
  return step === undefined ? null : Math.min(last, Math.max(0, index + step));
}
