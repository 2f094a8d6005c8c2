/** `npm run dev`: the API from its source and the web app, both reloading, until Ctrl+C or until one of them ends. */
import { spawn } from 'node:child_process';
import { fileURLToPath } from 'node:url';

const root = fileURLToPath(new URL('..', import.meta.url));
const started = [
  ['node_modules/tsx/dist/cli.mjs', 'watch', '--clear-screen=false', 'apps/api/src/main.ts'],
  ['node_modules/@angular/cli/bin/ng.js', 'serve', 'web'],
].map((args) => spawn(process.execPath, args, { cwd: root, stdio: 'inherit' }));

console.log('The application with reload will be at http://localhost:4200; it calls the API at port 4300.');

function stop(code) {
  process.exitCode = code;
  for (const child of started) child.kill('SIGTERM');
}
for (const child of started) child.on('exit', (code) => stop(code ?? 0));
for (const signal of ['SIGINT', 'SIGTERM']) process.on(signal, () => stop(0));
