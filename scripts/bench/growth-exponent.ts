/** How `size` grows into `cost`: the exponent, by least squares on logarithms. 1 is linear. Both above 0. */
export function growthExponent(points: readonly { size: number; cost: number }[]): number {
  const logs = points.map(({ size, cost }) => [Math.log(size), Math.log(cost)] as const);
  const mean = (k: 0 | 1): number => logs.reduce((sum, point) => sum + point[k], 0) / logs.length;
  const [x, y] = [mean(0), mean(1)];
  const above = logs.reduce((sum, point) => sum + (point[0] - x) * (point[1] - y), 0);
  return above / logs.reduce((sum, point) => sum + (point[0] - x) ** 2, 0);
}
