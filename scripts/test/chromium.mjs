import { execFileSync } from 'node:child_process';
import { existsSync } from 'node:fs';

const places = ['/usr/bin/chromium', '/usr/bin/chromium-browser', '/usr/bin/google-chrome'];

/** Path of a Chromium that is there: CHROME_BIN, or one of the usual places; null when none. */
function find() {
  const told = process.env.CHROME_BIN;
  if (told && existsSync(told)) return told;
  return places.find((place) => existsSync(place)) ?? null;
}

/**
 * Path of a Chromium, installed from Debian's packages when it is missing and we may.
 *
 * @throws Error with a sentence that says what to install
 */
export function ensureChromium() {
  const found = find();
  if (found) return found;
  const mayInstall = process.getuid?.() === 0 && existsSync('/usr/bin/apt-get');
  if (mayInstall) {
    console.log('Chromium is missing: installing it from Debian’s packages.');
    const options = { stdio: 'inherit', env: { ...process.env, DEBIAN_FRONTEND: 'noninteractive' } };
    execFileSync('apt-get', ['update', '-qq'], options);
    execFileSync('apt-get', ['install', '-y', '-qq', '--no-install-recommends', 'chromium'], options);
    const installed = find();
    if (installed) return installed;
  }
  throw new Error(
    'The tests need Chromium: install the package "chromium", or set CHROME_BIN to its program.',
  );
}
