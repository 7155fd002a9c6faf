import type { SheetBody } from '#contracts/sheets.ts';
import { expandSheet } from '../expand-sheet.ts';
import { isThere, optionsOn } from '../options.ts';
import { found, type Found, type Given } from './found.ts';

/** Keys that are there twice, name nothing, or leave nothing over. */
export function nameFaults(body: SheetBody, { coatings }: Given): Found[] {
  return [
    ...twice(body.options.map(({ key }) => key)).map((key) =>
      found('option-twice', 'stop', { stage: null, field: 'options' }, { names: [key] }),
    ),
    ...twice(body.stages.map(({ key }) => key)).map((key) =>
      found('stage-twice', 'stop', { stage: key, field: 'stage' }, { names: [key] }),
    ),
    ...body.stages.flatMap((stage) =>
      twice(stage.ways.map(({ id }) => id)).map((id) =>
        found('way-twice', 'stop', { stage: stage.key, way: id, field: 'ways' }, { names: [id] }),
      ),
    ),
    ...unknownOptions(body),
    ...body.stages.flatMap(({ key, coatingId }) =>
      coatingId === null || coatings.has(coatingId)
        ? []
        : [found('coating-unknown', 'stop', { stage: key, field: 'coating' })],
    ),
    ...(expandSheet(body, optionsOn(body)).length === 0
      ? [found('no-stage-left', 'stop', { stage: null, field: 'options' })]
      : []),
  ];
}

const twice = (keys: readonly string[]): string[] => [...new Set(keys.filter((key, i) => keys.indexOf(key) !== i))];

function unknownOptions(body: SheetBody): Found[] {
  const known = new Set(body.options.map(({ key }) => key));
  const unknown = (named: readonly (string | null | undefined)[]): string[] => [
    ...new Set(named.filter((key) => key != null).filter((key) => !known.has(key))),
  ];
  return body.stages.flatMap((stage) => [
    ...unknown([stage.option, stage.unlessOption]).map((key) =>
      found('option-unknown', 'stop', { stage: stage.key, field: 'option' }, { names: [key] }),
    ),
    ...stage.ways.flatMap((way) => [
      ...unknown([way.option, way.unlessOption]).map((key) =>
        found('option-unknown', 'stop', { stage: stage.key, way: way.id, field: 'option' }, { names: [key] }),
      ),
      ...unknown(way.phases.map(({ perExtraCoat }) => perExtraCoat)).map((key) =>
        found('option-unknown', 'stop', { stage: stage.key, way: way.id, field: 'phases' }, { names: [key] }),
      ),
    ]),
  ]);
}

/** A stage that is chosen and whose every way belongs to options that are not: it would fall out in silence. */
export const waylessFaults = (body: SheetBody, chosen: readonly string[]): Found[] =>
  body.stages
    .filter((stage) => isThere(stage, chosen) && !stage.ways.some((way) => isThere(way, chosen)))
    .map(({ key }) => found('no-way-left', 'stop', { stage: key, field: 'ways' }));
