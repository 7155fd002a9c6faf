import type { Coating } from '#contracts/coatings.ts';
import type { Sheet, SheetBody, SheetFile } from '#contracts/sheets.ts';

/** A sheet as a file: coatings by name, so that another shop can take it. */
export function toFile({ name, body }: Pick<Sheet, 'name' | 'body'>, coatings: readonly Coating[]): SheetFile {
  const names = new Map(coatings.map((coating) => [coating.id, coating.name]));
  const stages = body.stages.map(({ coatingId, ...stage }) => ({
    ...stage,
    coating: coatingId === null ? null : (names.get(coatingId) ?? null),
  }));
  return { format: 'ovenbird-process-sheet', formatVersion: 1, name, body: { ...body, stages } };
}

/** The body in a file, with the ids of this shop's coatings; `unknown` are those it names and the shop does not have. */
export function fromFile(
  { body }: Pick<SheetFile, 'body'>,
  coatings: readonly Coating[],
): { body: SheetBody; unknown: { stage: number; coating: string }[] } {
  const ids = new Map(coatings.map((coating) => [coating.name.toLowerCase(), coating.id]));
  const idOf = (coating: string | null): string | null =>
    coating === null ? null : (ids.get(coating.trim().toLowerCase()) ?? null);
  return {
    body: { ...body, stages: body.stages.map(({ coating, ...stage }) => ({ ...stage, coatingId: idOf(coating) })) },
    unknown: body.stages.flatMap(({ coating }, stage) =>
      coating !== null && idOf(coating) === null ? [{ stage, coating }] : [],
    ),
  };
}
