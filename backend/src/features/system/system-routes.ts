import { About, DemonstrationMails } from '@shared/contract';
import * as z from 'zod';
import { NotFound } from '../../middleware/problems';
import { openApiDocument } from '../../middleware/openapi';
import { publicRoute, type Route } from '../../middleware/routes';

export const PRODUCT = { name: 'Deltaproof', version: '0.1.0' } as const;

/** What the product says about itself. `allRoutes` is asked for when the document is made, after the whole table stands. */
export function systemRoutes(allRoutes: () => readonly Route[]): readonly Route[] {
  let document: unknown;
  return [
    publicRoute({
      method: 'get',
      path: '/api/health',
      summary: 'Whether the server and its database answer',
      answer: z.strictObject({ status: z.literal('ok') }),
      handler: async ({ services }) => {
        await services.sequelize.query('SELECT 1');
        return { status: 'ok' };
      },
    }),
    publicRoute({
      method: 'get',
      path: '/api/about',
      summary: 'Name and version of the product, and whether it runs as a demonstration',
      answer: About,
      handler: ({ services }) => ({ ...PRODUCT, demonstration: services.config.demonstration }),
    }),
    publicRoute({
      method: 'get',
      path: '/api/openapi.json',
      summary: 'This description of the interface, as OpenAPI 3.1',
      handler: () => (document ??= openApiDocument(allRoutes(), PRODUCT)),
    }),
    publicRoute({
      method: 'get',
      path: '/api/demo/mail',
      summary: 'Mails that the demonstration has kept instead of sending, newest first',
      answer: DemonstrationMails,
      handler: ({ services }) => {
        if (!services.config.demonstration || services.mailCatcher === null) throw new NotFound();
        return { mails: services.mailCatcher.mails() };
      },
    }),
  ];
}
