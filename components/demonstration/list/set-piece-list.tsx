'use client';

import { useRouter } from 'next/navigation';
import { ActionButton } from '@/components/ui/action-button';
import type { CreateAction } from './new-demonstration';

export interface SetPieceLine {
  readonly key: string;
  readonly title: string;
  readonly lead: string;
}

/** Cases worked out by the engine, to copy and change. */
export function SetPieceList({ pieces, create }: { pieces: readonly SetPieceLine[]; create: CreateAction }) {
  const router = useRouter();
  return (
    <ul className="grid gap-4 sm:grid-cols-2 lg:grid-cols-3">
      {pieces.map(({ key, title, lead }) => (
        <li key={key} className="flex flex-col justify-between gap-3 rounded-md border border-line bg-paper p-4">
          <div>
            <h3 className="font-semibold">{title}</h3>
            <p className="mt-1 text-sm text-ink-soft">{lead}</p>
          </div>
          <ActionButton
            action={async () => {
              const result = await create({ title, setPiece: key });
              if (result.ok) router.push(`/demonstrations/${result.data.id}`);
              return result;
            }}
            onDone={() => undefined}
            pendingLabel="Copying …"
          >
            Copy
          </ActionButton>
        </li>
      ))}
    </ul>
  );
}
