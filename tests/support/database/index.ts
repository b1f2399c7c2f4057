export { useOwnDatabase } from './own-database';
export { ownerDatabase } from './owner-database';
export { createTestSite, type TestSite } from './test-site';
