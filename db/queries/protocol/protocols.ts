import { sql } from 'kysely';
import type { SiteTransaction } from '@/db/client';
import {
  readProtocolDocument, readSequenceDocument, type ProtocolDocument, type ProtocolRecord, type SequenceDocument,
  type SequenceRecord,
} from '@/lib/domain/protocol/document';

interface SequenceJson {
  readonly id: string;
  readonly position: number;
  readonly data: unknown;
}

/** A protocol version with its sequences in one query: a protocol is never of use without them. */
function versions(trx: SiteTransaction, siteId: string) {
  return trx
    .selectFrom('protocol as p')
    .innerJoin('protocol_version as v', (join) =>
      join.onRef('v.site_id', '=', 'p.site_id').onRef('v.protocol_id', '=', 'p.id'),
    )
    .select(['p.site_id', 'p.id', 'p.archived_at', 'v.version', 'v.data', 'v.created_at'])
    .select(
      sql<SequenceJson[]>`(
        select coalesce(json_agg(json_build_object('id', q.id, 'position', q.position, 'data', q.data) order by q.position), '[]')
        from sequence q
        where q.site_id = v.site_id and q.protocol_id = v.protocol_id and q.protocol_version = v.version
      )`.as('sequences'),
    )
    .where('p.site_id', '=', siteId);
}

type ProtocolRow = Awaited<ReturnType<ReturnType<typeof versions>['execute']>>[number];

function toProtocol(row: ProtocolRow): ProtocolRecord {
  return {
    siteId: row.site_id,
    id: row.id,
    version: row.version,
    archivedAt: row.archived_at,
    changedAt: row.created_at,
    document: readProtocolDocument(row.data),
    sequences: row.sequences.map(
      (sequence): SequenceRecord => ({
        id: sequence.id,
        position: sequence.position,
        prescription: readSequenceDocument(sequence.data).prescription,
      }),
    ),
  };
}

export async function listProtocols(
  trx: SiteTransaction,
  siteId: string,
  options: { readonly includeArchived: boolean },
): Promise<ProtocolRecord[]> {
  let query = versions(trx, siteId).whereRef('v.version', '=', 'p.current_version').orderBy('p.name').orderBy('p.id');
  if (!options.includeArchived) query = query.where('p.archived_at', 'is', null);
  return (await query.execute()).map(toProtocol);
}

/** One version of a protocol, the newest unless said otherwise. */
export async function findProtocol(
  trx: SiteTransaction,
  siteId: string,
  id: string,
  version?: number,
): Promise<ProtocolRecord | null> {
  const query = versions(trx, siteId).where('p.id', '=', id);
  const row = await (version === undefined
    ? query.whereRef('v.version', '=', 'p.current_version')
    : query.where('v.version', '=', version)
  ).executeTakeFirst();
  return row ? toProtocol(row) : null;
}

export async function protocolNameTaken(trx: SiteTransaction, siteId: string, name: string, exceptId?: string): Promise<boolean> {
  let query = trx.selectFrom('protocol').select('id').where('site_id', '=', siteId).where('name', '=', name);
  if (exceptId) query = query.where('id', '<>', exceptId);
  return (await query.executeTakeFirst()) !== undefined;
}

interface NewVersion {
  readonly siteId: string;
  readonly id: string;
  readonly version: number;
  readonly document: ProtocolDocument;
  readonly sequences: readonly SequenceDocument[];
  readonly createdBy: string;
}

async function insertVersion(trx: SiteTransaction, next: NewVersion): Promise<void> {
  await trx
    .insertInto('protocol_version')
    .values({
      site_id: next.siteId,
      protocol_id: next.id,
      version: next.version,
      data: JSON.stringify(next.document),
      created_by: next.createdBy,
    })
    .execute();
  await trx
    .insertInto('sequence')
    .values(
      next.sequences.map((sequence, position) => ({
        site_id: next.siteId,
        protocol_id: next.id,
        protocol_version: next.version,
        position,
        name: sequence.prescription.name,
        family: sequence.prescription.family,
        data: JSON.stringify(sequence),
      })),
    )
    .execute();
}

export async function insertProtocol(
  trx: SiteTransaction,
  protocol: Omit<NewVersion, 'id' | 'version'> & { readonly id?: string },
): Promise<string> {
  const { siteId, document } = protocol;
  const { id } = await trx
    .insertInto('protocol')
    .values({ site_id: siteId, name: document.name, region: document.region, ...(protocol.id ? { id: protocol.id } : {}) })
    .returning('id')
    .executeTakeFirstOrThrow();
  await insertVersion(trx, { ...protocol, id, version: 1 });
  return id;
}

/** Adds the version after `expectedVersion`. @returns false when that is not the newest any more */
export async function addProtocolVersion(
  trx: SiteTransaction,
  change: Omit<NewVersion, 'version'> & { readonly expectedVersion: number },
): Promise<boolean> {
  const { expectedVersion, ...next } = change;
  const moved = await trx
    .updateTable('protocol')
    .set({ name: next.document.name, region: next.document.region, current_version: expectedVersion + 1 })
    .where('site_id', '=', next.siteId)
    .where('id', '=', next.id)
    .where('current_version', '=', expectedVersion)
    .executeTakeFirst();
  if (moved.numUpdatedRows !== 1n) return false;
  await insertVersion(trx, { ...next, version: expectedVersion + 1 });
  return true;
}

/** @returns false when the version is stale or the state is there already */
export async function setProtocolArchived(
  trx: SiteTransaction,
  siteId: string,
  id: string,
  expectedVersion: number,
  archivedAt: Date | null,
): Promise<boolean> {
  const changed = await trx
    .updateTable('protocol')
    .set({ archived_at: archivedAt })
    .where('site_id', '=', siteId)
    .where('id', '=', id)
    .where('current_version', '=', expectedVersion)
    .where('archived_at', archivedAt === null ? 'is not' : 'is', null)
    .executeTakeFirst();
  return changed.numUpdatedRows === 1n;
}
