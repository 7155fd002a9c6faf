import { positive, temperature } from '#chemistry/quantity.ts';
import {
  BOOTH_AIR_LIMITS_CELSIUS,
  SUBSTRATE_LIMITS,
  UNRECORDED_BATTERY_LIMIT,
  type BoothRule,
  type Substrate,
} from './heat-sources.ts';

export type VehicleHeat =
  /** An engine without a high-voltage battery, or parts without a vehicle. */
  | { battery: false }
  /** Electric and hybrid vehicles. */
  | {
      battery: true;
      /** Taken out before the bake: its limit no longer holds. */
      batteryOut: boolean;
      /** As the maker states it; convert 120 F with `celsiusFromFahrenheit`, which does not round it up. Null where unknown. */
      recorded: { celsius: number; minutes: number | null } | null;
    };

export type HeatQuestion = {
  substrates: readonly Substrate[];
  vehicle: VehicleHeat;
  /** Null for a lamp outside a booth. */
  booth: BoothRule | null;
  /** The coating's own limit by its data sheet; null where it names none. */
  coatingCelsius: number | null;
  /** The shop's own figures where it edited the defaults. */
  substrateCelsius?: Partial<Record<Substrate, number>>;
};

export type LimitSource =
  `substrate-${Substrate}` | `booth-${BoothRule}` | 'battery-recorded' | 'battery-unrecorded' | 'coating';

export type HeatLimit = {
  /** Null where nothing limits it: no part, no booth, no battery. */
  celsius: { limit: number; setBy: LimitSource } | null;
  /** Minutes of heat in all, over every bake of this job; null where only the temperature is limited. */
  minutes: { limit: number; setBy: LimitSource } | null;
  needsSupport: boolean;
};

type Candidate = { setBy: LimitSource; celsius: number; minutes: number | null };

/** The strictest of all limits that hold for this bake, and whose it is. Among equals the vehicle's, then the part's. */
export function strictestLimit(question: HeatQuestion): HeatLimit {
  const candidates = [...batteryLimit(question.vehicle), ...substrateLimits(question), ...boothAndCoating(question)];
  let celsius: HeatLimit['celsius'] = null;
  let minutes: HeatLimit['minutes'] = null;
  for (const candidate of candidates) {
    const degrees = temperature(`limit of ${candidate.setBy}`, candidate.celsius);
    if (celsius === null || degrees < celsius.limit) celsius = { limit: degrees, setBy: candidate.setBy };
    if (candidate.minutes === null) continue;
    const most = positive(`minutes of ${candidate.setBy}`, candidate.minutes);
    if (minutes === null || most < minutes.limit) minutes = { limit: most, setBy: candidate.setBy };
  }
  return { celsius, minutes, needsSupport: question.substrates.some((part) => SUBSTRATE_LIMITS[part].needsSupport) };
}

function batteryLimit(vehicle: VehicleHeat): Candidate[] {
  if (!vehicle.battery || vehicle.batteryOut) return [];
  if (vehicle.recorded === null) return [{ setBy: 'battery-unrecorded', ...UNRECORDED_BATTERY_LIMIT }];
  return [{ setBy: 'battery-recorded', ...vehicle.recorded }];
}

function substrateLimits({ substrates, substrateCelsius = {} }: HeatQuestion): Candidate[] {
  return substrates.map((part) => {
    const celsius = substrateCelsius[part] ?? SUBSTRATE_LIMITS[part].celsius;
    return { setBy: `substrate-${part}`, celsius, minutes: null };
  });
}

function boothAndCoating({ booth, coatingCelsius }: HeatQuestion): Candidate[] {
  const candidates: Candidate[] = [];
  if (booth !== null) {
    candidates.push({ setBy: `booth-${booth}`, celsius: BOOTH_AIR_LIMITS_CELSIUS[booth], minutes: null });
  }
  if (coatingCelsius !== null) candidates.push({ setBy: 'coating', celsius: coatingCelsius, minutes: null });
  return candidates;
}
