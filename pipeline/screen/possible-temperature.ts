/** Temperatures at which the solubility of a solid in a liquid is measured, K. Common practice. */
const [LOWEST_K, HIGHEST_K] = [150, 650];

/** Whether a solubility can have been measured at a temperature (K); what cannot is a slip of the scale or of digits. */
export function isPossibleTemperature(temperatureK: number): boolean {
  return temperatureK >= LOWEST_K && temperatureK <= HIGHEST_K;
}
