import type { FilmRange } from '../../models/cure/heat/film-range.ts';
import { DomainError } from '../../models/errors.ts';
import type { ThicknessQuery } from '../contract/thickness.ts';
import type { ThicknessSensor } from './thickness-sensors.ts';

/** What one face of a part is supposed to meet. */
export type FaceChoice =
  /** Read at the laminate's own surface. */
  | { readonly meets: 'thermocouple'; readonly channel: string }
  /** Read at the far face of the tool. */
  | { readonly meets: 'tool-thermocouple'; readonly channel: string }
  | { readonly meets: 'air'; readonly channel: string; readonly filmWM2K: number }
  | { readonly meets: 'insulation' };

export interface FacesChoice {
  readonly bag: FaceChoice;
  readonly tool: FaceChoice;
  readonly name: string;
}

export interface FacesKnown {
  readonly sensors: readonly ThicknessSensor[];
  readonly query: ThicknessQuery;
  /** Of the vessel's air; null where none carries the heat. */
  readonly films: FilmRange | null;
  /** Whether thickness and material of the tool are on record. */
  readonly hasTool: boolean;
}

/**
 * Every pair of faces to be worked out: one where both sides are known, else the suppositions that bound it.
 *
 * A side is known where the load's words for a place name it, or where the person asking does.
 */
export function chooseFaces(known: FacesKnown): FacesChoice[] {
  const [bags, tools, unnamed] = [facesOn('bag', known), facesOn('tool', known), unnamedFaces(known)];
  const far = (side: 'bag' | 'tool', near: FaceChoice) => farFaces(side, near, unnamed, known);
  const [only] = unnamed;
  let pairs: FacesChoice[];
  if (bags.length > 0 && tools.length > 0) pairs = crossed(bags, tools);
  else if (bags.length > 0) pairs = bags.flatMap((bag) => crossed([bag], far('tool', bag)));
  else if (tools.length > 0) pairs = tools.flatMap((tool) => crossed(far('bag', tool), [tool]));
  else if (unnamed.length > 1) pairs = unnamed.flatMap((face) => crossed([face], [face]));
  else if (only !== undefined) pairs = [...crossed([only], far('tool', only)), ...crossed(far('bag', only), [only])];
  else throw noThermocouple(known.sensors);
  return pairs.filter(({ name }, n) => pairs.findIndex((other) => other.name === name) === n);
}

/** Faces of a side: the one asked for, else those whose place names the side. */
function facesOn(side: 'bag' | 'tool', { sensors, query, films }: FacesKnown): FaceChoice[] {
  const channel = query[side];
  if (channel === undefined)
    return extremes(sensors.filter((one) => isFree(one, query) && one.side === side)).map(readAt);
  const sensor = sensors.find((one) => one.channel === channel);
  if (sensor === undefined) {
    const names = sensors.map((one) => one.channel).join(', ');
    throw new DomainError('channel-unknown', `The run has no temperature channel "${channel}"; it has ${names}`, {
      channel,
    });
  }
  if (sensor.role !== 'air') return [readAt(sensor)];
  return openFaces(sensor, films, side === 'bag' ? query.bagFilm : query.toolFilm);
}

function unnamedFaces({ sensors, query }: FacesKnown): FaceChoice[] {
  return extremes(sensors.filter((one) => isFree(one, query) && one.side === 'surface')).map(readAt);
}

function isFree({ channel, against }: ThicknessSensor, query: ThicknessQuery): boolean {
  return against === null && channel !== query.bag && channel !== query.tool;
}

/** Of more than two the coldest and the hottest on average: the others lie between. */
function extremes(sensors: readonly ThicknessSensor[]): ThicknessSensor[] {
  const there = sensors.filter(({ meanC }) => !Number.isNaN(meanC)).sort((a, b) => a.meanC - b.meanC);
  const [first, last] = [there[0], there.at(-1)];
  return first === undefined || last === undefined || first === last ? there : [first, last];
}

function readAt({ channel, role }: ThicknessSensor): FaceChoice {
  return { meets: role === 'tool' ? 'tool-thermocouple' : 'thermocouple', channel };
}

function openFaces({ channel }: ThicknessSensor, films: FilmRange | null, film: number | undefined): FaceChoice[] {
  if (film !== undefined) return [{ meets: 'air', channel, filmWM2K: film }];
  if (films !== null) return [films.least, films.most].map((filmWM2K) => ({ meets: 'air', channel, filmWM2K }));
  throw new DomainError(
    'record-missing',
    'How well the air of this vessel gives its heat is not known; name a film coefficient in W/(m² K)',
    { record: 'film', channel },
  );
}

/** What the other side may meet: a thermocouple without a side, the air, or what bounds it where neither is there. */
function farFaces(
  side: 'bag' | 'tool',
  near: FaceChoice,
  unnamed: readonly FaceChoice[],
  { sensors, query, films, hasTool }: FacesKnown,
): readonly FaceChoice[] {
  const others = unnamed.filter((face) => channelOf(face) !== channelOf(near));
  if (others.length > 0) return others;
  const film = side === 'bag' ? query.bagFilm : query.toolFilm;
  const air = sensors.find(({ role }) => role === 'air');
  if (air !== undefined && (films !== null || film !== undefined) && (side === 'bag' || hasTool)) {
    return openFaces(air, films, film);
  }
  return [{ meets: 'thermocouple', channel: channelOf(near) ?? '' }, { meets: 'insulation' }];
}

function channelOf(face: FaceChoice): string | null {
  return face.meets === 'insulation' ? null : face.channel;
}

function crossed(bags: readonly FaceChoice[], tools: readonly FaceChoice[]): FacesChoice[] {
  return bags.flatMap((bag) => tools.map((tool) => ({ bag, tool, name: nameOf(bag, tool) })));
}

function nameOf(bag: FaceChoice, tool: FaceChoice): string {
  const isSame = bag.meets === 'thermocouple' && tool.meets === 'thermocouple' && bag.channel === tool.channel;
  if (isSame) return `${bag.channel} on both faces`;
  return `${wordsOf(bag)} on the bag side, ${wordsOf(tool)} on the tool side`;
}

function wordsOf(face: FaceChoice): string {
  if (face.meets === 'insulation') return 'no heat passing';
  if (face.meets === 'tool-thermocouple') return `${face.channel} under the tool`;
  return face.meets === 'air' ? `air (${face.channel}) at ${face.filmWM2K} W/(m² K)` : face.channel;
}

function noThermocouple(sensors: readonly ThicknessSensor[]): DomainError {
  const excluded = sensors.filter(({ against }) => against === 'excluded').map(({ channel }) => channel);
  const because = excluded.length === 0 ? '' : ` (${excluded.join(', ')} excluded)`;
  return new DomainError(
    'record-missing',
    `No thermocouple on a surface of this part is on record${because}; put one to the part in the load, or choose what its two sides meet`,
    { record: 'thermocouple' },
  );
}
