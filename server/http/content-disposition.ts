/**
 * The Content-Disposition of a file by its name (RFC 6266): a plain form for old readers and the name itself as RFC 8187 has
 * it. Nothing of the name can end the header or add to it.
 */
export function contentDisposition(type: 'attachment' | 'inline', name: string): string {
  const whole = name.replace(/[\p{Surrogate}\p{Cc}]/gu, '_');
  const plain = whole.replace(/[^\x20-\x7e]/g, '_').replace(/["\\%]/g, '_');
  // RFC 8187 attr-char: encodeURIComponent leaves four signs alone that it does not allow.
  const encoded = encodeURIComponent(whole).replace(
    /['()*]/g,
    (sign) => `%${sign.charCodeAt(0).toString(16).toUpperCase()}`,
  );
  return plain === whole ? `${type}; filename="${plain}"` : `${type}; filename="${plain}"; filename*=UTF-8''${encoded}`;
}
