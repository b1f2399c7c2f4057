export * from './actor';
export * from './can';
export * from './permissions';
export * from './role';
export * from './scope';
