import { spawn } from 'node:child_process';
import { once } from 'node:events';
import { fileURLToPath } from 'node:url';

const root = fileURLToPath(new URL('../..', import.meta.url));

/** Starts the built product on a data folder; answers once it listens. `stop()` ends it in an orderly way. */
export async function startProduct({ dataFolder, port }) {
  const child = spawn(process.execPath, ['scripts/start.mjs'], {
    cwd: root,
    env: { ...process.env, PORT: String(port), STILLSTROKE_DATA: dataFolder, STILLSTROKE_LOG: 'silent' },
    stdio: ['ignore', 'ignore', 'inherit'],
  });
  const base = `http://127.0.0.1:${port}`;
  for (;;) {
    if (child.exitCode !== null) throw new Error('The product did not start; see the sentence above.');
    const healthy = await fetch(`${base}/api/health`).then(
      (answer) => answer.ok,
      () => false,
    );
    if (healthy) break;
    await new Promise((resolve) => setTimeout(resolve, 200));
  }
  const stop = async () => {
    child.kill('SIGTERM');
    await once(child, 'exit');
  };
  return { base, stop };
}

/** Signs in and answers the headers that a browser would send with every later request. */
export async function signIn(base, email, password) {
  const jar = new Map();
  const keep = (answer) => {
    for (const line of answer.headers.getSetCookie()) {
      const [pair] = line.split(';');
      jar.set(pair.slice(0, pair.indexOf('=')), pair.slice(pair.indexOf('=') + 1));
    }
  };
  const headers = () => ({
    cookie: [...jar].map(([name, value]) => `${name}=${value}`).join('; '),
    'x-xsrf-token': decodeURIComponent(jar.get('XSRF-TOKEN') ?? ''),
    'content-type': 'application/json',
  });
  keep(await fetch(`${base}/api/auth/page`));
  const answer = await fetch(`${base}/api/auth/sign-in`, {
    method: 'POST',
    headers: headers(),
    body: JSON.stringify({ email, password }),
  });
  if (!answer.ok) throw new Error(`sign-in answered ${answer.status}`);
  keep(answer);
  keep(await fetch(`${base}/api/auth/me`, { headers: headers() }));
  return headers();
}
