import type { Phase, SheetBody, SheetOption, SheetStage, Way } from '#contracts/sheets.ts';
import { freeKey } from './keys.ts';

/** One change of a sheet's body; the body given stays as it is. */
export type Edit = (body: SheetBody) => SheetBody;

const inStages =
  (change: (stages: SheetStage[]) => SheetStage[]): Edit =>
  (body) => ({ ...body, stages: change([...body.stages]) });

export const putStage = (stage: SheetStage, at: number): Edit => inStages((stages) => stages.toSpliced(at, 0, stage));
export const removeStage = (key: string): Edit => inStages((stages) => stages.filter((stage) => stage.key !== key));
export const setStage = (key: string, part: Partial<SheetStage>): Edit =>
  inStages((stages) => stages.map((stage) => (stage.key === key ? { ...stage, ...part } : stage)));

type Condition = { option: string | null; unlessOption: string | undefined };
export const setStageCondition = (key: string, { option, unlessOption }: Condition): Edit =>
  inStages((stages) =>
    stages.map(({ unlessOption: was, ...stage }) => {
      const wanted = stage.key === key ? { option, unless: unlessOption } : { option: stage.option, unless: was };
      return {
        ...stage,
        option: wanted.option,
        ...(wanted.unless === undefined ? {} : { unlessOption: wanted.unless }),
      };
    }),
  );

/** To another position, counted without the stage itself. */
export const moveStage = (key: string, to: number): Edit =>
  inStages((stages) => {
    const stage = stages.find((one) => one.key === key);
    if (!stage) return stages;
    return stages.filter((one) => one !== stage).toSpliced(Math.max(0, Math.min(to, stages.length - 1)), 0, stage);
  });

export function copyOfStage(body: SheetBody, key: string): SheetStage | null {
  const stage = body.stages.find((one) => one.key === key);
  if (!stage) return null;
  const taken = body.stages.map((one) => one.key);
  return {
    ...structuredClone(stage),
    key: freeKey(stage.key.replace(/-\d+$/, ''), taken),
    title: `${stage.title}, again`,
  };
}

const inWays = (stageKey: string, change: (ways: Way[]) => Way[]): Edit =>
  inStages((stages) =>
    stages.map((stage) => (stage.key === stageKey ? { ...stage, ways: change([...stage.ways]) } : stage)),
  );

export const addWay = (stageKey: string, way: Way): Edit =>
  inWays(stageKey, (ways) => [
    ...ways,
    {
      ...way,
      id: freeKey(
        way.id,
        ways.map(({ id }) => id),
      ),
    },
  ]);
export const removeWay = (stageKey: string, id: string): Edit =>
  inWays(stageKey, (ways) => ways.filter((way) => way.id !== id));
export const setWay = (stageKey: string, id: string, part: Partial<Way>): Edit =>
  inWays(stageKey, (ways) => ways.map((way) => (way.id === id ? settledWay({ ...way, ...part }) : way)));

/** What is absent is left out rather than written as undefined. */
function settledWay({ option, unlessOption, ...way }: Way): Way {
  return {
    ...way,
    ...(option === undefined ? {} : { option }),
    ...(unlessOption === undefined ? {} : { unlessOption }),
  };
}

const inPhases = (stageKey: string, id: string, change: (phases: Phase[]) => Phase[]): Edit =>
  inWays(stageKey, (ways) => ways.map((way) => (way.id === id ? { ...way, phases: change([...way.phases]) } : way)));

export const putPhases = (stageKey: string, id: string, at: number, phases: readonly Phase[]): Edit =>
  inPhases(stageKey, id, (all) => all.toSpliced(at, 0, ...phases));
export const removePhase = (stageKey: string, id: string, at: number): Edit =>
  inPhases(stageKey, id, (all) => all.toSpliced(at, 1));
export const movePhase = (stageKey: string, id: string, from: number, to: number): Edit =>
  inPhases(stageKey, id, (all) => {
    const phase = all[from];
    return phase && to >= 0 && to < all.length ? all.toSpliced(from, 1).toSpliced(to, 0, phase) : all;
  });
export const setPhase = (stageKey: string, id: string, at: number, phase: Phase): Edit =>
  inPhases(stageKey, id, (all) => all.with(at, phase));

const inOptions =
  (change: (options: SheetOption[]) => SheetOption[]): Edit =>
  (body) => ({ ...body, options: change([...body.options]) });
export const addOption = (label: string, part: Partial<SheetOption> = {}): Edit =>
  inOptions((options) => [
    ...options,
    {
      key: freeKey(
        label,
        options.map(({ key }) => key),
      ),
      label,
      on: false,
      ...part,
    },
  ]);
export const setOption = (key: string, part: Partial<SheetOption>): Edit =>
  inOptions((options) => options.map((option) => (option.key === key ? { ...option, ...part } : option)));

/** An option with everything that named it: what belonged to it is there always, or, of extra coats, no more. */
export const removeOption =
  (key: string): Edit =>
  (body) => ({
    ...body,
    options: body.options.filter((option) => option.key !== key),
    stages: body.stages.map(({ unlessOption, ...stage }) => ({
      ...stage,
      ...(unlessOption === undefined || unlessOption === key ? {} : { unlessOption }),
      option: stage.option === key ? null : stage.option,
      ways: stage.ways.map((way) => withoutOption(way, key)),
    })),
  });

function withoutOption({ option, unlessOption, ...way }: Way, key: string): Way {
  return {
    ...way,
    phases: way.phases.filter(({ perExtraCoat }) => perExtraCoat !== key),
    ...(option === undefined || option === key ? {} : { option }),
    ...(unlessOption === undefined || unlessOption === key ? {} : { unlessOption }),
  };
}

export type SheetPart = SheetBody['parts'][number];
export const setParts =
  (parts: readonly SheetPart[]): Edit =>
  (body) => ({ ...body, parts: [...parts] });
