import { fileURLToPath } from 'node:url';
import { build } from 'esbuild';

const WORKER = fileURLToPath(new URL('../../apps/web/src/app/playback/frame.worker.ts', import.meta.url));

/** Bundles a page's script, given by its file, and the frame worker; answers their texts by the paths under which the page asks for them. */
export async function bundlePage(page: string): Promise<Record<string, string>> {
  return {
    '/page.js': await bundle(page),
    '/frame.worker': await bundle(WORKER),
  };
}

async function bundle(entry: string): Promise<string> {
  const built = await build({
    entryPoints: [entry],
    bundle: true,
    write: false,
    format: 'esm',
    platform: 'browser',
    target: 'es2022',
    logLevel: 'error',
  });
  return built.outputFiles[0]?.text ?? '';
}
