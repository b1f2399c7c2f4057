export * from './password-rule';
export * from './person';
