export * from './executor';
export * from './play';
export * from './procedure';
export * from './words';
