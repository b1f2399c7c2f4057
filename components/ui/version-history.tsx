import Link from 'next/link';
import type { ReactNode } from 'react';
import { Table, Td, Th, Tr } from './table';

export interface VersionRow {
  readonly version: number;
  readonly when: string;
  /** What this version changed, in words; empty for the first. */
  readonly changes: readonly { readonly words: string; readonly from: string; readonly to: string }[];
}

const MOST_SHOWN = 6;

/** Every version of a record, newest first, with what it changed. */
export function VersionHistory({
  rows,
  current,
  hrefOf,
  more,
}: {
  rows: readonly VersionRow[];
  current: number;
  hrefOf: (version: number) => string;
  more?: ReactNode;
}) {
  return (
    <>
      <Table caption="History of versions">
        <thead>
          <tr>
            <Th>Version</Th>
            <Th>Saved</Th>
            <Th>What it changed</Th>
          </tr>
        </thead>
        <tbody>
          {rows.map((row) => (
            <Tr key={row.version}>
              <Td className="align-top">
                <Link
                  href={hrefOf(row.version)}
                  className="text-link"
                  aria-current={row.version === current || undefined}
                >
                  Version <span className="figures">{row.version}</span>
                </Link>
              </Td>
              <Td className="align-top sm:whitespace-nowrap">{row.when}</Td>
              <Td>
                {row.changes.length === 0 ? (
                  <span className="text-ink-soft">first version</span>
                ) : (
                  <ul>
                    {row.changes.slice(0, MOST_SHOWN).map((change) => (
                      <li key={change.words}>
                        {change.words}: <span className="figures">{change.from}</span>
                        <span className="text-ink-soft"> → </span>
                        <span className="figures">{change.to}</span>
                      </li>
                    ))}
                    {row.changes.length > MOST_SHOWN && (
                      <li className="text-ink-soft">and {row.changes.length - MOST_SHOWN} more</li>
                    )}
                  </ul>
                )}
              </Td>
            </Tr>
          ))}
        </tbody>
      </Table>
      {more}
    </>
  );
}
