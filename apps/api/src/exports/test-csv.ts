/** Reads CSV by RFC 4180, strictly, into rows by column name: a reader of our own, so that the writer is not its own judge. */
export function parseCsv(text: string): Record<string, string>[] {
  const [names, ...rows] = records(text);
  return rows.map((cells) => {
    if (cells.length !== names?.length)
      throw new Error(`a row of ${cells.length} cells under ${names?.length}`);
    return Object.fromEntries(cells.map((cell, n) => [names[n] ?? '', cell]));
  });
}

function records(text: string): string[][] {
  const all: string[][] = [];
  let row: string[] = [];
  let at = 0;
  while (at < text.length) {
    const [cell, next] = text[at] === '"' ? quoted(text, at + 1) : bare(text, at);
    row.push(cell);
    if (text[next] === ',') at = next + 1;
    else if (text.startsWith('\r\n', next)) {
      all.push(row);
      row = [];
      at = next + 2;
      continue;
    } else throw new Error(`neither comma nor CRLF at ${next}`);
  }
  return all;
}

function quoted(text: string, from: number): [string, number] {
  let cell = '';
  let at = from;
  for (;;) {
    const end = text.indexOf('"', at);
    if (end < 0) throw new Error('a quote that does not end');
    cell += text.slice(at, end);
    if (text[end + 1] !== '"') return [cell, end + 1];
    cell += '"';
    at = end + 2;
  }
}

function bare(text: string, from: number): [string, number] {
  const end = /[,\r\n"]/g;
  end.lastIndex = from;
  const next = end.exec(text)?.index ?? text.length;
  return [text.slice(from, next), next];
}

/** For supertest: the answer's body as it came. */
export function asBytes(answer: unknown, done: (error: Error | null, body: Buffer) => void): void {
  const stream = answer as NodeJS.ReadableStream;
  const chunks: Buffer[] = [];
  stream.on('data', (chunk: Buffer) => chunks.push(chunk));
  stream.on('end', () => done(null, Buffer.concat(chunks)));
}
