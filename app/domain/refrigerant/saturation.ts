import library from './data/refrigerants.json' with { type: 'json' };

/**
 * Saturation of refrigerants from published equations of the form p = p_r·exp((T_r/T)·Σ nᵢ·θ^tᵢ), θ = 1 − T/T_r, and
 * ρ = ρ_r·(1 + Σ nᵢ·θ^tᵢ). Coefficients: the open property library CoolProp (Bell et al. 2014, MIT licence) and refits to
 * the equations of state that each fluid cites; the notice stands with the data.
 */
type Equation = { reduceK: number; reducing: number; n: number[]; t: number[]; fromC: number; toC: number };
type Fluid = {
  citation: string;
  blend: boolean;
  molarMassKgPerMol: number;
  bubble: Equation;
  dew: Equation;
  liquid: Equation;
};

const FLUIDS = library.fluids as unknown as Record<string, Fluid>;
const ZERO_C = 273.15;
const GAS_CONSTANT = 8.31446261815324;
const YEAR_SECONDS = 365 * 24 * 3600;

export const REFRIGERANTS = Object.keys(FLUIDS);

/**
 * Safety group by ANSI/ASHRAE 34 (from memory): A lower toxicity; 1 no flame propagation, 2L lower, 2 flammable, 3 higher
 * flammability.
 */
export const SAFETY_GROUPS: Readonly<Record<string, string>> = {
  'R-134a': 'A1',
  'R-1234yf': 'A2L',
  'R-12': 'A1',
  'R-22': 'A1',
  'R-152a': 'A2',
  'R-744': 'A1',
  'R-290': 'A3',
  'R-407C': 'A1',
  'R-410A': 'A1',
  'R-404A': 'A1',
  'R-513A': 'A1',
};

export type OutOfRange = { error: string };
export type Saturation = {
  /** Absolute pressure in Pa at which the first vapour forms, and at which the last liquid is gone. */
  bubblePa: number;
  dewPa: number;
  liquidKgPerM3: number;
  source: string;
};

export function isRefrigerant(name: string): boolean {
  return Object.hasOwn(FLUIDS, name);
}

/** A name as people write it (`r134a`, `134a`, `R 1234 YF`) as the library's, or null. */
export function refrigerantNamed(text: string): string | null {
  const plain = (name: string) =>
    name
      .toLowerCase()
      .replace(/[^a-z0-9]/g, '')
      .replace(/^r/, '');
  return REFRIGERANTS.find((name) => plain(name) === plain(text)) ?? null;
}

/** The range of temperatures in °C over which a refrigerant's equations are used; outside it nothing is answered. */
export function saturationRange(name: string): { fromC: number; toC: number } {
  const { bubble, dew, liquid } = fluid(name);
  return {
    fromC: Math.max(bubble.fromC, dew.fromC, liquid.fromC),
    toC: Math.min(bubble.toC, dew.toC, liquid.toC),
  };
}

/** Saturation at a temperature in °C; outside the equations' range an error, never a guess. */
export function saturationAt(name: string, temperatureC: number): Saturation | OutOfRange {
  const { fromC, toC } = saturationRange(name);
  if (!(temperatureC >= fromC && temperatureC <= toC)) {
    return { error: `${name} is computed from ${fromC} to ${Math.floor(toC)} °C only.` };
  }
  const { bubble, dew, liquid, citation } = fluid(name);
  const kelvin = temperatureC + ZERO_C;
  return {
    bubblePa: pressure(bubble, kelvin),
    dewPa: pressure(dew, kelvin),
    liquidKgPerM3: density(liquid, kelvin),
    source: citation,
  };
}

/** The temperatures in °C at which the bubble and the dew pressure are `pressurePa` (absolute). */
export function saturationTemperature(
  name: string,
  pressurePa: number,
): { bubbleC: number; dewC: number; source: string } | OutOfRange {
  const { fromC, toC } = saturationRange(name);
  const { bubble, dew, citation } = fluid(name);
  const bubbleC = inverse(bubble, pressurePa, fromC, toC);
  const dewC = inverse(dew, pressurePa, fromC, toC);
  if (bubbleC === null || dewC === null)
    return { error: `This pressure lies outside what is computed for ${name}.` };
  return { bubbleC, dewC, source: citation };
}

/** Superheat in K: how much warmer the suction line is than the dew point at its absolute pressure. */
export function superheatK(name: string, pressurePa: number, lineC: number): number | OutOfRange {
  const found = saturationTemperature(name, pressurePa);
  return 'error' in found ? found : lineC - found.dewC;
}

/** Subcooling in K: how much colder the liquid line is than the bubble point at its absolute pressure. */
export function subcoolingK(name: string, pressurePa: number, lineC: number): number | OutOfRange {
  const found = saturationTemperature(name, pressurePa);
  return 'error' in found ? found : found.bubbleC - lineC;
}

/** The mass in grams of saturated vapour in a volume, as an ideal gas: an estimate from above of a small remainder. */
export function vapourGrams(
  name: string,
  pressurePa: number,
  temperatureC: number,
  volumeM3: number,
): number {
  return (
    ((pressurePa * volumeM3) / (GAS_CONSTANT * (temperatureC + ZERO_C))) *
    fluid(name).molarMassKgPerMol *
    1000
  );
}

/**
 * The grams of a refrigerant a year with the same molar flow as a throughput in Pa·m³/s at 20 °C: the trade's term for a
 * leak. At working pressure the same hole passes more; this is not corrected here.
 */
export function gramsPerYear(name: string, leakPaM3PerS: number): number {
  return (
    (leakPaM3PerS / (GAS_CONSTANT * (20 + ZERO_C))) * fluid(name).molarMassKgPerMol * 1000 * YEAR_SECONDS
  );
}

function fluid(name: string): Fluid {
  const found = FLUIDS[name];
  if (!found) throw new Error(`unknown refrigerant ${name}`);
  return found;
}

function series({ reduceK, n, t }: Equation, kelvin: number): number {
  const theta = 1 - kelvin / reduceK;
  return n.reduce((sum, coefficient, place) => sum + coefficient * theta ** (t[place] ?? 0), 0);
}

function pressure(equation: Equation, kelvin: number): number {
  return equation.reducing * Math.exp((equation.reduceK / kelvin) * series(equation, kelvin));
}

function density(equation: Equation, kelvin: number): number {
  return equation.reducing * (1 + series(equation, kelvin));
}

/** Bisection: the pressure rises with the temperature over the whole range. */
function inverse(equation: Equation, pressurePa: number, fromC: number, toC: number): number | null {
  let [low, high] = [fromC, toC];
  if (!(pressurePa >= pressure(equation, low + ZERO_C) && pressurePa <= pressure(equation, high + ZERO_C)))
    return null;
  for (let step = 0; step < 60; step += 1) {
    const middle = (low + high) / 2;
    if (pressure(equation, middle + ZERO_C) < pressurePa) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}
