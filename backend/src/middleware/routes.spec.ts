/** @jest-environment node */
import * as z from 'zod';
import { checkRoutes, personRoute, publicRoute, type Route, studyRead, studyWrite } from './routes';

const handler = (): null => null;

it('accepts a sound table', () => {
  expect(() =>
    checkRoutes([
      publicRoute({ method: 'get', path: '/api/health', summary: '', handler }),
      studyRead({
        path: '/api/studies/:study/changes/:key',
        summary: '',
        permission: 'member',
        params: z.strictObject({ key: z.string() }),
        query: z.strictObject({ at: z.string().default('now') }),
        handler,
      }),
      studyWrite({
        method: 'post',
        path: '/api/studies/:study/edits',
        summary: '',
        permission: { anyOf: ['analyst'] },
        body: z.discriminatedUnion('type', [
          z.strictObject({ type: z.literal('a') }),
          z.strictObject({ type: z.literal('b') }),
        ]),
        handler,
      }),
    ]),
  ).not.toThrow();
});

const sound = personRoute({ method: 'get', path: '/api/people', summary: '', permission: 'signed-in', handler });
const faulty: [string, Route, RegExp][] = [
  ['without a permission', { ...sound, permission: undefined as never }, /has no permission/],
  ['outside /api', { ...sound, path: '/people' }, /does not lie under \/api/],
  ['inside a study without its scope', { ...sound, path: '/api/studies/:study/x' }, /must be a study route/],
  ['of a study elsewhere', { ...sound, scope: 'study' }, /must be a study route/],
  ['with an undeclared parameter', { ...sound, path: '/api/people/:personId' }, /declares none/],
  ['with a parameter that is not in its path', { ...sound, params: z.strictObject({ a: z.string() }) }, /declares a/],
  ['with a loose query', { ...sound, query: z.object({ a: z.string() }) }, /unknown fields in its query/],
  ['with a loose body', { ...sound, method: 'post', body: z.object({ a: z.string() }) }, /unknown fields in its body/],
  [
    'with a loose alternative in its body',
    { ...sound, method: 'post', body: z.union([z.strictObject({ a: z.string() }), z.object({ b: z.string() })]) },
    /unknown fields in its body/,
  ],
  ['that is a GET with a body', { ...sound, body: z.strictObject({}) }, /although it is a GET/],
];
it.each(faulty)('refuses a route %s at start-up', (_name, route, message) => {
  expect(() => checkRoutes([route])).toThrow(message);
});

it('refuses an address that is declared twice, whatever its parameter is called', () => {
  const one = { ...sound, path: '/api/people/:a', params: z.strictObject({ a: z.string() }) };
  const two = { ...sound, path: '/api/people/:b', params: z.strictObject({ b: z.string() }) };
  expect(() => checkRoutes([one, two])).toThrow(/declared twice/);
});
