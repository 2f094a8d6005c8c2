import { existsSync } from 'node:fs';
import { join } from 'node:path';
import { BadSettingError } from './platform/settings';
import { start, startNewClub, type StartOptions } from './platform/start/start';
import { StartProblem } from './platform/start/start-problem';

/** From the bundle everything lies beside it; from the source, where it is kept. */
const bundled = existsSync(join(import.meta.dirname, 'migrations'));
const root = join(import.meta.dirname, bundled ? '../..' : '../../..');

const options: StartOptions = {
  environment: process.env,
  migrationsFolder: bundled ? join(import.meta.dirname, 'migrations') : join(root, 'libs/db/migrations'),
  webFolder: join(root, 'dist/web'),
  print: (line) => void process.stdout.write(`${line}\n`),
};

try {
  const [command, ...words] = process.argv.slice(2);
  if (command === 'new-club') startNewClub(options, words);
  else if (command !== undefined)
    throw new StartProblem(`There is no command ${command}; npm start takes new-club or nothing.`);
  else {
    const { greeting, stop } = await start(options);
    stopOnSignal(stop);
    greeting.forEach(options.print);
  }
} catch (error) {
  process.exitCode = 1;
  console.error(sentenceFor(error));
}

function stopOnSignal(stop: () => Promise<void>): void {
  let stopping = false;
  const onSignal = () => {
    if (stopping) process.exit(1);
    stopping = true;
    stop().then(
      () => process.exit(0),
      (error: unknown) => {
        console.error(sentenceFor(error));
        process.exit(1);
      },
    );
  };
  process.on('SIGTERM', onSignal);
  process.on('SIGINT', onSignal);
}

function sentenceFor(error: unknown): string {
  if (error instanceof StartProblem || error instanceof BadSettingError) return error.message;
  const detail = error instanceof Error ? (error.stack ?? error.message) : String(error);
  return `Stillstroke could not start because of a fault of its own; please report this:\n${detail}`;
}
