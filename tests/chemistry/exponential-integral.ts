/** E1(x) for x > 1 by its continued fraction (Abramowitz & Stegun 5.1.22), evaluated from the far end. */
export function scaledExponentialIntegral(x: number): number {
  let fraction = 0;
  for (let n = 400; n >= 1; n -= 1) fraction = n / (1 + n / (x + fraction));
  return 1 / (x + fraction);
}

/**
 * The cure that a linear ramp is worth, in minutes at the reference, in closed form:
 * `integral exp(-a/T) dT = T exp(-a/T) - a E1(a/T)`. Written apart from the product's quadrature to hold it against.
 */
export function rampInClosedForm(
  fromCelsius: number,
  toCelsius: number,
  minutes: number,
  referenceCelsius: number,
  kilojoulesPerMole: number,
): number {
  const a = (kilojoulesPerMole * 1000) / 8.314462618;
  const [from, to, reference] = [fromCelsius + 273.15, toCelsius + 273.15, referenceCelsius + 273.15];
  // exp(a/Tref) times the antiderivative, with exp(a/T) E1(a/T) as the scaled integral.
  const primitive = (kelvin: number) =>
    Math.exp(a / reference - a / kelvin) * (kelvin - a * scaledExponentialIntegral(a / kelvin));
  return (minutes * (primitive(to) - primitive(from))) / (to - from);
}
