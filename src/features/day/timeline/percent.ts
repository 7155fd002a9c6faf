/** A share of the drawn time, 0 to 1, as a length in a style. */
export const percent = (fraction: number): string => `${fraction * 100}%`;
