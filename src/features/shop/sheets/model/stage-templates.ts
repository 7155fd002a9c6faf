import { expandSheet } from '#server/sheets/expand-sheet.ts';
import { optionsOn } from '#server/sheets/options.ts';
import { sprays } from '#server/sheets/way-times.ts';
import type { Coating, CoatingKind } from '#contracts/coatings.ts';
import type { SheetBody, SheetStage, Way } from '#contracts/sheets.ts';
import { freeKey } from './keys.ts';
import { airDry, allCures, boothBake, byHand, lampCure, sprayWay, type Below } from './way-templates.ts';

type Setting = { below: Below; coatings: readonly Coating[] };
type Template = {
  id: string;
  group: 'Hand work' | 'Coats' | 'Cures';
  label: string;
  /** What the stage is in reports. */
  kind: string;
  title: string;
  /** Kinds of coating it puts on, the usual first. */
  coats?: readonly CoatingKind[];
  ways: (setting: Setting & { coating: Coating | null }) => Way[];
};

const hand = (id: string, label: string, minutes: number, skill = 'prep', kind = id): Template => ({
  id,
  group: 'Hand work',
  label,
  kind,
  title: label,
  ways: () => [byHand(minutes, skill)],
});
const coat = (id: string, label: string, coats: readonly [CoatingKind, ...CoatingKind[]]): Template => ({
  id,
  group: 'Coats',
  label,
  kind: id,
  title: label,
  coats,
  ways: ({ coating, below }) => [sprayWay(coating, coats[0], below)],
});
const cure = (id: string, label: string, title: string, ways: Template['ways']): Template => ({
  id,
  group: 'Cures',
  label,
  kind: 'cure',
  title,
  ways,
});

/** What a stage can be begun with. Minutes are common practice where no data sheet gives them: to be checked against it. */
export const stageTemplates: readonly Template[] = [
  hand('prep', 'Clean and feather', 45),
  hand('fill', 'Filler', 60),
  hand('open-up', 'Open up with P400', 20, 'prep', 'prep'),
  hand('block', 'Block-sand', 45),
  hand('mask', 'Mask', 30),
  hand('polish', 'Polish', 40, 'polish'),
  hand('refit', 'Refit', 30, 'polish'),
  coat('promoter', 'Adhesion promoter', ['promoter']),
  coat('prime', 'Primer surfacer', ['primer', 'epoxy-primer', 'etch-primer', 'filler']),
  coat('seal', 'Sealer', ['sealer']),
  coat('base', 'Base colour', ['base', 'waterborne-base']),
  coat('clear', 'Clear', ['clear']),
  coat('single-stage', 'Single-stage colour', ['single-stage']),
  cure('cure', 'Cure, every way of the data sheet', 'Cure', ({ below }) => allCures(below)),
  cure('booth-bake', 'Booth bake', 'Booth bake', ({ below }) => [boothBake(below)]),
  cure('lamp-cure', 'Lamp cure', 'Lamp cure', ({ below }) => [lampCure(below)]),
  cure('air-dry', 'Air dry', 'Air dry', ({ below }) => [airDry(below)]),
];
export type StageTemplate = (typeof stageTemplates)[number];

/** What is under a stage put at this position, with the usual options. */
export function belowAt(body: Pick<SheetBody, 'stages' | 'options'>, at: number, coatings: readonly Coating[]): Below {
  return topOf({ stages: body.stages.slice(0, at) }, optionsOn(body), coatings);
}

/** What is under a way of a stage, where its own options and those of the stage are as it needs them. */
export function belowWay(
  body: Pick<SheetBody, 'stages' | 'options'>,
  stage: SheetStage,
  way: Way,
  coatings: readonly Coating[],
): Below {
  const needed = [stage.option, way.option].filter((key) => key != null);
  const without = [stage.unlessOption, way.unlessOption];
  const chosen = [...optionsOn(body).filter((key) => !without.includes(key)), ...needed];
  return topOf({ stages: body.stages.slice(0, body.stages.indexOf(stage)) }, chosen, coatings);
}

/** The coating sprayed last of these stages, wet where it was the last of them. */
function topOf(body: Pick<SheetBody, 'stages'>, chosen: readonly string[], coatings: readonly Coating[]): Below {
  const before = expandSheet(body, chosen);
  const sprayed = before.findLastIndex(({ ways }) => ways.some(sprays));
  const id = before[sprayed]?.coatingId;
  return { coating: coatings.find((one) => one.id === id) ?? null, wet: sprayed >= 0 && sprayed === before.length - 1 };
}

/** The coating that a sheet would most likely use: the one it uses already, else the first of that kind. */
export function likelyCoating(
  body: Pick<SheetBody, 'stages'>,
  kinds: readonly CoatingKind[],
  coatings: readonly Coating[],
) {
  const used = new Set(body.stages.map(({ coatingId }) => coatingId));
  for (const kind of kinds) {
    const some = coatings.filter((one) => one.kind === kind);
    const found = some.find(({ id }) => used.has(id)) ?? some[0];
    if (found) return found;
  }
  return null;
}

/** A new stage for that position, filled from the data sheets. */
export function stageFrom(
  template: StageTemplate,
  body: Pick<SheetBody, 'stages' | 'options'>,
  at: number,
  coatings: readonly Coating[],
): SheetStage {
  const below = belowAt(body, at, coatings);
  const coating = template.coats ? likelyCoating(body, template.coats, coatings) : null;
  // A cure is timed by the coating it cures.
  const coatingId = template.group === 'Cures' ? (below.coating?.id ?? null) : (coating?.id ?? null);
  return {
    key: freeKey(
      template.id,
      body.stages.map(({ key }) => key),
    ),
    kind: template.kind,
    title: template.title,
    option: null,
    coatingId,
    ways: template.ways({ below, coating, coatings }),
  };
}
