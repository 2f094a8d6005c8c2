import { surface } from '@stillstroke/contract/surface';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { openTestClub, type TestClub } from '../../apps/api/src/platform/test-club';
import { mountedRoutes } from './mounted-routes';

let club: TestClub;
beforeAll(async () => {
  club = await openTestClub();
});
afterAll(() => club.close());

interface Operation {
  responses: Record<string, unknown>;
  parameters?: { name: string; in: string; required: boolean }[];
  requestBody?: { content: Record<string, { schema: { additionalProperties?: boolean } }> };
}
const document = async () =>
  (await club.anonymous().get('/api/openapi.json')).body as {
    openapi: string;
    paths: Record<string, Record<string, Operation>>;
  };

describe('the described surface', () => {
  it('is what is mounted: no call more, none less', () => {
    const described = surface.map(({ method, path }) => `${method} ${path}`).sort();
    expect(mountedRoutes(club.app)).toEqual(described);
  });

  it('is what the OpenAPI document says', async () => {
    const { openapi, paths } = await document();
    expect(openapi).toBe('3.1.0');
    const written = Object.entries(paths).flatMap(([path, operations]) =>
      Object.keys(operations).map((method) => `${method} ${path.replaceAll(/\{(\w+)\}/g, ':$1')}`),
    );
    expect(written.sort()).toEqual(mountedRoutes(club.app));
  });

  it('names every path parameter, the CSRF header of every change, and closes every JSON body', async () => {
    const { paths } = await document();
    for (const [path, operations] of Object.entries(paths)) {
      for (const [method, { parameters = [], requestBody }] of Object.entries(operations)) {
        const inPath = parameters.filter((one) => one.in === 'path').map((one) => `{${one.name}}`);
        expect(inPath.sort(), path).toEqual((path.match(/\{\w+\}/g) ?? []).sort());
        const hasHeader = parameters.some((one) => one.name === 'X-XSRF-TOKEN' && one.required);
        expect(hasHeader, `${method} ${path}`).toBe(method !== 'get');
        const json = requestBody?.content['application/json'];
        if (json) expect(json.schema.additionalProperties, `${method} ${path}`).toBe(false);
      }
    }
  });
});
