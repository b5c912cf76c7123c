import type { TemperatureUnit } from '../../models/units.ts';
import { celsiusFromKelvin, temperatureFromCelsius } from '../../models/units.ts';
import { asWritten, figure, plain } from '../words/figures.ts';
import { scientific } from '../words/powers.ts';
import type { Trial } from '../words/trial.ts';
import { degreeWords, gelWords, isOpenInterval, minutesWords, outsideMinutes, tgWords } from '../words/trial-words.ts';
import { ResinStatusTag } from './resin-status-tag.tsx';
import { Wide } from './wide.tsx';

/** The figures of one set, or of two side by side: estimates, each by its own set. */
export function ProgrammeFigures({ trials, unit }: { trials: readonly Trial[]; unit: TemperatureUnit }) {
  const rows = ROWS.map(({ name, of }) => ({ name, cells: trials.map((trial) => of(trial, unit)) }));
  return (
    <Wide label="Figures of the cure tried">
      <table class="trial-figures">
        <caption>Estimated by the programme, not measured</caption>
        <thead>
          <tr>
            <th scope="col">Set</th>
            {trials.map(({ resin }, n) => (
              <th scope="col" class="figure-cell" key={resin.code}>
                {trials.length > 1 && `${'AB'[n]} `}
                {resin.code}
                <br />
                <ResinStatusTag status={resin.source.status} />
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {rows
            .filter(({ cells }) => cells.some((cell) => cell !== null))
            .map(({ name, cells }) => (
              <tr key={name}>
                <th scope="row">{name}</th>
                {cells.map((cell, n) => (
                  <td class="figure-cell" key={trials[n]?.resin.code}>
                    {cell ?? 'not in the set'}
                  </td>
                ))}
              </tr>
            ))}
        </tbody>
      </table>
    </Wide>
  );
}

/** Null where the set does not have what the row asks for; a row that no set has is left out. */
const ROWS: readonly { name: string; of: (trial: Trial, unit: TemperatureUnit) => string | null }[] = [
  { name: 'Degree at the start', of: ({ startDegree }) => asWritten(startDegree) },
  { name: 'Degree at the end', of: (trial) => atEnd(trial, degreeWords(trial)) },
  {
    name: 'Tg at the end',
    of: (trial, unit) => {
      const words = tgWords(trial, unit);
      return words === null ? null : atEnd(trial, words);
    },
  },
  {
    name: 'Gels after',
    of: (trial, unit) => {
      const { resin, cure, uncertainty } = trial;
      if (!resin.gel) return null;
      if (cure.gelS === null) return 'does not come';
      const open = isOpenInterval(uncertainty?.gelS) ? ', on one side of the interval not at all' : '';
      return `${gelWords(trial)}${open}, at ${temperatureAt(cure.gelS, trial, unit)}`;
    },
  },
  {
    name: 'Vitrifies after',
    of: (trial, unit) => {
      const { resin, cure } = trial;
      if (!resin.glassTransition) return null;
      if (cure.vitrifiesS === null) return 'does not come';
      return `${minutesWords(cure.vitrifiesS)}, at ${temperatureAt(cure.vitrifiesS, trial, unit)}`;
    },
  },
  {
    name: 'Law switches after',
    of: ({ resin, cure }) => {
      if (resin.kinetics.law !== 'lee-loos-springer') return null;
      return cure.switchesS === null ? 'does not come' : minutesWords(cure.switchesS);
    },
  },
  {
    name: 'Least viscosity',
    of: ({ cure }, unit) => {
      if (cure.viscosity === null) return null;
      const { viscosityPaS, timeS, temperatureK } = cure.viscosity.least;
      if (!Number.isFinite(viscosityPaS)) return 'its fit says nothing here';
      return `${scientific(viscosityPaS)} Pa s after ${minutesWords(timeS)}, at ${shown(temperatureK, unit)}`;
    },
  },
  {
    name: 'Flows',
    of: ({ resin, cure }) => {
      const limit = resin.viscosity?.flowsBelow;
      if (limit === undefined || cure.viscosity === null) return null;
      const { flows } = cure.viscosity;
      if (flows === null) return `never below ${asWritten(limit, 'Pa s')}`;
      return `${figure(flows.fromS / 60, '', 1)} to ${minutesWords(flows.untilS)}, below ${asWritten(limit, 'Pa s')}`;
    },
  },
  {
    name: 'Outside the range of its fit',
    of: ({ cure }) => {
      const minutes = outsideMinutes(cure);
      if (minutes === null) return null;
      const { below, above } = minutes;
      if (below + above === 0) return 'never';
      const parts = [below > 0 && `${figure(below, 'min')} below`, above > 0 && `${figure(above, 'min')} above`];
      return parts.filter(Boolean).join(', ');
    },
  },
];

/** The figure of a cure that stopped on its way is not one of the end. */
function atEnd({ cure }: Trial, words: string): string {
  return cure.stopped === null ? words : `${words} after ${minutesWords(cure.stopped.timeS)}, where it cannot go on`;
}

function temperatureAt(atS: number, { cure }: Trial, unit: TemperatureUnit): string {
  const after = cure.timeS.findIndex((s) => s >= atS);
  const [s1, k1] = [cure.timeS[after] ?? 0, cure.temperatureK[after] ?? Number.NaN];
  const [s0, k0] = [cure.timeS[after - 1] ?? s1, cure.temperatureK[after - 1] ?? k1];
  return shown(s1 === s0 ? k1 : k0 + ((k1 - k0) * (atS - s0)) / (s1 - s0), unit);
}

function shown(temperatureK: number, unit: TemperatureUnit): string {
  return `${plain(temperatureFromCelsius(celsiusFromKelvin(temperatureK), unit), 1)}\u00a0${unit}`;
}
