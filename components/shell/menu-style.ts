export const menuPanelClass =
  'z-40 min-w-48 rounded-md border border-line-strong bg-paper p-1 text-ink shadow-lg print:hidden';

export const menuItemClass =
  'flex min-h-9 cursor-pointer items-center gap-3 rounded px-3 outline-none data-disabled:opacity-60 data-highlighted:bg-ink data-highlighted:text-paper';
