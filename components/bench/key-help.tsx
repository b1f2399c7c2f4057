'use client';

import { Button } from '@/components/ui/button';
import { Popover } from '@/components/ui/popover';

const KEYS: readonly (readonly [string, string])[] = [
  ['Ctrl Z', 'undo, 200 steps'],
  ['Ctrl Shift Z, Ctrl Y', 'redo'],
  ['Esc', 'leave what is tried'],
  ['Tab', 'from handle to handle, piece to piece'],
  ['Arrows', 'move the handle 1 mm, turn it 1°'],
  ['Shift arrows', 'the same by 10'],
  ['+ −', 'zoom'],
  ['Ctrl arrows', 'move the zoomed picture'],
  ['0', 'whole picture'],
];

/** What the keys do on the bench; in a text field they stay the field's own. */
export function KeyHelp() {
  return (
    <Popover label="Keys on the bench" trigger={<Button variant="quiet" size="sm" className="px-2!">Keys</Button>}>
      <dl className="grid grid-cols-[auto_1fr] gap-x-4 gap-y-1 text-sm">
        {KEYS.map(([key, does]) => (
          <div key={key} className="contents">
            <dt>
              <kbd className="figures">{key}</kbd>
            </dt>
            <dd className="text-ink-soft">{does}</dd>
          </div>
        ))}
      </dl>
      <p className="mt-2 text-sm text-ink-soft">The wheel zooms too, as do two fingers; drag the ground of the zoomed picture to move it. On a Mac, ⌘ does what Ctrl does.</p>
    </Popover>
  );
}
