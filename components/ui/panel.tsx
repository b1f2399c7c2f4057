'use client';

import { useId, useState, type ReactNode } from 'react';
import { cx } from './class-names';
import { ChevronRightIcon } from './icons';

export interface PanelProps {
  title: ReactNode;
  /** Beside the title: where values come from, a link. */
  aside?: ReactNode;
  /** Always at the end of the title line, open or rolled up. */
  actions?: ReactNode;
  children: ReactNode;
  /** One line that stands in for the content while the panel is collapsed. */
  summary?: ReactNode;
  collapsible?: boolean;
  defaultOpen?: boolean;
  /** Controlled, when the open group follows something else. */
  open?: boolean;
  onOpenChange?: (open: boolean) => void;
  /** Small capitals on cloth (bench) or a plain heading on paper (forms). */
  tone?: 'bench' | 'paper';
  level?: 2 | 3 | 4;
  className?: string;
  id?: string;
}

/** A titled group that can roll up to one line. Its content stays mounted, so nothing typed is lost. */
export function Panel(props: PanelProps) {
  const {
    title,
    aside,
    actions,
    children,
    summary,
    collapsible = false,
    tone = 'paper',
    level = 2,
    className,
    id,
  } = props;
  const [ownOpen, setOwnOpen] = useState(props.defaultOpen ?? true);
  const open = !collapsible || (props.open ?? ownOpen);
  const contentId = useId();
  const Heading = `h${level}` as const;
  const toggle = () => {
    setOwnOpen(!open);
    props.onOpenChange?.(!open);
  };
  const heading =
    tone === 'bench'
      ? 'text-sm font-semibold tracking-wider uppercase'
      : cx('font-semibold', level === 4 ? 'text-base' : 'text-lg');
  return (
    <section
      id={id}
      className={cx(
        tone === 'paper' ? 'rounded-md border border-line bg-paper' : 'border-b border-line',
        className,
      )}
    >
      <div className={cx('flex items-baseline justify-between gap-4 px-4', open ? 'pt-3' : 'py-3')}>
        <Heading
          className={cx(
            'min-w-0',
            Boolean(actions) && 'flex-1',
            heading,
            tone === 'bench' && 'text-ink-soft',
          )}
        >
          {collapsible ? (
            <button
              type="button"
              aria-expanded={open}
              aria-controls={contentId}
              onClick={toggle}
              className="-mx-1 flex items-baseline gap-2 rounded px-1 text-left [text-transform:inherit]"
            >
              <ChevronRightIcon className={cx('relative top-0.5 flex-none transition-transform', open && 'rotate-90')} />
              <span>{title}</span>
            </button>
          ) : (
            title
          )}
        </Heading>
        {!open && summary ? (
          <p className="min-w-0 truncate text-sm text-ink-soft">{summary}</p>
        ) : (
          aside && <div className="flex-none text-sm">{aside}</div>
        )}
        {actions && <div className="-my-1.5 -mr-2 flex flex-none items-center self-baseline">{actions}</div>}
      </div>
      <div id={contentId} hidden={!open} className="px-4 pt-2 pb-4">
        {children}
      </div>
    </section>
  );
}
