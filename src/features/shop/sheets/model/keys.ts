/** A key that is not taken yet: `base`, `base-2`, `base-3`. */
export function freeKey(wanted: string, taken: readonly string[]): string {
  const base =
    wanted
      .toLowerCase()
      .normalize('NFKD')
      .replace(/[^a-z0-9]+/g, '-')
      .replace(/^-|-$/g, '')
      .slice(0, 36) || 'x';
  for (let n = 1; ; n++) {
    const key = n === 1 ? base : `${base}-${n}`;
    if (!taken.includes(key)) return key;
  }
}
