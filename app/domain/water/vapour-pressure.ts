const ZERO_C = 273.15;
const CRITICAL_K = 647.096;
const CRITICAL_PA = 22_064_000;
const LIQUID_A = [-7.85951783, 1.84408259, -11.7866497, 22.6807411, -15.9618719, 1.80122502];
const LIQUID_X = [1, 1.5, 3, 3.5, 4, 7.5];
const TRIPLE_K = 273.16;
const TRIPLE_PA = 611.657;
const ICE_A = [-21.2144006, 27.3203819, -6.1059813];
const ICE_B = [0.00333333333, 1.20666667, 1.70333333];

/**
 * The vapour pressure of water in Pa at a temperature in °C: over liquid by IAPWS SR1-86(1992) (Wagner and Pruss 1993),
 * below 0.01 °C over ice by IAPWS R14-08(2011). Use from −50 to 150 °C.
 */
export function waterVapourPa(temperatureC: number): number {
  const kelvin = temperatureC + ZERO_C;
  if (kelvin < TRIPLE_K) {
    const theta = kelvin / TRIPLE_K;
    const sum = ICE_A.reduce((total, a, place) => total + a * theta ** (ICE_B[place] ?? 0), 0);
    return TRIPLE_PA * Math.exp(sum / theta);
  }
  const theta = 1 - kelvin / CRITICAL_K;
  const sum = LIQUID_A.reduce((total, a, place) => total + a * theta ** (LIQUID_X[place] ?? 0), 0);
  return CRITICAL_PA * Math.exp((CRITICAL_K / kelvin) * sum);
}
