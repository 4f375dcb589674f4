// What the tests use of reference libraries that come without types.
declare module "psychrolib" {
  interface Psychrometrics {
    SI: number;
    SetUnitSystem(system: number): void;
    /** degC, Pa. */
    GetStandardAtmTemperature(altitude: number): number;
    GetStandardAtmPressure(altitude: number): number;
    /** Pa over water or ice, at degC. */
    GetSatVapPres(temperature: number): number;
    /** kg of water per kg of dry air. */
    GetHumRatioFromRelHum(temperature: number, relativeHumidity: number, pressure: number): number;
    GetHumRatioFromTDewPoint(dewPoint: number, pressure: number): number;
    /** kg/m³ at degC, kg/kg, Pa. */
    GetMoistAirDensity(temperature: number, humidityRatio: number, pressure: number): number;
  }
  const psychrolib: Psychrometrics;
  export default psychrolib;
}

declare module "js-quantities" {
  interface Quantity {
    to(unit: string): Quantity;
    scalar: number;
  }
  export default function quantity(text: string): Quantity;
}
