import type { Phase, SheetBody, SheetStage, Way } from '#contracts/sheets.ts';
import { phaseWords } from '#src/lib/phase-words.ts';

/** One difference: where it lies, and how it was and is; null: was not there, is gone. */
export type Change = { where: string; what: string; before: string | null; after: string | null };

type Words = {
  duration: (minutes: number) => string;
  temperature: (celsius: number) => string;
  coating: (id: string) => string;
};

/** What differs between two bodies of a sheet, in the order of the newer one; empty where nothing does. */
export function changesBetween(before: SheetBody, after: SheetBody, words: Words): Change[] {
  const old = new Map(before.stages.map((stage) => [stage.key, stage]));
  const kept = new Set(after.stages.map(({ key }) => key));
  const order = (body: SheetBody, other: SheetBody): string[] =>
    body.stages.filter(({ key }) => other.stages.some((one) => one.key === key)).map(({ key }) => key);
  const moved = order(before, after).join() !== order(after, before).join();
  return [
    ...differing('Sheet', [
      ['Summary', before.summary, after.summary],
      ['Options', optionsText(before), optionsText(after)],
      ['Parts', partsText(before), partsText(after)],
      ...(moved ? [['Order of the stages', titlesOf(before), titlesOf(after)] as Row] : []),
    ]),
    ...after.stages.flatMap((stage) => {
      const was = old.get(stage.key);
      if (!was) return [{ where: stage.title, what: 'Stage', before: null, after: waysText(stage) }];
      return stageChanges(was, stage, before, after, words);
    }),
    ...before.stages
      .filter(({ key }) => !kept.has(key))
      .map((stage) => ({ where: stage.title, what: 'Stage', before: waysText(stage), after: null })),
  ];
}

type Row = [what: string, before: string, after: string];
const differing = (where: string, rows: Row[]): Change[] =>
  rows.filter(([, was, is]) => was !== is).map(([what, was, is]) => ({ where, what, before: was, after: is }));

const titlesOf = ({ stages }: SheetBody): string => stages.map(({ title }) => title).join(', ');
const waysText = ({ ways }: SheetStage): string => ways.map(({ label }) => label).join(', ');
const optionsText = ({ options }: SheetBody): string =>
  options
    .map(({ label, on, most = 1 }) => `${label}${most > 1 ? ` (up to ${most})` : ''}${on ? ', on' : ''}`)
    .join('; ');
const partsText = ({ parts }: SheetBody): string =>
  parts.map(({ name, substrate, units }) => `${name} (${substrate}, ${units})`).join('; ');

function stageChanges(was: SheetStage, is: SheetStage, before: SheetBody, after: SheetBody, words: Words): Change[] {
  const coating = (id: string | null): string => (id === null ? 'none' : words.coating(id));
  const ways = new Map(was.ways.map((way) => [way.id, way]));
  return [
    ...differing(is.title, [
      ['Title', was.title, is.title],
      ['Kind', was.kind, is.kind],
      ['Coating', coating(was.coatingId), coating(is.coatingId)],
      ['Option', conditionText(was, before), conditionText(is, after)],
    ]),
    ...is.ways.flatMap((way) => {
      const old = ways.get(way.id);
      const where = `${is.title}, ${way.label}`;
      if (!old) return [{ where, what: 'Way', before: null, after: phasesText(way.phases, words) }];
      return wayChanges(where, old, way, before, after, words);
    }),
    ...was.ways
      .filter(({ id }) => !is.ways.some((way) => way.id === id))
      .map((way) => ({
        where: `${is.title}, ${way.label}`,
        what: 'Way',
        before: phasesText(way.phases, words),
        after: null,
      })),
  ];
}

const yesNo = (value: boolean): string => (value ? 'yes' : 'no');

function wayChanges(where: string, was: Way, is: Way, before: SheetBody, after: SheetBody, words: Words): Change[] {
  const bake = (way: Way): string => (way.bakeCelsius === null ? 'none' : words.temperature(way.bakeCelsius));
  return differing(where, [
    ['Name', was.label, is.label],
    ['Phases', phasesText(was.phases, words), phasesText(is.phases, words)],
    ['Window', gapText(was, words), gapText(is, words)],
    ['Place', placesText(was), placesText(is)],
    ['Skill', was.skill ?? 'none', is.skill ?? 'none'],
    ['Lamps', String(was.lampCount), String(is.lampCount)],
    ['Temperature', bake(was), bake(is)],
    ['Shared booth run', was.load ?? 'none', is.load ?? 'none'],
    ['Clean-up', was.family ?? 'none', is.family ?? 'none'],
    ['May pause', yesNo(was.split), yesNo(is.split)],
    ['Option', conditionText(was, before), conditionText(is, after)],
  ]);
}

function conditionText(
  { option, unlessOption }: { option?: string | null | undefined; unlessOption?: string | undefined },
  { options }: SheetBody,
): string {
  const label = (key: string): string => options.find((one) => one.key === key)?.label ?? key;
  const said = [
    option == null ? '' : `with ${label(option)}`,
    unlessOption === undefined ? '' : `without ${label(unlessOption)}`,
  ];
  return said.filter(Boolean).join(', ') || 'always';
}

const placesText = ({ stay, placeKinds }: Way): string => (stay ? 'where it stands' : placeKinds.join(', ') || 'none');

function gapText({ gap: { min, max, settle } }: Way, { duration }: Words): string {
  const until = max === null ? 'no latest' : `until ${duration(max)}`;
  return `from ${duration(min)}, ${until}${settle > 0 ? `, held ${duration(settle)}` : ''}`;
}

const phasesText = (phases: readonly Phase[], { duration }: Words): string =>
  phases
    .map(({ kind, minutes, perExtraCoat, lamp }) => {
      const text = `${phaseWords[kind]}${lamp ? ' (lamp)' : ''} ${duration(minutes)}`;
      return perExtraCoat === undefined ? text : `[${text}]`;
    })
    .join(' · ');

/** A few words of what changed, to begin the note of a version with. */
export function noteOf(changes: readonly Change[]): string {
  const byPlace = new Map<string, string[]>();
  for (const { where, what, before, after } of changes) {
    const said =
      before === null
        ? `${what.toLowerCase()} added`
        : after === null
          ? `${what.toLowerCase()} taken out`
          : what.toLowerCase();
    byPlace.set(where, [...(byPlace.get(where) ?? []), said]);
  }
  const text = [...byPlace].map(([where, whats]) => `${where}: ${whats.join(', ')}`).join('; ');
  return text.length <= 400 ? text : `${text.slice(0, 397)}...`;
}
