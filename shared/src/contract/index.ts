export * from './roles';
export * from './measure';
export * from './entities';
export * from './commands';
export * from './permissions';
export * from './standpoint';
export * from './views';
