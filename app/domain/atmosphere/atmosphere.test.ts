import { expect, test } from 'vitest';
import atmosphere from '#tests/reference/atmosphere.json' with { type: 'json' };
import leakRates from '#tests/reference/leak-rate.json' with { type: 'json' };
import water from '#tests/reference/water.json' with { type: 'json' };
import { annualizingRate, gramsLostPerYear, rollingAverageRate } from '../leak-rate/leak-rate.ts';
import { waterVapourPa } from '../water/vapour-pressure.ts';
import { airPressurePa } from './atmosphere.ts';

/** US Standard Atmosphere 1976, as tabled in tests/reference/atmosphere.json. */
test.each(atmosphere.rows.map((row) => [row.altitude_m, row.p_Pa]))('air at %s m', (altitude, pascals) => {
  expect(airPressurePa(altitude as number)).toBeCloseTo(pascals as number, 0);
});

/** IAPWS, as tabled in tests/reference/water.json, confirmed there against two libraries. */
test.each(water.rows.map((row) => [row.T_C, row.p_Pa]))('water at %s °C', (temperature, pascals) => {
  expect(waterVapourPa(temperature as number) / (pascals as number)).toBeCloseTo(1, 4);
});

/** 40 CFR 82.152, worked examples of tests/reference/leak-rate.json. */
test.each(leakRates.examples_annualizing)('annualizing: $by_hand', (row) => {
  expect(annualizingRate(row.added_lb, row.full_charge_lb, row.days_since_last_addition)).toBeCloseTo(
    row.leak_rate_percent_per_year,
    5,
  );
});
test.each(leakRates.examples_rolling_average)('rolling average: $by_hand', (row) => {
  expect(rollingAverageRate(row.additions_lb_in_window, row.full_charge_lb)).toBeCloseTo(
    row.leak_rate_percent_per_year,
    5,
  );
});
test.each(leakRates.mobile_examples)('$lost_g g in $days days', (row) => {
  expect(gramsLostPerYear(row.lost_g, row.days)).toBeCloseTo(row.g_per_year, 6);
});
