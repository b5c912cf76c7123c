import { type FilmRange, filmRange } from '../../models/cure/heat/film-range.ts';
import type { Face } from '../../models/cure/heat/layer.ts';
import type { PartBetweenFaces, ThroughPart } from '../../models/cure/heat/through-part.ts';
import type { Cycle } from '../../models/cycle/cycle.ts';
import { DomainError } from '../../models/errors.ts';
import type { Readings } from '../../models/log/readings.ts';
import { judgedChannels } from '../../models/run/channel.ts';
import { type CommonHistory, commonHistory } from '../../models/run/common-history.ts';
import type { Load } from '../../models/run/load.ts';
import { kelvinFromCelsius } from '../../models/units.ts';
import type { ThicknessQuery } from '../contract/thickness.ts';
import { chooseFaces, type FaceChoice, type FacesChoice } from './thickness-faces.ts';
import type { ThicknessRecords } from './thickness-records.ts';
import { type ThicknessSensor, thicknessSensors } from './thickness-sensors.ts';

/** Works out the cure through a part, without anything else waiting for it. */
export type CureThroughPart = (asked: PartBetweenFaces) => Promise<readonly ThroughPart[]>;

/** What is asked of the model for one part of a run, and what that rests on. */
export interface ThicknessAsked {
  readonly asked: PartBetweenFaces;
  readonly choices: readonly FacesChoice[];
  readonly query: ThicknessQuery;
  readonly sensors: readonly ThicknessSensor[];
  readonly history: CommonHistory;
  /** In the order of `history`. */
  readonly channels: readonly string[];
  readonly films: FilmRange | null;
  readonly startDegree: { readonly degree: number; readonly from: 'load' | 'resin' };
}

export interface ThicknessRun {
  readonly readings: Readings;
  readonly load: Load;
  readonly cycle: Cycle | null;
  /** Kind of the vessel; null where it is not on record. */
  readonly vessel: string | null;
  readonly excludedFromMs: ReadonlyMap<string, number>;
}

/** Puts readings, load and records together to what the model is asked. */
export function askThickness(
  run: ThicknessRun,
  part: string,
  records: ThicknessRecords,
  query: ThicknessQuery,
): ThicknessAsked {
  const sensors = thicknessSensors(run.readings, run.load, part, run.excludedFromMs);
  const films = run.vessel === null ? null : filmRange(run.vessel, medianGaugeBar(run));
  const choices = chooseFaces({ sensors, query, films, hasTool: records.tool !== null });
  const needsTool = ({ tool }: FacesChoice) => tool.meets === 'tool-thermocouple' || tool.meets === 'air';
  if (records.tool === null && choices.some(needsTool)) throw toolMissing(records.toolCode);
  const channels = [...new Set(choices.flatMap(({ bag, tool }) => [bag, tool]).flatMap(channelsOf))];
  const history = commonHistory(channels.map((channel) => sensorOf(sensors, channel).readings));
  if (history === null) {
    throw new DomainError('state-conflict', `${channels.join(', ')} have no stretch of readings in common`, { part });
  }
  const kelvin = history.values.map((values) => values.map(kelvinFromCelsius));
  const faceOf = (face: FaceChoice): Face => {
    if (face.meets === 'insulation') return { meets: 'insulation' };
    const temperatureK = kelvin[channels.indexOf(face.channel)] ?? new Float64Array(0);
    return face.meets === 'air'
      ? { meets: 'gas', coefficientWM2K: face.filmWM2K, gasK: temperatureK }
      : { meets: 'thermocouple', temperatureK };
  };
  const loaded = run.load.parts.find((one) => one.part === part)?.startDegree;
  const { document, laminate, tool } = records;
  const startDegree = loaded ?? document.initialDegree;
  return {
    asked: {
      laminate,
      tool,
      resin: document,
      startDegree,
      timeS: history.timeS,
      cases: choices.map((choice) => ({
        bag: faceOf(choice.bag),
        tool: faceOf(choice.tool),
        withTool: needsTool(choice),
      })),
    },
    choices,
    query,
    sensors,
    history,
    channels,
    films,
    startDegree: { degree: startDegree, from: loaded === undefined ? 'resin' : 'load' },
  };
}

function channelsOf(face: FaceChoice): string[] {
  return face.meets === 'insulation' ? [] : [face.channel];
}

function sensorOf(sensors: readonly ThicknessSensor[], channel: string): ThicknessSensor {
  const found = sensors.find((one) => one.channel === channel);
  if (found === undefined) throw new DomainError('channel-unknown', `There is no channel "${channel}"`, { channel });
  return found;
}

function toolMissing(code: string | null): DomainError {
  const what = code === null ? 'The tool of this part' : `Thickness and material of tool ${code}`;
  const todo = code === null ? 'name it in the lay-up' : 'write them down on its page';
  return new DomainError('record-missing', `${what} ${code === null ? 'is' : 'are'} not on record; ${todo}`, {
    record: 'tool',
    tool: code,
  });
}

/** Above the standard atmosphere where it was read absolute: for telling a pressed vessel from an open one. */
function medianGaugeBar({ readings, load }: ThicknessRun): number | null {
  const known = judgedChannels(
    readings.channels.map(({ channel }) => channel),
    load,
  );
  const n = known.findIndex((one) => one?.layout.role === 'pressure');
  const channel = known[n];
  if (!channel) return null;
  const zeroPa = channel.pressureUnit?.absolute === true ? 101_325 : 0;
  const figures = (readings.channels[n]?.value ?? new Float64Array(0)).filter((figure) => !Number.isNaN(figure)).sort();
  const middle = figures[Math.floor(figures.length / 2)];
  return middle === undefined ? null : (channel.judgedReading(middle) - zeroPa) / 1e5;
}
