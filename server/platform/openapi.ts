import { z } from 'zod';
import { type EndpointSpec, isFileReply } from '#shared/kernel/endpoint.ts';
import { permissions } from '#shared/kernel/roles.ts';

const problemSchema = {
  type: 'object',
  description: 'Problem details (RFC 9457)',
  required: ['type', 'title', 'status', 'detail', 'code'],
  properties: {
    type: { type: 'string' },
    title: { type: 'string' },
    status: { type: 'integer' },
    detail: { type: 'string' },
    code: { type: 'string' },
    fields: { type: 'object', additionalProperties: { type: 'string' } },
    extra: { type: 'object' },
    reference: { type: 'string' },
  },
};

/** The OpenAPI 3.1 document, made from the endpoint objects that validate every request. */
export function openApiOf(endpoints: EndpointSpec[], version: string): object {
  const paths: Record<string, Record<string, object>> = {};
  for (const endpoint of endpoints) {
    const path = endpoint.path.replace(/:(\w+)/g, '{$1}');
    (paths[path] ??= {})[endpoint.method.toLowerCase()] = operationOf(endpoint);
  }
  return {
    openapi: '3.1.0',
    info: { title: 'Toeboard', version, description: 'Every route, from the same schemas that validate it.' },
    paths,
    components: {
      schemas: { Problem: problemSchema },
      securitySchemes: {
        session: { type: 'apiKey', in: 'cookie', name: 'tb_session' },
        device: { type: 'apiKey', in: 'cookie', name: 'tb_device' },
      },
    },
  };
}

function operationOf(endpoint: EndpointSpec): object {
  const { access, name, summary, params, query, body, reply } = endpoint;
  return {
    operationId: name,
    summary,
    tags: [name.split('.')[0]],
    parameters: [...parametersOf(params, 'path'), ...parametersOf(query, 'query')],
    ...(body
      ? {
          requestBody: {
            required: true,
            content: { 'application/json': { schema: schemaOf(body, 'input') } },
          },
        }
      : {}),
    responses: {
      200: {
        description: 'Done',
        content: isFileReply(reply)
          ? { [reply.file]: {} }
          : { 'application/json': { schema: schemaOf(reply, 'output') } },
      },
      default: {
        description: 'Refused',
        content: { 'application/problem+json': { schema: { $ref: '#/components/schemas/Problem' } } },
      },
    },
    security: access === 'public' ? [] : [access === 'device' ? { device: [] } : { session: [] }],
    'x-access': access,
    ...(access === 'public' || access === 'device' ? {} : { 'x-roles': permissions[access] }),
  };
}

function schemaOf(schema: z.ZodType, io: 'input' | 'output'): object {
  return z.toJSONSchema(schema, { io, unrepresentable: 'any', reused: 'inline' });
}

function parametersOf(schema: z.ZodObject | undefined, where: 'path' | 'query'): object[] {
  if (!schema) return [];
  const json = schemaOf(schema, 'input') as { properties?: Record<string, object>; required?: string[] };
  return Object.entries(json.properties ?? {}).map(([name, property]) => ({
    name,
    in: where,
    required: where === 'path' || (json.required ?? []).includes(name),
    schema: property,
  }));
}
