import { Router } from 'express';
import { z } from 'zod';
import { endpoint, routeTable, type RouteRecord } from '../endpoint';
import { VERSION } from '../version';

type JsonSchema = Record<string, unknown>;

/** What a schema takes in, as JSON Schema; rules that JSON Schema cannot say are left to the messages. */
function describeSchema(schema: z.ZodType, io: 'input' | 'output'): JsonSchema {
  return z.toJSONSchema(schema, {
    io,
    unrepresentable: 'any',
    target: 'draft-2020-12',
  });
}

const pathParameters = (path: string) =>
  [...path.matchAll(/:(\w+)/g)].map(([, name]) => ({
    name,
    in: 'path',
    required: true,
    schema: { type: 'integer', minimum: 1 },
  }));

function describeRoute(route: RouteRecord): JsonSchema {
  const { summary, body, answer, status = 200, access, isCreate, path } = route;
  const keyHeader = {
    name: 'Idempotency-Key',
    in: 'header',
    required: true,
    schema: { type: 'string' },
  };
  return {
    summary,
    security: access === 'public' ? [] : [{ bearer: [] }],
    parameters: [...pathParameters(path), ...(isCreate ? [keyHeader] : [])],
    ...(body
      ? {
          requestBody: {
            required: true,
            content: { 'application/json': { schema: describeSchema(body, 'input') } },
          },
        }
      : {}),
    responses: {
      [status]: {
        description: 'The answer',
        content: { 'application/json': { schema: describeSchema(answer, 'output') } },
      },
      default: {
        description: 'A refusal',
        content: { 'application/json': { schema: { $ref: '#/components/schemas/Error' } } },
      },
    },
  };
}

const ERROR_SCHEMA = {
  type: 'object',
  properties: {
    error: {
      type: 'object',
      properties: {
        code: { type: 'string' },
        message: { type: 'string' },
        issues: {
          type: 'array',
          items: {
            type: 'object',
            properties: { path: { type: 'string' }, message: { type: 'string' } },
          },
        },
      },
      required: ['code', 'message'],
    },
  },
  required: ['error'],
};

/** The description of all routes, made from the schemas that validate them. */
export function openApi(): JsonSchema {
  const paths: Record<string, Record<string, JsonSchema>> = {};
  for (const route of routeTable) {
    const address = `/api${route.prefix}${route.path.replaceAll(/:(\w+)/g, '{$1}')}`;
    paths[address] = { ...paths[address], [route.method]: describeRoute(route) };
  }
  return {
    openapi: '3.1.0',
    info: { title: 'Cragline', version: VERSION },
    paths,
    components: {
      schemas: { Error: ERROR_SCHEMA },
      securitySchemes: { bearer: { type: 'http', scheme: 'bearer', bearerFormat: 'JWT' } },
    },
  };
}

export const descriptionRouter = Router();

endpoint(descriptionRouter, {
  method: 'get',
  path: '/openapi.json',
  summary: 'This description',
  access: 'public',
  answer: z.record(z.string(), z.unknown()),
  handle: () => Promise.resolve(openApi()),
});
