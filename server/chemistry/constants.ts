/** Molar gas constant, J/(mol K). CODATA 2018, exact by definition of the SI. */
export const GAS_CONSTANT = 8.314462618;

/** Stefan-Boltzmann constant, W/(m2 K4). CODATA 2018. */
export const STEFAN_BOLTZMANN = 5.670374419e-8;

/** Wien's displacement constant, micrometre kelvin. CODATA 2018. */
export const WIEN_MICROMETRE_KELVIN = 2897.771955;

/** Celsius to kelvin: add this. */
export const KELVIN_OFFSET = 273.15;

/** Standard atmosphere at sea level, Pa. */
export const STANDARD_PRESSURE_PASCALS = 101_325;

/**
 * Room for the last digits of binary arithmetic where a figure is held against a limit, so that 57.2 F counts as 14 C
 * and three lamps of 0.1 kW fit a circuit of 0.3 kW. Far below what any instrument of a shop can show.
 */
export const HAIR = 1e-9;
