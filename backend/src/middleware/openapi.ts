import { Problem } from '@shared/contract';
import * as z from 'zod';
import { needsIdempotencyKey, type Route } from './routes';

type JsonObject = Record<string, unknown>;

/** The OpenAPI 3.1 document of a route table. */
export function openApiDocument(
  routes: readonly Route[],
  product: { readonly name: string; readonly version: string },
): JsonObject {
  const paths: Record<string, JsonObject> = {};
  for (const route of routes) {
    const path = route.path.replace(/:([A-Za-z]+)/g, '{$1}');
    (paths[path] ??= {})[route.method] = operation(route);
  }
  return {
    openapi: '3.1.0',
    jsonSchemaDialect: 'https://json-schema.org/draft/2020-12/schema',
    info: { title: product.name, version: product.version },
    paths,
    components: {
      schemas: { Problem: schemaOf(Problem, 'output') },
      securitySchemes: { session: { type: 'apiKey', in: 'cookie', name: '__Host-sid' } },
    },
  };
}

function operation(route: Route): JsonObject {
  const parameters = [
    ...(route.scope === 'study' ? [parameter('path', 'study', { type: 'string' }, true)] : []),
    ...parametersOf(route.params, 'path'),
    ...parametersOf(route.query, 'query'),
    ...(needsIdempotencyKey(route)
      ? [parameter('header', 'Idempotency-Key', { type: 'string', format: 'uuid' }, true)]
      : []),
  ];
  const problem = { 'application/problem+json': { schema: { $ref: '#/components/schemas/Problem' } } };
  return {
    summary: route.summary,
    security: route.permission === 'public' ? [] : [{ session: [] }],
    'x-permission': route.permission,
    ...(parameters.length === 0 ? {} : { parameters }),
    ...(route.body === undefined
      ? {}
      : {
          requestBody: { required: true, content: { 'application/json': { schema: schemaOf(route.body, 'input') } } },
        }),
    responses: {
      [route.status]: {
        description: 'Done',
        ...(route.answer === undefined
          ? {}
          : { content: { 'application/json': { schema: schemaOf(route.answer, 'output') } } }),
      },
      default: { description: 'Refused', content: problem },
    },
  };
}

function parametersOf(schema: z.ZodType | undefined, place: 'path' | 'query'): JsonObject[] {
  if (schema === undefined) return [];
  const { properties = {}, required = [] } = schemaOf(schema, 'input') as {
    properties?: Record<string, unknown>;
    required?: string[];
  };
  return Object.entries(properties).map(([name, part]) =>
    parameter(place, name, part, place === 'path' || required.includes(name)),
  );
}

function parameter(place: 'path' | 'query' | 'header', name: string, schema: unknown, required: boolean): JsonObject {
  return { in: place, name, required, schema };
}

function schemaOf(schema: z.ZodType, io: 'input' | 'output'): JsonObject {
  const { $schema: _dialect, ...rest } = z.toJSONSchema(schema, { io, unrepresentable: 'any', reused: 'inline' });
  return rest;
}
