import type { Express } from 'express';

interface Layer {
  readonly route?: { readonly path: string; readonly methods: Record<string, boolean> };
  readonly handle?: { readonly stack?: readonly Layer[] };
}

/** Every route that an Express application answers, as `get /api/clips/:id`, read from its own tables. */
export function mountedRoutes(app: Express): string[] {
  const walk = (stack: readonly Layer[]): string[] =>
    stack.flatMap(({ route, handle }) => {
      if (!route) return walk(handle?.stack ?? []);
      return Object.keys(route.methods).map((method) => `${method} ${route.path}`);
    });
  const { stack } = app.router as unknown as { stack: readonly Layer[] };
  return [...new Set(walk(stack))].sort();
}
