/** `npm start`: builds what is missing or stale, then runs the server in this process. */
const [major = 0, minor = 0] = process.versions.node.split('.').map(Number);
if (major < 20 || (major === 20 && minor < 19)) {
  console.error(
    `Stillstroke needs Node 20.19 or newer, and this is ${process.versions.node}: install a newer one.`,
  );
  process.exit(1);
}
process.env['NODE_ENV'] ??= 'production';

const { BuildFailed, buildIfStale } = await import('./build.mjs');
try {
  await buildIfStale();
} catch (error) {
  if (!(error instanceof BuildFailed)) throw error;
  console.error(error.message);
  process.exit(1);
}
process.setSourceMapsEnabled(true);
await import('../dist/api/main.js');
