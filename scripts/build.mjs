/**
 * `npm run build`: the web app to dist/web, the server to dist/api. `buildIfStale` builds only what is missing or older
 * than its sources, told by a fingerprint of their content.
 */
import { spawnSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import {
  cpSync,
  existsSync,
  mkdirSync,
  readdirSync,
  readFileSync,
  rmSync,
  statSync,
  writeFileSync,
} from 'node:fs';
import { join, relative } from 'node:path';
import { fileURLToPath, pathToFileURL } from 'node:url';

const root = fileURLToPath(new URL('..', import.meta.url));
const dist = join(root, 'dist');

/** What each build is made of and makes; paths from the root. */
const parts = {
  web: {
    sources: [
      'apps/web',
      'libs',
      'angular.json',
      'tsconfig.base.json',
      'package-lock.json',
      'scripts/build.mjs',
    ],
    result: 'web/index.html',
    build: buildWeb,
  },
  api: {
    sources: [
      'apps/api/src',
      'libs',
      'package.json',
      'tsconfig.json',
      'tsconfig.base.json',
      'scripts/build.mjs',
    ],
    result: 'api/main.js',
    build: buildApi,
  },
};

/** Builds every part. @throws BuildFailed */
export async function build() {
  for (const name of Object.keys(parts)) await buildPart(name);
}

/** Builds the parts whose sources differ from those they were built from. @throws BuildFailed */
export async function buildIfStale() {
  for (const [name, part] of Object.entries(parts)) {
    const fresh = existsSync(join(dist, part.result)) && keptFingerprint(name) === fingerprint(part.sources);
    if (!fresh) await buildPart(name);
  }
}

/** A build did not succeed; what is wrong has been printed. */
export class BuildFailed extends Error {}

async function buildPart(name) {
  const part = parts[name];
  console.log(`Building ${name} …`);
  // Taken before: what changes during the build makes it stale.
  const made = fingerprint(part.sources);
  rmSync(fingerprintFile(name), { force: true });
  await part.build();
  mkdirSync(dist, { recursive: true });
  writeFileSync(fingerprintFile(name), made);
}

function buildWeb() {
  const ng = join(root, 'node_modules/@angular/cli/bin/ng.js');
  const { status } = spawnSync(process.execPath, [ng, 'build', 'web'], {
    cwd: root,
    stdio: ['ignore', 'inherit', 'inherit'],
    env: { ...process.env, NODE_ENV: 'production', NG_CLI_ANALYTICS: 'false' },
  });
  if (status !== 0) throw new BuildFailed('The web app could not be built: see above.');
}

/** The server and the process that looks into films, each one file; packages stay in node_modules. */
async function buildApi() {
  const { build: bundle } = await import('esbuild');
  const out = join(dist, 'api');
  rmSync(out, { recursive: true, force: true });
  try {
    await bundle({
      absWorkingDir: root,
      entryPoints: ['apps/api/src/main.ts', 'apps/api/src/media/probe-process.ts'],
      outdir: out,
      entryNames: '[name]',
      bundle: true,
      platform: 'node',
      target: 'node20',
      format: 'esm',
      packages: 'external',
      alias: { '@stillstroke': join(root, 'libs') },
      sourcemap: true,
      logLevel: 'warning',
    });
  } catch {
    throw new BuildFailed('The server could not be built: see above.');
  }
  cpSync(join(root, 'libs/db/migrations'), join(out, 'migrations'), { recursive: true });
}

const fingerprintFile = (name) => join(dist, `${name}.fingerprint`);

function keptFingerprint(name) {
  try {
    return readFileSync(fingerprintFile(name), 'utf8');
  } catch {
    return null;
  }
}

function fingerprint(sources) {
  const hash = createHash('sha256');
  for (const path of sources.flatMap((source) => filesUnder(join(root, source))).sort()) {
    hash
      .update(`${relative(root, path)}\0`)
      .update(readFileSync(path))
      .update('\0');
  }
  return hash.digest('hex');
}

function filesUnder(path) {
  if (!existsSync(path)) return [];
  if (!statSync(path).isDirectory()) return [path];
  return readdirSync(path, { recursive: true, withFileTypes: true })
    .filter((entry) => entry.isFile() && !entry.name.endsWith('.spec.ts'))
    .map((entry) => join(entry.parentPath ?? entry.path, entry.name));
}

if (import.meta.url === pathToFileURL(process.argv[1] ?? '').href) {
  try {
    await build();
  } catch (error) {
    if (!(error instanceof BuildFailed)) throw error;
    console.error(error.message);
    process.exitCode = 1;
  }
}
