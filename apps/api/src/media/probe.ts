import { fork, type ChildProcess } from 'node:child_process';
import { createRequire } from 'node:module';
import { fileURLToPath, pathToFileURL } from 'node:url';
import type { ProbeAnswer, ProbeQuestion, ProbeReady } from './probe-protocol';

/** A process that nobody asked for this long ends. */
const IDLE_MS = 30_000;
/** Loading the decoders takes a moment, on a busy machine a long one; it is not the film's fault. */
const START_MS = 60_000;
/** JavaScript heap of the process; a forged table that wants more takes down the process alone. */
const HEAP_MB = 768;

/**
 * Asks a process of its own to look into a file. The process serves one question at a time, is ended when it takes too
 * long, and a new one is started for the next question.
 */
export class Probe {
  private child: ChildProcess | null = null;
  private queue: Promise<unknown> = Promise.resolve();
  private idle: NodeJS.Timeout | undefined;

  /** @param timeLimitMs after which, the process once loaded, a question counts as failed and the process is ended */
  ask(question: ProbeQuestion, timeLimitMs: number): Promise<ProbeAnswer> {
    const turn = this.queue.then(() => this.askNow(question, timeLimitMs));
    this.queue = turn;
    return turn;
  }

  /** Ends the process; the next question starts a new one. */
  close(): void {
    clearTimeout(this.idle);
    this.child?.kill('SIGKILL');
    this.child = null;
  }

  private askNow(question: ProbeQuestion, timeLimitMs: number): Promise<ProbeAnswer> {
    clearTimeout(this.idle);
    const fresh = this.child === null;
    const child = (this.child ??= startProcess());
    keepAlive(child, true);
    return new Promise<ProbeAnswer>((resolve) => {
      const settle = (answer: ProbeAnswer, usable: boolean): void => {
        late.stop();
        child.off('message', onMessage).off('exit', onExit).off('error', onError);
        if (usable) this.rest(child);
        else this.close();
        resolve(answer);
      };
      const onMessage = (answer: ProbeAnswer | ProbeReady): void => {
        if (answer.kind === 'ready') late.start(timeLimitMs);
        else settle(answer, true);
      };
      const onExit = (code: number | null, signal: string | null): void =>
        settle({ kind: 'failed', message: `the process ended (${signal ?? code})` }, false);
      const onError = (error: Error): void => settle({ kind: 'failed', message: error.message }, false);
      const late = new Deadline(() => settle({ kind: 'failed', message: 'took too long' }, false));
      late.start(fresh ? START_MS : timeLimitMs);
      child.on('message', onMessage).on('exit', onExit).on('error', onError);
      child.send(question, (error) => {
        if (error) onError(error);
      });
    });
  }

  /** Waits for the next question without keeping the server from ending. */
  private rest(child: ChildProcess): void {
    keepAlive(child, false);
    this.idle = setTimeout(() => this.close(), IDLE_MS);
    this.idle.unref();
  }
}

/** A timer that can be set anew. */
class Deadline {
  private timer: NodeJS.Timeout | undefined;

  constructor(private readonly passed: () => void) {}

  start(inMs: number): void {
    this.stop();
    this.timer = setTimeout(this.passed, inMs);
  }

  stop(): void {
    clearTimeout(this.timer);
  }
}

function keepAlive(child: ChildProcess, needed: boolean): void {
  if (needed) {
    child.ref();
    child.channel?.ref();
  } else {
    child.unref();
    child.channel?.unref();
  }
}

/**
 * Starts the process from the source (development, tests: through the TypeScript loader) or from the bundle beside the
 * server's own. It gets no environment of the server's, which may hold secrets.
 */
function startProcess(): ChildProcess {
  const fromSource = import.meta.url.endsWith('.ts');
  const file = fileURLToPath(
    new URL(fromSource ? './probe-process.ts' : './probe-process.js', import.meta.url),
  );
  const child = fork(file, {
    execArgv: [`--max-old-space-size=${HEAP_MB}`, ...(fromSource ? ['--import', typeScriptLoader()] : [])],
    env: fromSource
      ? { TSX_TSCONFIG_PATH: fileURLToPath(new URL('../../../../tsconfig.json', import.meta.url)) }
      : {},
    serialization: 'advanced',
    stdio: ['ignore', 'ignore', 'ignore', 'ipc'],
  });
  return child;
}

const typeScriptLoader = () => pathToFileURL(createRequire(import.meta.url).resolve('tsx')).href;
