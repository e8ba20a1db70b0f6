import { z } from 'zod';
import type { Endpoint } from './endpoint';
import type { Route } from './registry';

const Problem = z.strictObject({
  type: z.string(),
  title: z.string(),
  status: z.int(),
  detail: z.string(),
  errors: z.array(z.strictObject({ pointer: z.string(), code: z.string(), message: z.string() })).min(1),
  current: z.unknown().optional().describe('Of 412: the document as it stands now'),
});

type Json = Record<string, unknown>;

const OUTCOMES: Readonly<Record<number, string>> = {
  200: 'Done',
  201: 'Created',
  202: 'Accepted',
  204: 'Done; there is nothing to say',
};

const content = (type: string, schema: unknown): Json => ({ content: { [type]: { schema } } });

function jsonSchema(schema: z.ZodType, io: 'input' | 'output', id: string): Json {
  const { $schema: _, ...rest } = z.toJSONSchema(schema, { io, unrepresentable: 'any' });
  // References into a schema of its own start at its own root.
  return JSON.stringify(rest).includes('"$ref"') ? { $id: `urn:putlog:schema:${id}`, ...rest } : rest;
}

const pathOf = (pattern: string): string => pattern.replaceAll(/\[([^\]]+)\]/g, '{$1}');

function parametersOf(pattern: string, query: z.ZodType | undefined, id: string): Json[] {
  const inPath = [...pattern.matchAll(/\[([^\]]+)\]/g)].map(([, name]) => ({
    name,
    in: 'path',
    required: true,
    schema: { type: 'string' },
  }));
  const { properties = {}, required = [] } = query ? jsonSchema(query, 'input', id) : {};
  const inQuery = Object.entries(Object(properties)).map(([name, schema]) => ({
    name,
    in: 'query',
    required: Array.isArray(required) && required.includes(name),
    schema,
  }));
  return [...inPath, ...inQuery];
}

/** A form of one file, of the media types that are listed. */
const formOf = (types: string): Json => ({
  required: true,
  content: {
    'multipart/form-data': {
      schema: {
        type: 'object',
        properties: { file: { type: 'string', format: 'binary' } },
        required: ['file'],
        additionalProperties: false,
      },
      encoding: { file: { contentType: types } },
    },
  },
});

function describeEndpoint(pattern: string, method: string, { operation, open }: Endpoint): Json {
  const id =
    `${method.toLowerCase()}${pattern.replace('/api/v1', '').replaceAll(/[^A-Za-z0-9]+/g, '-')}`.replace(
      /-$/,
      '',
    );
  const status = operation.status ?? (operation.answer ? 200 : 204);
  const parameters = parametersOf(pattern, operation.query, `${id}-query`);
  return {
    operationId: id,
    summary: operation.summary,
    ...(operation.description && { description: operation.description }),
    ...(parameters.length > 0 && { parameters }),
    ...(operation.body && {
      requestBody: {
        required: true,
        ...content('application/json', jsonSchema(operation.body, 'input', `${id}-body`)),
      },
    }),
    ...(operation.file && { requestBody: formOf(operation.file) }),
    responses: {
      [status]: {
        description: OUTCOMES[status],
        ...(operation.answer &&
          content('application/json', jsonSchema(operation.answer, 'output', `${id}-answer`))),
      },
      default: { $ref: '#/components/responses/Problem' },
    },
    ...(open && { security: [] }),
  };
}

/** The whole interface as an OpenAPI 3.1 document, from the schemas that the endpoints read with. */
export function describeApi(routes: readonly Route[], origin: string): Json {
  const described = routes.flatMap(({ pattern, endpoints }) => {
    const methods = [...endpoints].map(([method, endpoint]) => [
      method.toLowerCase(),
      describeEndpoint(pattern, method, endpoint),
    ]);
    return methods.length > 0 ? [[pathOf(pattern), Object.fromEntries(methods)]] : [];
  });
  return {
    openapi: '3.1.0',
    info: {
      title: 'Putlog',
      version: '1',
      description:
        'Numbers are SI: m, N, N·m, N·m², rad, Pa, kg/m. A quantity may be a string with its unit, as people type it. Documents carry an ETag; a write to one needs If-Match with it: 428 without, 412 when it is stale. A refusal is problem+json (RFC 9457).',
    },
    servers: [{ url: origin }],
    security: [{ bearer: [] }, { session: [] }],
    paths: Object.fromEntries(described),
    components: {
      securitySchemes: {
        bearer: { type: 'http', scheme: 'bearer' },
        session: {
          type: 'apiKey',
          in: 'cookie',
          name: origin.startsWith('https:') ? '__Host-putlog' : 'putlog',
        },
      },
      responses: {
        Problem: {
          description: 'Refused: what is wrong and where.',
          ...content('application/problem+json', jsonSchema(Problem, 'output', 'problem')),
        },
      },
    },
  };
}
