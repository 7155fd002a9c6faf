import { balanceCelsius } from '#chemistry/infrared/balance-temperature.ts';
import type { LampSetup } from '#chemistry/infrared/energy-balance.ts';
import { heatUp, type HeatUp } from '#chemistry/infrared/heat-up.ts';
import { lampDistance, type LampDistance } from '#chemistry/infrared/lamp-distance.ts';
import { lampPositions, type LampPositions } from '#chemistry/infrared/lamp-positions.ts';
import {
  heatCapacityPerSquareMetre,
  PANEL_MATERIALS,
  type PanelMaterial,
} from '#chemistry/infrared/panel-materials.ts';
import { lampMinutesForBand } from '#chemistry/infrared/wave-band.ts';
import type { Substrate } from '#chemistry/limits/heat-sources.ts';
import { strictestLimit, type LimitSource, type VehicleHeat } from '#chemistry/limits/strictest-limit.ts';
import { firstValues, type Values } from './desk-state.ts';
import { ranges, reader, type Answer } from './reader.ts';
import type { Sheet } from './sheet-of.ts';
import type { Unit } from './typed.ts';

export const materials = Object.keys(PANEL_MATERIALS) as PanelMaterial[];
const substrateOf: Record<PanelMaterial, Substrate> = {
  steel: 'steel',
  aluminium: 'aluminium',
  polypropylene: 'pp-tpo',
  abs: 'abs',
  composite: 'composite',
};
export const materialOf = ({ material }: Values): PanelMaterial =>
  materials.find((one) => one === material) ?? firstValues.material;

export type LampAnswer = {
  limit: { celsius: number; setBy: LimitSource; minutes: number | null; needsSupport: boolean };
  distance: number;
  /** `room-too-warm`: the room itself is at the limit. */
  heatUp: HeatUp | 'room-too-warm';
  wantedCelsius: number;
  /** When the metal is at the wanted temperature; null: not while the lamp burns, or not below the limit. */
  wantedAtMinute: number | null;
  balanceCelsius: number;
  /** To come to rest at the wanted temperature. */
  restDistance: LampDistance;
  /** To be there when the lamp has burned its time. */
  timedDistance: LampDistance;
  positions: LampPositions;
  burnMinutes: number;
  /** The sheet's lamp minutes for this wave: printed, or twice the short-wave time. */
  sheetMinutes: { minutes: number; printed: boolean; metres: number } | null;
};

const metres = { least: 0.2, most: 5 };

export function lampAnswer(values: Values, sheet: Sheet | null, unit: Unit): Answer<LampAnswer> {
  const read = reader(values, unit);
  const material = materialOf(values);
  const usual = PANEL_MATERIALS[material].usualMillimetres;
  const millimetres = values.mm.trim() === '' ? usual : read.number('mm', { least: 0.3, most: 20 });
  const lamp = {
    kilowatts: read.number('kw', { least: 0.1, most: 30 }),
    widthMetres: read.number('wide', metres),
    heightMetres: read.number('high', metres),
  };
  const airCelsius = read.celsius('air', ranges.air);
  const distance = read.number('dist', { least: 0.1, most: 3 });
  const wantedCelsius = read.celsius('want', { least: 0, most: 200 });
  const halfPowerMinutes = read.number('half', { least: 0, most: 60 });
  const burnMinutes = read.number('burn', { least: 0.5, most: 240 });
  const panel = { widthMetres: read.number('pwide', metres), heightMetres: read.number('phigh', metres) };
  const recorded = values.battery === 'recorded' ? read.celsius('batat', { least: 30, most: 100 }) : null;

  return read.answer(() => {
    const limit = limitOf(material, vehicleOf(values, recorded));
    const setup: LampSetup = {
      lamp,
      panel: { joulesPerSquareMetreKelvin: heatCapacityPerSquareMetre(material, millimetres) },
      surroundings: { airCelsius },
      distanceMetres: distance,
    };
    const run =
      airCelsius >= limit.celsius
        ? 'room-too-warm'
        : heatUp({ ...setup, minutes: burnMinutes, halfPowerMinutes, limitCelsius: limit.celsius });
    const asked = { ...setup, wantedCelsius, limitCelsius: limit.celsius };
    return {
      limit,
      distance,
      heatUp: run,
      wantedCelsius,
      wantedAtMinute: run === 'room-too-warm' ? null : firstAt(run, wantedCelsius),
      balanceCelsius: balanceCelsius(setup),
      restDistance: lampDistance(asked),
      timedDistance: lampDistance({ ...asked, withinMinutes: burnMinutes, halfPowerMinutes }),
      positions: lampPositions(panel, lamp),
      burnMinutes,
      sheetMinutes: sheetMinutesOf(sheet, values.wave === 'medium' ? 'medium' : 'short'),
    };
  });
}

function vehicleOf({ battery }: Values, recorded: number | null): VehicleHeat {
  if (battery !== 'unknown' && battery !== 'recorded') return { battery: false };
  return {
    battery: true,
    batteryOut: false,
    recorded: recorded === null ? null : { celsius: recorded, minutes: null },
  };
}

function limitOf(material: PanelMaterial, vehicle: VehicleHeat): LampAnswer['limit'] {
  const strictest = strictestLimit({ substrates: [substrateOf[material]], vehicle, booth: null, coatingCelsius: null });
  if (strictest.celsius === null) throw new Error('a panel without a heat limit');
  const { limit: celsius, setBy } = strictest.celsius;
  return { celsius, setBy, minutes: strictest.minutes?.limit ?? null, needsSupport: strictest.needsSupport };
}

/** Minute at which a rising trace first is at a temperature, between its rows in a straight line. */
export function firstAt({ trace }: Pick<HeatUp, 'trace'>, celsius: number): number | null {
  let before = trace[0];
  for (const row of trace) {
    if (row.metalCelsius >= celsius && before) {
      const rise = row.metalCelsius - before.metalCelsius;
      const share = rise > 0 ? (celsius - before.metalCelsius) / rise : 0;
      return Math.max(0, before.minutes + (row.minutes - before.minutes) * share);
    }
    before = row;
  }
  return null;
}

function sheetMinutesOf(sheet: Sheet | null, wave: 'short' | 'medium'): LampAnswer['sheetMinutes'] {
  const printed = wave === 'short' ? sheet?.lampShort : sheet?.lampMedium;
  if (printed) return { ...printed, printed: true };
  // Nothing is known of the way back from a medium-wave time.
  if (wave === 'short' || !sheet?.lampShort) return null;
  const { minutes, metres } = sheet.lampShort;
  const reckoned = lampMinutesForBand(minutes, wave);
  return reckoned === null ? null : { minutes: reckoned, printed: false, metres };
}
