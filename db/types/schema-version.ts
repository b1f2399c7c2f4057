/** Newest migration this source tree was written for. Web and worker refuse a database that has another one. */
export const SCHEMA_VERSION = '20261202160000-let-staged-rows-be-erased';
