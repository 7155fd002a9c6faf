import { SUBSTRATE_LIMITS, UNRECORDED_BATTERY_LIMIT } from '#chemistry/limits/heat-sources.ts';
import type { Way } from '#contracts/sheets.ts';
import { heatMinutesOf } from '#server/sheets/way-times.ts';
import { useFormats } from '#src/lib/session.ts';
import { substrateWords } from '#src/lib/substrate-words.ts';

const substrates = Object.keys(SUBSTRATE_LIMITS) as (keyof typeof SUBSTRATE_LIMITS)[];

/** For whom this way is too hot: the planner does not offer it to them, and takes another way where there is one. */
export function HeatNote({ way }: { way: Way }) {
  const { temperature, duration } = useFormats();
  const celsius = way.bakeCelsius;
  if (celsius === null) return null;
  const { celsius: battery, minutes } = UNRECORDED_BATTERY_LIMIT;
  const tooHot = [
    ...substrates.filter((one) => SUBSTRATE_LIMITS[one].celsius < celsius).map((one) => substrateWords[one]),
    ...(celsius > battery || heatMinutesOf(way) > minutes
      ? [
          `vehicles with a battery and no recorded limit (${temperature(battery, 'limit')}, ${duration(minutes)} in all)`,
        ]
      : []),
  ];
  return (
    <p className="max-w-prose pb-1.5 text-xs text-muted">
      {tooHot.length > 0
        ? `Not offered for: ${tooHot.join('; ')}.`
        : 'Within the limits of every material, and of vehicles with a battery.'}{' '}
      The maker’s data sheet comes first.
    </p>
  );
}
