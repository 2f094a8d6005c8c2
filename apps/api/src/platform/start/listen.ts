import { createServer as createProbe } from 'node:net';
import { createServer, type RequestListener, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import type { Settings } from '../settings';
import { StartProblem } from './start-problem';

type Place = Pick<Settings, 'port' | 'host'>;

/** Finds out that the port is taken before any work is done. @throws StartProblem */
export async function checkPort(place: Place): Promise<void> {
  if (place.port === 0) return;
  const probe = createProbe();
  await opened(probe, place);
  await new Promise((resolve) => probe.close(resolve));
}

/** @returns the server, once it listens, and its address for people. @throws StartProblem */
export async function listen(
  handler: RequestListener,
  place: Place,
): Promise<{ server: Server; url: string }> {
  const server = createServer(handler);
  // A clip of two gigabytes over a slow line takes longer than the default of five minutes.
  server.requestTimeout = 0;
  await opened(server, place);
  const { port } = server.address() as AddressInfo;
  const loopback = ['127.0.0.1', '::1', 'localhost', '0.0.0.0', '::'].includes(place.host);
  const host = place.host.includes(':') ? `[${place.host}]` : place.host;
  return { server, url: `http://${loopback ? 'localhost' : host}:${port}` };
}

function opened(server: ReturnType<typeof createProbe>, { port, host }: Place): Promise<void> {
  return new Promise((resolve, reject) => {
    server.once('error', (error: NodeJS.ErrnoException) => reject(listenProblem(error, port, host)));
    server.listen(port, host, resolve);
  });
}

function listenProblem(error: NodeJS.ErrnoException, port: number, host: string): Error {
  switch (error.code) {
    case 'EADDRINUSE':
      return new StartProblem(`Port ${port} is taken: stop what uses it, or set PORT to another one.`);
    case 'EACCES':
      return new StartProblem(
        `Port ${port} needs more rights than this user has: set PORT to one above 1023.`,
      );
    case 'EADDRNOTAVAIL':
    case 'ENOTFOUND':
    case 'EAI_AGAIN':
      return new StartProblem(
        `This machine has no address ${host}: set STILLSTROKE_HOST to 127.0.0.1, 0.0.0.0 or an address it has.`,
      );
    default:
      return error;
  }
}

/**
 * Stops taking requests and waits for those that are running, but not for ever.
 *
 * @param boundMs after which connections are cut
 */
export async function stopListening(server: Server, boundMs: number): Promise<void> {
  const closed = new Promise<void>((resolve) => server.close(() => resolve()));
  // A connection is idle, and can go, only after its running request.
  const idle = setInterval(() => server.closeIdleConnections(), 50);
  const late = setTimeout(() => server.closeAllConnections(), boundMs);
  await closed;
  clearInterval(idle);
  clearTimeout(late);
}
