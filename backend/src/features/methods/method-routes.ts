import { METHODS, QUANTITY_KINDS } from '@shared/methods';
import { CONSTANTS, CONSTANTS_VERSION } from '@shared/constants';
import { personRoute, type Route } from '../../middleware/routes';

/** The built-in library of published methods, the kinds of quantities with their bounds, and the constants. */
export const methodRoutes: readonly Route[] = [
  personRoute({
    method: 'get',
    path: '/api/methods',
    summary: 'The library: methods, quantity kinds with physical bounds, constants',
    permission: 'signed-in',
    // Functions do not survive JSON: what is left of a method is its card.
    handler: () => ({
      methods: METHODS.map(({ compute: _compute, ...card }) => card),
      kinds: QUANTITY_KINDS,
      constants: CONSTANTS,
      constantsVersion: CONSTANTS_VERSION,
    }),
  }),
];
