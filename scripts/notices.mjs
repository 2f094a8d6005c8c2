/**
 * Writes THIRD-PARTY-NOTICES.md from the lock file and the installed packages; `--check` only says whether it is
 * up to date. The texts of what reaches the browser are made by the web build (dist/web/3rdpartylicenses.txt).
 */
import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';

const root = fileURLToPath(new URL('..', import.meta.url));
const target = join(root, 'THIRD-PARTY-NOTICES.md');

/** Packages that the running product needs: `[name, version, licence]`, sorted. */
function shipped() {
  const { packages } = JSON.parse(readFileSync(join(root, 'package-lock.json'), 'utf8'));
  const rows = new Map();
  for (const [path, entry] of Object.entries(packages)) {
    // Other machines' builds of a package are in the lock but not installed here; they share the licence of their package.
    if (path === '' || entry.dev || entry.devOptional || entry.optional) continue;
    const name = path.slice(path.lastIndexOf('node_modules/') + 'node_modules/'.length);
    rows.set(`${name}@${entry.version}`, [name, entry.version, entry.license ?? licenceOnDisk(path)]);
  }
  return [...rows.values()].sort(([a], [b]) => (a < b ? -1 : a > b ? 1 : 0));
}

function licenceOnDisk(path) {
  const file = join(root, path, 'package.json');
  if (!existsSync(file)) return 'see package';
  const { license, licenses } = JSON.parse(readFileSync(file, 'utf8'));
  return license?.type ?? license ?? licenses?.map(({ type }) => type).join(' OR ') ?? 'see package';
}

function text() {
  const rows = shipped();
  return [
    '# Third-party notices',
    '',
    'Packages that the running product uses, from `package-lock.json`; made by `npm run notices`. Each package carries its',
    'licence text in its folder under `node_modules`; the texts of what reaches the browser are gathered by the build in',
    '`dist/web/3rdpartylicenses.txt`. `node-av` loads FFmpeg libraries that its platform package ships under their own terms',
    '(LGPL and GPL parts); they run in the server only and are not part of this repository.',
    '',
    '| package | version | licence |',
    '| --- | --- | --- |',
    ...rows.map((row) => `| ${row.join(' | ')} |`),
    '',
  ].join('\n');
}

const made = text();
if (!process.argv.includes('--check')) {
  writeFileSync(target, made);
} else if (!existsSync(target) || readFileSync(target, 'utf8') !== made) {
  console.error(
    'THIRD-PARTY-NOTICES.md does not match package-lock.json: run npm run notices and commit it.',
  );
  process.exitCode = 1;
}
