/** The few functions of the ASHRAE reference library that the checks ask. Humidity is a fraction here, pressure in Pa. */
declare module 'psychrolib' {
  const psychrolib: {
    SI: number;
    SetUnitSystem(system: number): void;
    GetTDewPointFromRelHum(airCelsius: number, relativeHumidity: number): number;
    GetTDewPointFromTWetBulb(airCelsius: number, wetBulbCelsius: number, pascals: number): number;
    GetRelHumFromTDewPoint(airCelsius: number, dewPointCelsius: number): number;
  };
  export default psychrolib;
}
