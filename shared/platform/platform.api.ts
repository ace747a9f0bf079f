import { z } from 'zod';
import { endpoint } from '../kernel/endpoint.ts';

export const getHealth = endpoint({
  name: 'platform.health',
  method: 'GET',
  path: '/api/health',
  access: 'public',
  summary: 'Whether the server, its database and its PDF maker are well',
  reply: z.object({
    version: z.string(),
    database: z.enum(['well', 'unwell']),
    engine: z.enum(['embedded', 'postgresql']),
    pdf: z.boolean(),
  }),
});

export const getOpenApi = endpoint({
  name: 'platform.openapi',
  method: 'GET',
  path: '/api/openapi.json',
  access: 'public',
  summary: 'This API as an OpenAPI 3.1 document',
  reply: z.looseObject({ openapi: z.string(), paths: z.record(z.string(), z.unknown()) }),
});
