/** PsychroLib 1.1.1 ships no types; these are the functions that `psychrometrics/psychrolib-si.ts` calls (SI units). */
declare module 'psychrolib' {
  interface PsychroLib {
    readonly IP: number;
    readonly SI: number;
    SetUnitSystem(unitSystem: number): void;
    GetSatVapPres(dryBulbC: number): number;
    GetHumRatioFromVapPres(vapourPressurePa: number, pressurePa: number): number;
    GetVapPresFromHumRatio(humidityRatio: number, pressurePa: number): number;
    GetHumRatioFromTDewPoint(dewPointC: number, pressurePa: number): number;
    GetHumRatioFromRelHum(dryBulbC: number, relativeHumidity: number, pressurePa: number): number;
    GetRelHumFromHumRatio(dryBulbC: number, humidityRatio: number, pressurePa: number): number;
    GetTDewPointFromHumRatio(dryBulbC: number, humidityRatio: number, pressurePa: number): number;
    GetTWetBulbFromHumRatio(dryBulbC: number, humidityRatio: number, pressurePa: number): number;
    GetHumRatioFromTWetBulb(dryBulbC: number, wetBulbC: number, pressurePa: number): number;
    GetSatHumRatio(dryBulbC: number, pressurePa: number): number;
    GetMoistAirEnthalpy(dryBulbC: number, humidityRatio: number): number;
    GetMoistAirVolume(dryBulbC: number, humidityRatio: number, pressurePa: number): number;
    GetStandardAtmPressure(elevationM: number): number;
  }
  const psychrolib: PsychroLib;
  export default psychrolib;
}
