import type { ReactNode } from 'react';
import { cx } from '@/components/ui/class-names';
import { Logo } from '@/components/ui/logo';
import { WovenEdge } from '@/components/ui/woven-edge';

/** A page that has one thing to say: not found, an error, a link that has ended. `inside` leaves the landmark to the shell. */
export function MessagePage({
  title,
  children,
  actions,
  inside = false,
}: {
  title: string;
  children: ReactNode;
  actions?: ReactNode;
  inside?: boolean;
}) {
  const Landmark = inside ? 'div' : 'main';
  return (
    <Landmark
      id={inside ? undefined : 'main'}
      className={cx('mx-auto flex max-w-xl flex-col justify-center px-6 py-16', !inside && 'min-h-[80dvh]')}
    >
      <Logo className="size-12" />
      <h1 className="mt-6 text-2xl">{title}</h1>
      <div className="mt-3 space-y-3 text-lg text-ink-soft">{children}</div>
      {actions && <div className="mt-8 flex flex-wrap gap-3">{actions}</div>}
      <WovenEdge className="mt-12" />
    </Landmark>
  );
}
