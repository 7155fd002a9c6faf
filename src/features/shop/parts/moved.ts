/** The ids in their new order after one of them went one step up or down. */
export function moved(ids: readonly string[], id: string, by: -1 | 1): string[] {
  const from = ids.indexOf(id);
  const to = from + by;
  if (from < 0 || to < 0 || to >= ids.length) return [...ids];
  const next = ids.filter((one) => one !== id);
  next.splice(to, 0, id);
  return next;
}
