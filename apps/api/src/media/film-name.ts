const LONGEST = 160;

/** A file name for people to read, from whatever the sender called it: no path, no control or direction-changing characters. */
export function filmName(sent: string | undefined): string {
  const last = (sent ?? '').split(/[\\/]/).at(-1) ?? '';
  const plain = last.replace(/[\p{C}\p{Zl}\p{Zp}]/gu, '').trim();
  // By code points, so that no half of a character is left at the end.
  const short = [...plain].slice(0, LONGEST).join('');
  return short === '' || /^\.+$/.test(short) ? 'clip' : short;
}

/** Content-Disposition (RFC 6266) that names a download; the plain form is for readers that know no other. */
export function disposition(name: string, how: 'inline' | 'attachment' = 'inline'): string {
  const ascii = name.replace(/[^\x20-\x7e]|["\\%;]/g, '_');
  const encoded = encodeURIComponent(name).replace(
    /['()*]/g,
    (sign) => `%${sign.charCodeAt(0).toString(16).toUpperCase()}`,
  );
  return `${how}; filename="${ascii}"; filename*=UTF-8''${encoded}`;
}
