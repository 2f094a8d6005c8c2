/** A mail in our words before it has its two forms. Every string is plain text. */
export interface Letter {
  /** The same for everybody: subjects are read over shoulders and kept by servers in between. */
  readonly subject: string;
  /** Name of the reader. */
  readonly reader: string;
  readonly paragraphs: readonly string[];
  readonly button: { readonly words: string; readonly url: string };
  /** Below the button, in small: how long the link works, what to do when it was not asked for. */
  readonly small: readonly string[];
  /** Why the reader gets this. */
  readonly why: string;
  /** Page on which it can be switched off; null where it cannot. */
  readonly switchOff: string | null;
}

export interface WrittenLetter {
  readonly subject: string;
  readonly text: string;
  readonly html: string;
}

const alwaysComes = 'Mails about your account cannot be switched off.';

/** Writes a letter out as text and as HTML that says the same, without pictures, scripts or foreign addresses. */
export function writeOut(letter: Letter): WrittenLetter {
  return { subject: letter.subject, text: asText(letter), html: asHtml(letter) };
}

function asText({ reader, paragraphs, button, small, why, switchOff }: Letter): string {
  const foot =
    switchOff === null ? `${why} ${alwaysComes}` : `${why} Switch mails like this off: ${switchOff}`;
  const blocks = [`Hello ${reader},`, ...paragraphs, `${button.words}:\n${button.url}`, ...small];
  return `${[...blocks, `-- \nStillstroke\n${foot}`].join('\n\n')}\n`;
}

const page = 'margin:0;padding:24px;background:#F4F7F6;color:#10222B;font:16px/1.5 sans-serif';
const card = 'max-width:34em;margin:0 auto;padding:24px 28px;background:#fff;border-radius:10px';
const link =
  'display:inline-block;padding:11px 22px;border-radius:22px;background:#0F6E84;color:#fff;text-decoration:none';
const quiet = 'color:#4A5B62;font-size:14px';

function asHtml({ subject, reader, paragraphs, button, small, why, switchOff }: Letter): string {
  const foot =
    switchOff === null
      ? escaped(`${why} ${alwaysComes}`)
      : `${escaped(why)} <a href="${escaped(switchOff)}" style="color:#0F6E84">Switch mails like this off</a>`;
  return [
    '<!doctype html><html lang="en"><head><meta charset="utf-8">',
    `<meta name="viewport" content="width=device-width"><title>${escaped(subject)}</title></head>`,
    `<body style="${page}"><div style="${card}">`,
    ...[`Hello ${reader},`, ...paragraphs].map((words) => `<p>${escaped(words)}</p>`),
    `<p><a href="${escaped(button.url)}" style="${link}">${escaped(button.words)}</a></p>`,
    ...small.map((words) => `<p style="${quiet}">${escaped(words)}</p>`),
    `<p style="${quiet};border-top:1px solid #D9E2E1;padding-top:14px">Stillstroke. ${foot}</p>`,
    '</div></body></html>',
  ].join('\n');
}

const entities: Record<string, string> = {
  '&': '&amp;',
  '<': '&lt;',
  '>': '&gt;',
  '"': '&quot;',
  "'": '&#39;',
};
const escaped = (text: string) => text.replace(/[&<>"']/g, (sign) => entities[sign] ?? '');
