import { LinePlot } from '#app/components/plots/line-plot.tsx';
import { Notice } from '#app/components/ui/notice.tsx';
import { Facts, Panel } from '#app/components/ui/panel.tsx';
import { COMMON_PRACTICE } from '#app/domain/charge/charge-window.ts';
import { fromSi, UNITS, type UnitId } from '#app/domain/units/units.ts';
import type { Spoken } from '../readings-speak.server.ts';

const STANDING_WORDS = {
  liquid: 'Liquid is still inside',
  vapour: 'Vapour only',
  empty: 'Empty',
  above: 'More than the day’s temperature explains',
} as const;

/** What the newest readings say together, each with what it rests on. */
export function SpokenReadings({ spoken, unit }: { spoken: Spoken; unit: UnitId }) {
  const { refrigerant, standing, running, ambientC, altitudeM } = spoken;
  if (refrigerant === null) return null;
  const figure = (pascals: number) => fromSi(pascals, unit).toFixed(unit === 'bar' ? 2 : 0);
  const span = ([from, to]: readonly [number, number]) =>
    `${figure(from)} to ${figure(to)} ${UNITS[unit].label}`;
  const kelvin = (value: number | null) => (value === null ? '' : `${value.toFixed(1)} K`);
  return (
    <Panel
      title="What the readings say"
      lead={`${refrigerant}, ${ambientC === null ? 'air outside not recorded' : `air outside ${ambientC.toFixed(0)} °C`}, ${altitudeM} m.`}
    >
      <div className="space-y-5">
        {standing === null && running === null && (
          <p className="text-muted">
            Add a standing pressure and the air outside, or both running pressures.
          </p>
        )}
        {standing && 'error' in standing && <p>{standing.error}</p>}
        {standing && 'verdict' in standing && (
          <Notice
            tone={standing.verdict === 'empty' ? 'info' : 'warn'}
            title={`Standing pressure: ${STANDING_WORDS[standing.verdict]}`}
          >
            <p>{standing.reason}</p>
            <p>
              With liquid inside, this gauge and thermometer would show {span(standing.expectedPa)}.
              {standing.verdict !== 'empty' &&
                ' Recover and weigh it before the circuit is opened or evacuated.'}
            </p>
          </Notice>
        )}
        {running && (
          <div className="space-y-3">
            {running.window && (
              <LinePlot
                title="Low against high side"
                description={`The published window at the day’s temperature as a box, and this pair: low ${running.reading?.low}, high ${running.reading?.high}.`}
                xLabel={`Low side, ${UNITS[unit].label}`}
                yLabel={`High side, ${UNITS[unit].label}`}
                curves={[{ name: 'origin', look: 'second', points: [{ x: 0, y: 0 }] }]}
                boxes={[
                  {
                    name: 'window',
                    x: [fromSi(running.window.lowPa[0], unit), fromSi(running.window.lowPa[1], unit)],
                    y: [fromSi(running.window.highPa[0], unit), fromSi(running.window.highPa[1], unit)],
                  },
                ]}
                marks={[
                  { name: 'this pair', x: fromSi(running.lowPa, unit), y: fromSi(running.highPa, unit) },
                ]}
              />
            )}
            {running.note && <p className="text-muted">Running pressures: {running.note}</p>}
            {running.reading && (
              <ol className="list-decimal space-y-2 pl-6">
                {running.reading.meanings.map(({ name, reason, next }) => (
                  <li key={name}>
                    <span className="font-semibold">{name}.</span> {reason} Check next: {next}
                  </li>
                ))}
              </ol>
            )}
            {running.window && (
              <p className="text-sm text-muted">
                Window: {running.window.source}. Meanings: common practice, no source. {COMMON_PRACTICE}
              </p>
            )}
          </div>
        )}
        <Facts
          columns={3}
          facts={[
            { label: 'Superheat', value: kelvin(spoken.superheatK) },
            { label: 'Subcooling', value: kelvin(spoken.subcoolingK) },
            { label: 'Vent against the air outside', value: ventWords(spoken.ventBelowAmbientK) },
          ]}
        />
      </div>
    </Panel>
  );
}

function ventWords(below: number | null): string {
  if (below === null) return '';
  return below >= 0 ? `${below.toFixed(1)} K colder` : `${(-below).toFixed(1)} K warmer`;
}
