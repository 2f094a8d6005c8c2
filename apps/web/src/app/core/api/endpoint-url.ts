import type { Endpoint } from '@stillstroke/contract/endpoint';

/** Values for the named parameters of an endpoint's path. */
export type PathParams = Readonly<Record<string, string | number>>;
export type QueryValues = Readonly<Record<string, string | number | boolean | null | undefined>>;

/**
 * The address of an endpoint with its parameters put in, e.g. `/api/clips/…/marks`; empty query values are left out.
 *
 * @throws Error when the path names a parameter that is not given
 */
export function endpointUrl(
  endpoint: Pick<Endpoint, 'path'>,
  params: PathParams = {},
  query: QueryValues = {},
): string {
  const path = endpoint.path.replace(/:([A-Za-z]+)/g, (_, name: string) => {
    const value = params[name];
    if (value === undefined) throw new Error(`${endpoint.path} needs the parameter ${name}`);
    return encodeURIComponent(String(value));
  });
  const search = new URLSearchParams();
  for (const [name, value] of Object.entries(query)) {
    if (value !== undefined && value !== null && value !== '') search.set(name, String(value));
  }
  const text = search.toString();
  return text ? `${path}?${text}` : path;
}
