/** Three Jest projects: shared (pure), backend (on a throwaway PostgreSQL), frontend (jsdom, zoneless). */
export default { projects: ['<rootDir>/shared', '<rootDir>/backend', '<rootDir>/frontend'] };
