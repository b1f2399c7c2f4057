import type { Insertable, Selectable, Updateable } from 'kysely';
import type { DB } from './tables';

/** Rows of the database by table name. Rows stay inside db/: they are mapped to domain types before they leave. */
export type Row<Table extends keyof DB> = Selectable<DB[Table]>;
export type NewRow<Table extends keyof DB> = Insertable<DB[Table]>;
export type RowChange<Table extends keyof DB> = Updateable<DB[Table]>;

export type { DB } from './tables';
