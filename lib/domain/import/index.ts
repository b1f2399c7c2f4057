export * from './column-mapping';
export * from './import-row';
export * from './moment';
export * from './read-row';
export * from './reading-spread';
export * from './units';
