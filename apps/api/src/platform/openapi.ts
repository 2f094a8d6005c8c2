import type { Endpoint } from '@stillstroke/contract/endpoint';
import { problemSchema } from '@stillstroke/contract/problem';
import * as z from 'zod';
import packageFile from '../../../../package.json';

type Json = Record<string, unknown>;

/** The HTTP surface as an OpenAPI 3.1 document, made from the schemas that also check every request. */
export function openApiDocument(surface: readonly Endpoint[]): Json & { openapi: string } {
  const paths: Record<string, Json> = {};
  for (const endpoint of surface) {
    const path = endpoint.path.replace(/:(\w+)/g, '{$1}');
    paths[path] = { ...paths[path], [endpoint.method]: operation(endpoint) };
  }
  return {
    openapi: '3.1.0',
    info: {
      title: packageFile.name,
      version: packageFile.version,
      description:
        'Instants are ISO 8601 UTC, dates YYYY-MM-DD, angles degrees, frames 0-based in presentation order, times whole ' +
        'microseconds. Changes need the header X-XSRF-TOKEN equal to the cookie XSRF-TOKEN, which any GET sets.',
    },
    paths,
    components: {
      schemas: { Problem: schemaOf(problemSchema, 'output') },
      responses: {
        Problem: {
          description: 'A refusal; `code` is stable, `detail` is a sentence that says what to do',
          content: { 'application/problem+json': { schema: { $ref: '#/components/schemas/Problem' } } },
        },
      },
      securitySchemes: { signIn: { type: 'apiKey', in: 'cookie', name: 'stillstroke' } },
    },
  };
}

function operation(endpoint: Endpoint): Json {
  const body = endpoint.body && {
    required: true,
    content: {
      [endpoint.bodyKind === 'multipart' ? 'multipart/form-data' : 'application/json']: {
        schema: schemaOf(endpoint.body, 'input'),
      },
    },
  };
  const isChange = endpoint.method !== 'get';
  const parameters = [
    ...parametersOf(endpoint.params, 'path'),
    ...parametersOf(endpoint.query, 'query'),
    ...(isChange ? [{ name: 'X-XSRF-TOKEN', in: 'header', required: true, schema: { type: 'string' } }] : []),
  ];
  return {
    summary: endpoint.summary,
    description: whoMayCall(endpoint),
    security: endpoint.access === 'public' ? [] : [{ signIn: [] }],
    ...(parameters.length > 0 && { parameters }),
    ...(body && { requestBody: body }),
    responses: {
      [String(endpoint.status ?? (endpoint.answerKind === 'none' ? 204 : 200))]: success(endpoint),
      default: { $ref: '#/components/responses/Problem' },
    },
  };
}

function whoMayCall({ access }: Endpoint): string {
  if (access === 'public') return 'Anybody may call this.';
  if (access === 'signed-in') return 'Whoever is signed in may call this.';
  return `Roles that may call this: ${(access as readonly string[]).join(', ')}.`;
}

function success(endpoint: Endpoint): Json {
  if (endpoint.answerKind === 'none') return { description: 'Done' };
  if (endpoint.answerKind === 'bytes') {
    return { description: 'The file', content: { 'application/octet-stream': {} } };
  }
  const schema = endpoint.answer ? schemaOf(endpoint.answer, 'output') : {};
  return { description: 'Done', content: { 'application/json': { schema } } };
}

function parametersOf(schema: z.ZodType | undefined, where: 'path' | 'query'): Json[] {
  if (!schema) return [];
  const { properties = {}, required = [] } = schemaOf(schema, 'input') as {
    properties?: Record<string, Json>;
    required?: string[];
  };
  return Object.entries(properties).map(([name, property]) => ({
    name,
    in: where,
    required: where === 'path' || required.includes(name),
    schema: property,
  }));
}

function schemaOf(schema: z.ZodType, io: 'input' | 'output'): Json {
  const { $schema: _, ...made } = z.toJSONSchema(schema, { io, unrepresentable: 'any' });
  return made;
}
