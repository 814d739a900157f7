const SEA_LEVEL_PA = 101_325;
const SEA_LEVEL_K = 288.15;
const LAPSE_K_PER_M = 0.0065;
const EXPONENT = 5.255876113278519;

export const LOWEST_M = -500;
export const HIGHEST_M = 6000;

/**
 * Air pressure in Pa at a geopotential altitude in m, by the US Standard Atmosphere 1976 (troposphere). Weather moves the
 * true pressure by about 3 %. Use from −500 to 6,000 m.
 */
export function airPressurePa(altitudeM: number): number {
  return SEA_LEVEL_PA * (1 - (LAPSE_K_PER_M * altitudeM) / SEA_LEVEL_K) ** EXPONENT;
}
