import { createHmac, randomBytes } from 'node:crypto';
import { readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';

/**
 * The installation's secret, made once and kept beside the database (readable by its owner alone), so that people stay
 * signed in over a restart.
 */
export function serverSecret(dataFolder: string): string {
  const path = join(dataFolder, 'secret');
  try {
    // Exclusive: whoever comes second reads what the first one wrote.
    writeFileSync(path, randomBytes(32).toString('hex'), { flag: 'wx', mode: 0o600 });
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code !== 'EEXIST') throw error;
  }
  const secret = readFileSync(path, 'utf8').trim();
  if (secret.length < 32) throw new Error(`${path} is damaged: delete it (everybody then signs in anew).`);
  return secret;
}

/** A key for one purpose, so that a value signed for one place is worthless at another. */
export function keyFor(secret: string, purpose: string): string {
  return createHmac('sha256', secret).update(purpose).digest('hex');
}
