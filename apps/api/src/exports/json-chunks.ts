import type { ExportParts } from './export-parts';

/** The JSON file of an export, a session at a time. */
export function* jsonChunks({ head, sessions, trend }: ExportParts): Generator<string> {
  yield `${JSON.stringify(head).slice(0, -1)},"sessions":[`;
  let first = true;
  for (const session of sessions) {
    yield `${first ? '\n' : ',\n'}${JSON.stringify(session)}`;
    first = false;
  }
  yield `],\n"trend":${JSON.stringify(trend())}}\n`;
}
