export * from './view-context';
export * from './verdict-view';
export * from './budget-view';
export * from './requirements-view';
