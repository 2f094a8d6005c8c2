import * as z from 'zod';
import { endpoint } from './endpoint';

export const getHealth = endpoint({
  method: 'get',
  path: '/api/health',
  access: 'public',
  summary: 'Whether the server answers, and its version',
  answer: z.strictObject({ status: z.literal('ok'), version: z.string() }),
});

export const getOpenApi = endpoint({
  method: 'get',
  path: '/api/openapi.json',
  access: 'public',
  summary: 'This surface as an OpenAPI document',
  answer: z.looseObject({ openapi: z.string() }),
});
