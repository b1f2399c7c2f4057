export { closeDatabase, type Database, database, openDatabase } from './pool';
export { inTransaction, type SiteTransaction } from './in-transaction';
export * from './gate';
export { requireSchema } from './require-schema';
