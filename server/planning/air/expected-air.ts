import type { AirFigures, AirSettings } from '#contracts/air.ts';
import type { ZoneAirFacts } from '#server/db/air.ts';
import { floatingOf } from '../local-time.ts';

/** How long the latest reading stands for the air to come; after that the shop's default is nearer the truth. */
const LATEST_HOURS = 12;

export const HOURS = Array.from({ length: 24 }, (_, hour) => hour);

export const defaultAir = ({ defaultCelsius, defaultHumidity }: AirSettings): AirFigures => ({
  celsius: defaultCelsius,
  humidity: defaultHumidity,
});

/** A zone's air as the planner takes it, by hour of the shop's wall clock: one entry where it is the same all day, or 24. */
export function expectedHours(
  zone: Pick<ZoneAirFacts, 'source' | 'schedule' | 'latest'>,
  settings: AirSettings,
  now: Date,
): AirFigures[] {
  const fallback = defaultAir(settings);
  switch (zone.source) {
    case 'default':
      return [fallback];
    case 'latest': {
      const isNew = zone.latest !== null && now.getTime() - zone.latest.at.getTime() <= LATEST_HOURS * 3_600_000;
      return [isNew && zone.latest ? figuresOf(zone.latest) : fallback];
    }
    case 'schedule':
      return HOURS.map((hour) => {
        const row = zone.schedule.find(({ fromHour, toHour }) => fromHour <= hour && hour < toHour);
        return row ? figuresOf(row) : fallback;
      });
    default:
      return zone.source satisfies never;
  }
}

export const figuresOf = ({ celsius, humidity }: AirFigures): AirFigures => ({ celsius, humidity });

export const hourOf = (instant: Date, timeZone: string): number =>
  new Date(floatingOf(instant, timeZone)).getUTCHours();

/** At an hour of hours as `expectedHours` gives them. */
export const airAt = (hours: readonly AirFigures[], hour: number): AirFigures =>
  hours[hours.length === 1 ? 0 : hour] ?? { celsius: 20, humidity: 50 };
