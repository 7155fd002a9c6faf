const longest = 120;

/** Controls, line ends, signs that turn or hide the letters around them (bidi, zero width), and what is no letter at all. */
const unseen = /[\p{Cc}\p{Cf}\p{Co}\p{Cn}\p{Zl}\p{Zp}]/gu;

/**
 * A name as it may be shown and offered for saving: no path, nothing unseen, no sign that a file system minds, at most 120
 * characters with its ending kept. `otherwise` where nothing is left of it.
 */
export function cleanFileName(given: string, otherwise: string): string {
  const last =
    given
      .replace(/\p{Surrogate}/gu, '')
      .normalize('NFC')
      .split(/[/\\]/)
      .at(-1) ?? '';
  const clean = last
    .replace(unseen, '')
    .replace(/[<>:"|?*\ufffd]/g, '_')
    .replace(/\s+/g, ' ')
    .replace(/^[. ]+|[. ]+$/g, '');
  if (clean === '') return otherwise;
  const letters = [...clean];
  if (letters.length <= longest) return clean;
  const ending = [...(/\.[a-z0-9]{1,8}$/i.exec(clean)?.[0] ?? '')];
  return [...letters.slice(0, longest - ending.length), ...ending].join('');
}

/** `pdf` of `Sheet.PDF`; null where it has none. */
export const endingOf = (name: string): string | null => /\.([a-z0-9]{1,8})$/i.exec(name)?.[1]?.toLowerCase() ?? null;
