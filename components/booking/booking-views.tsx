import Link from 'next/link';
import { cx } from '@/components/ui/class-names';

const VIEWS = [
  { id: 'table', href: '/bookings', label: 'All' },
  { id: 'week', href: '/bookings/week', label: 'Week' },
  { id: 'moves', href: '/bookings/moves', label: 'Moves' },
  { id: 'sessions', href: '/bookings/sessions', label: 'Sessions' },
] as const;

/** The views of the bookings, beside one another. */
export function BookingViews({ current }: { current: (typeof VIEWS)[number]['id'] }) {
  return (
    <nav aria-label="Views of the bookings" className="mb-5 border-b border-line">
      <ul className="flex flex-wrap gap-1">
        {VIEWS.map(({ id, href, label }) => (
          <li key={id}>
            <Link
              href={href}
              aria-current={id === current ? 'page' : undefined}
              className={cx(
                'block border-b-2 px-3 py-2',
                id === current ? 'border-ink font-semibold text-ink' : 'border-transparent text-ink-soft hover:border-line-strong hover:text-ink',
              )}
            >
              {label}
            </Link>
          </li>
        ))}
      </ul>
    </nav>
  );
}
