export * from './view-context';
