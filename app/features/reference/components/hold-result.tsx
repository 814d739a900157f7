import { LinePlot } from '#app/components/plots/line-plot.tsx';
import { Facts } from '#app/components/ui/panel.tsx';
import type { HoldAnalysis, HoldTest, HoldVerdict } from '#app/domain/hold-test/hold-test.ts';
import { gramsPerYear } from '#app/domain/refrigerant/saturation.ts';
import { fromSi, UNITS } from '#app/domain/units/units.ts';
import type { HoldGauge } from '../hold-input.ts';

export const HOLD_VERDICT_NAMES: Record<HoldVerdict, string> = {
  tight: 'Tight, as far as this gauge can show',
  moisture: 'Moisture',
  leak: 'A leak',
  'gross-leak': 'A gross leak',
  'cannot-tell': 'Cannot tell',
};

type Props = { test: HoldTest; analysis: HoldAnalysis; gauge: HoldGauge; refrigerant: string };

/** The hold curve: readings, the fitted line, the step that the gauge cannot resolve, and the verdict in words. */
export function HoldResult({ test, analysis, gauge, refrigerant }: Props) {
  const shown = (pascals: number) =>
    gauge === 'inHg' ? (analysis.deepestVacuumPa - pascals) / -UNITS.inHg.factor : fromSi(pascals, gauge);
  const samples = [...test.samples].sort((one, other) => one.minutes - other.minutes);
  const points = samples.map(({ minutes, pressurePa }) => ({ x: minutes, y: shown(pressurePa) }));
  const fitted = samples.map(({ minutes }, place) => ({ x: minutes, y: shown(analysis.fitted[place] ?? 0) }));
  const start = analysis.fitted[0] ?? 0;
  const leak = analysis.leakPaM3PerS;
  const grams = (throughput: number) =>
    `${roundedGrams(gramsPerYear(refrigerant, throughput))} g of ${refrigerant} a year`;
  return (
    <div className="space-y-5">
      <div className="border-l-4 border-line pl-4 data-[leak=true]:border-glow" data-leak={leak !== null}>
        <p className="text-xl font-semibold">{HOLD_VERDICT_NAMES[analysis.verdict]}</p>
        {analysis.reasons.map((reason) => (
          <p key={reason} className="max-w-prose">
            {reason}
          </p>
        ))}
      </div>
      <LinePlot
        title="Hold curve"
        description={`Readings as dots, the fitted line, and as a band the step that this gauge cannot resolve. Verdict: ${HOLD_VERDICT_NAMES[analysis.verdict].toLowerCase()}.`}
        xLabel="Minutes"
        yLabel={gauge === 'inHg' ? 'Vacuum, inHg' : `Pressure, ${UNITS[gauge].label}`}
        bands={[
          {
            name: 'step',
            fromY: shown(Math.max(start - test.resolutionPa / 2, 0)),
            toY: shown(start + test.resolutionPa / 2),
          },
        ]}
        curves={[
          { name: 'fit', look: 'main', points: fitted },
          { name: 'readings', look: 'dots', points },
        ]}
      />
      <Facts
        facts={[
          {
            label: 'Smallest leak this test could have seen',
            value: `about ${grams(analysis.smallestLeakPaM3PerS)}`,
          },
          {
            label: 'Leak read from the curve',
            value: leak
              ? `about ${grams(leak.estimate)} (${roundedGrams(gramsPerYear(refrigerant, leak.low))} to ${roundedGrams(gramsPerYear(refrigerant, leak.high))})`
              : '',
          },
          { label: 'As a throughput', value: leak ? `${leak.estimate.toExponential(2)} Pa·m³/s of air` : '' },
          {
            label: 'Deepest vacuum possible here',
            value: `${(analysis.deepestVacuumPa / -UNITS.inHg.factor).toFixed(1)} inHg`,
          },
        ]}
      />
      <p className="text-sm text-muted">
        Grams a year are the same molar flow as the air that came in under vacuum. At working pressure the
        same hole passes several times to tens of times more, so a vacuum alone never proves a small leak
        away. Method: pressure rise, Q = V·dp/dt.
      </p>
    </div>
  );
}

function roundedGrams(grams: number): string {
  const figures = Number(grams.toPrecision(2));
  return figures.toLocaleString('en-GB', { maximumFractionDigits: 2 });
}
