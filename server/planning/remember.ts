/**
 * Keeps the last results of a pure function by a key that names all its arguments, so that none can ever be stale. When
 * `limit` is reached the oldest are let go. Results are shared: nobody may change them.
 */
export function remember<T>(limit: number): (key: string, work: () => T) => T {
  const kept = new Map<string, T>();
  return (key, work) => {
    const known = kept.get(key);
    if (known !== undefined) return known;
    const made = work();
    kept.set(key, made);
    if (kept.size > limit) kept.delete(kept.keys().next().value!);
    return made;
  };
}
