import type { Mark } from '#chemistry/finding.ts';
import { positive } from '#chemistry/quantity.ts';

export type PanelMaterial = 'steel' | 'aluminium' | 'polypropylene' | 'abs' | 'composite';

export type MaterialFigures = {
  kilogramsPerCubicMetre: number;
  joulesPerKilogramKelvin: number;
  /** A usual thickness of a vehicle's panel, for a form's first value. */
  usualMillimetres: number;
  mark: Mark;
};

/** Steel and aluminium: handbook figures. Plastics and glass fibre laminate: from memory, editable. */
export const PANEL_MATERIALS: Record<PanelMaterial, MaterialFigures> = {
  steel: { kilogramsPerCubicMetre: 7830, joulesPerKilogramKelvin: 500, usualMillimetres: 0.8, mark: 'published' },
  aluminium: { kilogramsPerCubicMetre: 2700, joulesPerKilogramKelvin: 902, usualMillimetres: 1, mark: 'published' },
  polypropylene: {
    kilogramsPerCubicMetre: 905,
    joulesPerKilogramKelvin: 1900,
    usualMillimetres: 3,
    mark: 'from-memory',
  },
  abs: { kilogramsPerCubicMetre: 1050, joulesPerKilogramKelvin: 1400, usualMillimetres: 3, mark: 'from-memory' },
  composite: { kilogramsPerCubicMetre: 1800, joulesPerKilogramKelvin: 1100, usualMillimetres: 3, mark: 'from-memory' },
};

/**
 * Heat that one square metre of panel takes up per kelvin, J/(m2 K): 0.8 mm of steel 3,132, 1.0 mm of aluminium 2,435,
 * 3 mm of polypropylene 5,159.
 */
export function heatCapacityPerSquareMetre(material: PanelMaterial, millimetres: number): number {
  const { kilogramsPerCubicMetre, joulesPerKilogramKelvin } = PANEL_MATERIALS[material];
  return (positive('millimetres', millimetres) / 1000) * kilogramsPerCubicMetre * joulesPerKilogramKelvin;
}
