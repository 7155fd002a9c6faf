import { positive } from '#chemistry/quantity.ts';

export type FacingRectangles = { widthMetres: number; heightMetres: number; distanceMetres: number };

/** Below this X2 + Y2 the series below is exact to about 1e-11 and the closed form loses its digits. */
const FAR = 1e-5;

/**
 * View factor between two equal rectangles that face each other squarely: the share of what one radiates that falls on the
 * other, 0 to 1. Howell, A Catalog of Radiation Heat Transfer Configuration Factors, C-11; Incropera, table 13.2.
 * 1 x 1 at distance 1 is 0.1998.
 */
export function viewFactor({ widthMetres, heightMetres, distanceMetres }: FacingRectangles): number {
  const c = positive('distanceMetres', distanceMetres);
  const x = positive('widthMetres', widthMetres) / c;
  const y = positive('heightMetres', heightMetres) / c;
  const [xx, yy] = [x * x, y * y];
  if (xx + yy < FAR) return ((x * y) / Math.PI) * (1 - (xx + yy) / 3);
  const [overX, overY] = [Math.sqrt(1 + xx), Math.sqrt(1 + yy)];
  // (1+X2)(1+Y2)/(1+X2+Y2) is 1 + X2 Y2/(1+X2+Y2): written so, nothing is lost for small rectangles.
  const sum =
    Math.log1p((xx * yy) / (1 + xx + yy)) / 2 +
    x * overY * Math.atan(x / overY) +
    y * overX * Math.atan(y / overX) -
    x * Math.atan(x) -
    y * Math.atan(y);
  return Math.min(1, Math.max(0, (2 * sum) / (Math.PI * x * y)));
}
