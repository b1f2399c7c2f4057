export * from './service-error';
