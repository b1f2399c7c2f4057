import Link from 'next/link';
import { formatDate } from '@/lib/presentation/moment';
import type { DemonstrationLine } from '@/lib/schemas/demonstration';

const several = (count: number, one: string, many: string): string => `${count} ${count === 1 ? one : many}`;

/** What the site has, newest change first. Those who do not build open the presentation. */
export function DemonstrationList({ lines, mayEdit }: { lines: readonly DemonstrationLine[]; mayEdit: boolean }) {
  return (
    <ul className="divide-y divide-line border-y border-line">
      {lines.map(({ id, title, scenes, links, changedAt }) => (
        <li key={id} className="flex flex-wrap items-baseline justify-between gap-x-6 gap-y-1 py-3">
          <div className="min-w-0">
            <Link href={mayEdit ? `/demonstrations/${id}` : `/demonstrations/${id}/present`} className="text-link text-lg font-semibold">{title}</Link>
            <p className="text-sm text-ink-soft">
              {several(scenes, 'scene', 'scenes')} · changed {formatDate(new Date(changedAt))}
              {mayEdit && links > 0 && ` · ${several(links, 'link works', 'links work')}`}
            </p>
          </div>
          {mayEdit && scenes > 0 && <Link href={`/demonstrations/${id}/present`} className="text-link">Present “{title}”</Link>}
        </li>
      ))}
    </ul>
  );
}
