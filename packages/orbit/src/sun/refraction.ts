/**
 * How much higher the air lets an object appear, degrees, for a true elevation. Source: NREL/TP-560-34302 (Reda and
 * Andreas 2008) equation 42, the formula of Saemundsson with pressure and temperature. It is one for light: radio waves
 * in humid air bend up to about a quarter more near the horizon. Nothing is added more than a degree below it.
 */
export function refractionDeg(elevationDeg: number, air: { pressureHpa: number; temperatureC: number }): number {
  if (elevationDeg < -1) return 0;
  const tangent = Math.tan(((elevationDeg + 10.3 / (elevationDeg + 5.11)) * Math.PI) / 180);
  return ((air.pressureHpa / 1010) * (283 / (273 + air.temperatureC)) * 1.02) / (60 * tangent);
}
