import {
  BOOTH_AIR_LIMITS_CELSIUS,
  SUBSTRATE_LIMITS,
  UNRECORDED_BATTERY_LIMIT,
} from '#chemistry/limits/heat-sources.ts';
import { strictestLimit, type HeatLimit } from '#chemistry/limits/strictest-limit.ts';
import { bakeRefusals } from '#chemistry/limits/bake-allowed.ts';
import type { SheetGround, Way } from '#contracts/sheets.ts';
import type { SettledStage } from '../expand-sheet.ts';
import { heatMinutesOf } from '../way-times.ts';
import { coatingOf, found, inWay, type Found, type Variant } from './found.ts';

type Hot = Way & { bakeCelsius: number };
const isHot = (way: Way): way is Hot => way.bakeCelsius !== null && heatMinutesOf(way) > 0;

/** Bakes against the sheet's parts, the films on them, the booths, and vehicles with a battery on board. */
export function heatFaults(variant: Variant): Found[] {
  return [
    ...variant.stages.flatMap((stage, i) => {
      const limits = limitsFor(variant, i);
      const hot = stage.ways.filter(isHot);
      const refused = hot.filter((way) => limits.some(({ limit }) => breaks(way, limit)));
      const severity = refused.length === stage.ways.length ? 'stop' : 'warn';
      return hot.flatMap((way) => [
        ...limits.flatMap(({ code, names, limit }) =>
          breaks(way, limit)
            ? [inWay(stage, way)[severity](code, 'heat', { names, figures: [way.bakeCelsius, limit] })]
            : [],
        ),
        ...boothFaults(stage, way, variant.ground),
      ]);
    }),
    ...batteryFaults(variant),
  ];
}

const breaks = (way: Hot, celsius: number): boolean => {
  const limit: HeatLimit = { celsius: { limit: celsius, setBy: 'coating' }, minutes: null, needsSupport: false };
  return (
    bakeRefusals(limit, { celsius: way.bakeCelsius, minutes: heatMinutesOf(way), earlierHeatMinutes: 0 }).length > 0
  );
};

type Limit = { code: 'above-part' | 'above-film'; names: string[]; limit: number };

/** The lowest limit of the parts, and of the films that are on them by then. */
function limitsFor(variant: Variant, upTo: number): Limit[] {
  const substrates = variant.parts.map(({ substrate }) => substrate);
  const { celsius } = strictestLimit({ substrates, vehicle: { battery: false }, booth: null, coatingCelsius: null });
  const weakest = substrates.find((one) => SUBSTRATE_LIMITS[one].celsius === celsius?.limit);
  const films = variant.stages
    .slice(0, upTo + 1)
    .flatMap((stage) => coatingOf(stage, variant) ?? [])
    .flatMap(({ name, sheet }) => (sheet.heatLimitCelsius === null ? [] : [{ name, limit: sheet.heatLimitCelsius }]))
    .sort((a, b) => a.limit - b.limit);
  return [
    ...(celsius && weakest ? [{ code: 'above-part' as const, names: [weakest], limit: celsius.limit }] : []),
    ...films.slice(0, 1).map(({ name, limit }) => ({ code: 'above-film' as const, names: [name], limit })),
  ];
}

/** Booth air: what the hottest booth allows, 93 C where nothing is set (International Fire Code 2018, ch. 24). */
function boothFaults(stage: SettledStage, way: Hot, ground: SheetGround | null): Found[] {
  if (!way.phases.some(({ kind, lamp }) => kind === 'bake' && lamp !== true)) return [];
  const booths = ground?.places.filter(({ bakes }) => bakes) ?? [];
  const limit = Math.max(
    ...(booths.length > 0
      ? booths.map(({ bakeLimitCelsius }) => bakeLimitCelsius ?? BOOTH_AIR_LIMITS_CELSIUS.us)
      : [BOOTH_AIR_LIMITS_CELSIUS.us]),
  );
  if (!breaks(way, limit)) return [];
  const others = stage.ways.some((other) => !isHot(other) || other.bakeCelsius <= limit);
  return [inWay(stage, way)[others ? 'warn' : 'stop']('above-booth', 'heat', { figures: [way.bakeCelsius, limit] })];
}

/**
 * Only for vehicles with a high-voltage battery whose maker's limit nobody has recorded: 49 C and 45 min over all bakes. Said
 * where no way is left for them, since a sheet with a cooler way beside the hot one serves them as it is.
 */
function batteryFaults({ stages }: Variant): Found[] {
  const { celsius, minutes } = UNRECORDED_BATTERY_LIMIT;
  let heat = 0;
  const faults: Found[] = [];
  for (const stage of stages) {
    const left = stage.ways.filter((way) => !isHot(way) || !breaks(way, celsius));
    const coolest = Math.min(...stage.ways.filter(isHot).map((way) => way.bakeCelsius));
    if (left.length === 0)
      faults.push(
        found('battery-heat', 'warn', { stage: stage.key, field: 'ways' }, { figures: [coolest, celsius, minutes] }),
      );
    else heat += Math.min(...left.map(heatMinutesOf));
    if (heat > minutes && !faults.some(({ code }) => code === 'battery-minutes'))
      faults.push(found('battery-minutes', 'warn', { stage: stage.key, field: 'ways' }, { figures: [heat, minutes] }));
  }
  return faults;
}
