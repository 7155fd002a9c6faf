import { HAIR } from '#chemistry/constants.ts';
import { finite, QuantityError, temperature } from '#chemistry/quantity.ts';
import { dewPointCelsius, type Air } from './dew-point.ts';

/**
 * The surface must be at least this much warmer than the dew point before anything is sprayed (ISO 8502-4 practice,
 * published, read at second hand). Held in Celsius whatever the shop's units: the common "5 F" is only 2.78 C.
 */
export const LEAST_DEW_POINT_MARGIN_CELSIUS = 3;

/** Surface over dew point, in Celsius degrees; negative where the surface is wet already. */
export function dewPointMarginCelsius(surfaceCelsius: number, dewPoint: number): number {
  return temperature('surfaceCelsius', surfaceCelsius) - temperature('dewPointCelsius', dewPoint);
}

export type SprayGate = {
  open: boolean;
  dewPointCelsius: number;
  marginCelsius: number;
  /** The coldest surface that may be sprayed in this air. */
  leastSurfaceCelsius: number;
};

/**
 * May this surface be sprayed in this air? A shop may ask for more than 3.0 C of margin, never for less.
 *
 * @throws QuantityError for a margin under 3.0 C or air that cannot be
 */
export function sprayGate(
  air: Air,
  surfaceCelsius: number,
  leastMarginCelsius: number = LEAST_DEW_POINT_MARGIN_CELSIUS,
): SprayGate {
  return gateAtDewPoint(dewPointCelsius(air), surfaceCelsius, leastMarginCelsius);
}

/** The same gate for a meter that shows the dew point itself. */
export function gateAtDewPoint(
  dewPoint: number,
  surfaceCelsius: number,
  leastMarginCelsius: number = LEAST_DEW_POINT_MARGIN_CELSIUS,
): SprayGate {
  if (finite('leastMarginCelsius', leastMarginCelsius) < LEAST_DEW_POINT_MARGIN_CELSIUS - HAIR) {
    throw new QuantityError('leastMarginCelsius', leastMarginCelsius, `at least ${LEAST_DEW_POINT_MARGIN_CELSIUS}`);
  }
  const marginCelsius = dewPointMarginCelsius(surfaceCelsius, dewPoint);
  return {
    open: marginCelsius >= leastMarginCelsius - HAIR,
    dewPointCelsius: dewPoint,
    marginCelsius,
    leastSurfaceCelsius: dewPoint + leastMarginCelsius,
  };
}
