import type { ChargeWindow } from '../charge/charge-window.ts';

export type Side = 'low' | 'usual' | 'high';
export type RunningReading = {
  low: Side;
  high: Side;
  meanings: { name: string; reason: string; next: string }[];
};

function sideOf(pressurePa: number, [from, to]: readonly [number, number]): Side {
  if (pressurePa < from) return 'low';
  return pressurePa > to ? 'high' : 'usual';
}

/** What the pair of running pressures usually means, the likeliest first. Common practice, no source. */
const MEANINGS: Record<`${Side} ${Side}`, RunningReading['meanings']> = {
  'low low': [
    {
      name: 'Low charge',
      reason: 'Too little liquid reaches the valve, and little heat is thrown out.',
      next: 'Standing pressure, then look for the leak: do not top up.',
    },
    {
      name: 'Restriction before the valve',
      reason: 'Liquid is held back.',
      next: 'Feel along the liquid line and the drier for a cold spot.',
    },
  ],
  'low usual': [
    {
      name: 'Restriction, or the valve shut too far',
      reason: 'The low side starves while the high side holds.',
      next: 'Frost or a cold spot at drier or valve.',
    },
    {
      name: 'Poor airflow over the evaporator',
      reason: 'Little heat comes in.',
      next: 'Cab filter, blower, ice on the coil.',
    },
  ],
  'low high': [
    {
      name: 'Restriction on the high side',
      reason: 'Pressure stands before it and is missing after it.',
      next: 'Temperature along the liquid line and across the drier.',
    },
  ],
  'usual low': [
    {
      name: 'Cool day, or a compressor that pumps little',
      reason: 'The high side is not reached.',
      next: 'Engine speed, clutch slip, air outside.',
    },
  ],
  'usual usual': [
    {
      name: 'Within the window',
      reason: 'Both sides fit the air outside.',
      next: 'If it blows warm all the same: air doors, heater valve.',
    },
  ],
  'usual high': [
    {
      name: 'Poor airflow over the condenser',
      reason: 'Heat is not carried away.',
      next: 'Fan, fins, oil cooler in front, air seals.',
    },
    {
      name: 'Air in the circuit',
      reason: 'Air does not condense and adds its own pressure.',
      next: 'Standing pressure against the temperature.',
    },
  ],
  'high low': [
    {
      name: 'Weak compressor',
      reason: 'It does not part the two sides.',
      next: 'Does the needle shake? Belt, clutch, valves of the compressor.',
    },
    {
      name: 'Valve stuck open',
      reason: 'Liquid runs through to the low side.',
      next: 'Frost back to the compressor.',
    },
  ],
  'high usual': [
    {
      name: 'Valve open too far',
      reason: 'The evaporator is flooded.',
      next: 'Is the bulb clamped and wrapped? Frost on the suction line.',
    },
  ],
  'high high': [
    {
      name: 'Too much charge',
      reason: 'Liquid fills the condenser.',
      next: 'Recover, weigh, charge by weight.',
    },
    {
      name: 'Poor airflow over the condenser',
      reason: 'Heat is not carried away and backs up to the low side.',
      next: 'Fan, fins, air seals.',
    },
    {
      name: 'Air in the circuit',
      reason: 'Air adds its own pressure on both sides.',
      next: 'Standing pressure against the temperature.',
    },
  ],
};

/** The pair of running gauge pressures in Pa against the day's window. */
export function readRunning(lowPa: number, highPa: number, window: ChargeWindow): RunningReading {
  const low = sideOf(lowPa, window.lowPa);
  const high = sideOf(highPa, window.highPa);
  return { low, high, meanings: MEANINGS[`${low} ${high}`] };
}
