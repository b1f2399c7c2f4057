import Link from 'next/link';
import { ChevronRightIcon } from '@/components/ui/icons';

export interface SiteEntry {
  readonly href: string;
  readonly title: string;
  readonly text: string;
  /** How many there are, or the version in force. */
  readonly state?: string;
}

/** The parts of a site's set-up, each with what is there. */
export function SiteIndex({ entries }: { entries: readonly SiteEntry[] }) {
  return (
    <ul className="divide-y divide-line overflow-hidden rounded-md border border-line bg-paper">
      {entries.map((entry) => (
        <li key={entry.href}>
          <Link
            href={entry.href}
            className="flex items-center gap-4 px-5 py-3.5 hover:bg-sunk focus-visible:-outline-offset-2"
          >
            <span className="min-w-0 flex-1">
              <span className="block font-semibold">{entry.title}</span>
              <span className="block text-sm text-ink-soft">{entry.text}</span>
            </span>
            {entry.state && <span className="flex-none text-sm text-ink-soft">{entry.state}</span>}
            <ChevronRightIcon className="text-ink-soft" />
          </Link>
        </li>
      ))}
    </ul>
  );
}

/** What a new site still has to do before the bench can answer, in order. */
export function FirstSteps({ hasScanner, hasProtocol }: { hasScanner: boolean; hasProtocol: boolean }) {
  const steps = [
    { done: hasScanner, href: '/site/scanners/new', words: 'Add one scanner' },
    { done: hasProtocol, href: '/site/protocols/new', words: 'Add one protocol with one sequence' },
    { done: false, href: '/bench', words: 'Open the bench and read the first verdict' },
  ];
  const next = steps.findIndex((step) => !step.done);
  return (
    <section aria-labelledby="first-steps" className="mb-6 rounded-md border border-indigo bg-wash px-5 py-4">
      <h2 id="first-steps" className="text-lg">
        Three steps to the first verdict
      </h2>
      <ol className="mt-2 list-decimal space-y-1 pl-6">
        {steps.map((step, index) => (
          <li key={step.href} className={step.done ? 'text-ink-soft' : undefined}>
            {index === next ? (
              <Link href={step.href} className="text-link font-semibold">
                {step.words}
              </Link>
            ) : (
              <span>
                {step.words}
                {step.done && ', done'}
              </span>
            )}
          </li>
        ))}
      </ol>
    </section>
  );
}
