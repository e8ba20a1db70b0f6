import type { Endpoint } from './endpoint';

/** The files of the endpoints are their registry: an endpoint that exists is described, and the other way round. */
const files = import.meta.glob<Record<string, unknown>>('/src/pages/api/v1/**/*.ts');

const METHODS = ['GET', 'POST', 'PUT', 'PATCH', 'DELETE'] as const;
type Method = (typeof METHODS)[number];

export interface Route {
  /** As Astro writes it: /api/v1/templates/[slug]. */
  readonly pattern: string;
  readonly endpoints: ReadonlyMap<Method, Endpoint>;
}

const isEndpoint = (value: unknown): value is Endpoint => typeof value === 'function' && 'operation' in value;

const patternOf = (file: string): string => file.replace(/^\/src\/pages|(?:\/index)?\.ts$/g, '');

function endpointsOf(module: Record<string, unknown>): ReadonlyMap<Method, Endpoint> {
  return new Map(
    METHODS.flatMap((method): [Method, Endpoint][] => {
      const value = module[method];
      return isEndpoint(value) ? [[method, value]] : [];
    }),
  );
}

export async function allRoutes(): Promise<Route[]> {
  const routes = Object.entries(files).map(async ([file, load]) => ({
    pattern: patternOf(file),
    endpoints: endpointsOf(await load()),
  }));
  return (await Promise.all(routes)).sort((a, b) => (a.pattern < b.pattern ? -1 : 1));
}

/** The methods that an address takes, for the Allow header of a 405; none when there is no such address. */
export async function methodsOf(pattern: string): Promise<string[]> {
  const load = Object.entries(files).find(([file]) => patternOf(file) === pattern)?.[1];
  const methods = load ? [...endpointsOf(await load()).keys()] : [];
  return methods.flatMap((method) => (method === 'GET' ? ['GET', 'HEAD'] : [method]));
}
