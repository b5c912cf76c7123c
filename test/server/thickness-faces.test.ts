import { describe, expect, it } from 'vitest';
import { filmRange } from '../../models/cure/heat/film-range.ts';
import { sideOfPlace } from '../../models/run/side-of-place.ts';
import { chooseFaces } from '../../server/actions/thickness-faces.ts';
import type { ThicknessSensor } from '../../server/actions/thickness-sensors.ts';

const OVEN = filmRange('oven', null);

function sensor(channel: string, changes: Partial<ThicknessSensor> = {}): ThicknessSensor {
  const readings = { timeMs: new Float64Array(2), value: new Float64Array(2) };
  return {
    channel,
    place: null,
    role: 'part',
    side: 'surface',
    isOwn: true,
    against: null,
    readings,
    meanC: 100,
    ...changes,
  };
}

const AIR = sensor('AIR', { role: 'air', side: null });
const names = (sensors: readonly ThicknessSensor[], query = {}, films = OVEN, hasTool = true) =>
  chooseFaces({ sensors, query, films, hasTool }).map(({ name }) => name);

describe('chooseFaces', () => {
  it('takes the two sides as the places name them', () => {
    const sensors = [sensor('TC1', { side: 'bag' }), sensor('TC2', { side: 'tool' }), AIR];
    expect(names(sensors)).toEqual(['TC1 on the bag side, TC2 on the tool side']);
  });

  it('bounds two thermocouples without a side by each of them on both faces', () => {
    expect(names([sensor('TC1'), sensor('TC2'), AIR])).toEqual(['TC1 on both faces', 'TC2 on both faces']);
  });

  it('takes of many the coldest and the hottest', () => {
    const sensors = [3, 1, 4, 2].map((n) => sensor(`TC${n}`, { meanC: n }));
    expect(names(sensors)).toEqual(['TC1 on both faces', 'TC4 on both faces']);
  });

  it('bounds a single thermocouple by air on either side, at the least and the greatest film of the vessel', () => {
    expect(names([sensor('TC1'), AIR])).toEqual([
      'TC1 on the bag side, air (AIR) at 5 W/(m² K) on the tool side',
      'TC1 on the bag side, air (AIR) at 40 W/(m² K) on the tool side',
      'air (AIR) at 5 W/(m² K) on the bag side, TC1 on the tool side',
      'air (AIR) at 40 W/(m² K) on the bag side, TC1 on the tool side',
    ]);
  });

  it('bounds the far side by the same temperature and by no heat where no air was logged or no tool is known', () => {
    const expected = ['TC1 on both faces', 'TC1 on the bag side, no heat passing on the tool side'];
    expect(names([sensor('TC1', { side: 'bag' })])).toEqual(expected);
    expect(names([sensor('TC1', { side: 'bag' }), AIR], {}, OVEN, false)).toEqual(expected);
    expect(names([sensor('TC1', { side: 'bag' }), AIR], {}, null)).toEqual(expected);
  });

  it('takes what the person asking says before what the places say', () => {
    const sensors = [sensor('TC1', { side: 'bag' }), sensor('TC2', { side: 'tool' }), sensor('TC3'), AIR];
    expect(names(sensors, { bag: 'TC3', tool: 'AIR', toolFilm: 25 })).toEqual([
      'TC3 on the bag side, air (AIR) at 25 W/(m² K) on the tool side',
    ]);
    expect(() => names(sensors, { bag: 'TC9' })).toThrow(expect.objectContaining({ code: 'channel-unknown' }));
    expect(() => names(sensors, { bag: 'AIR' }, null)).toThrow(expect.objectContaining({ code: 'record-missing' }));
  });

  it('uses no thermocouple that lies inside or was excluded, and refuses where none is left', () => {
    const sensors = [sensor('TC1', { side: 'inside' }), sensor('TC2', { against: 'excluded' }), AIR];
    expect(() => names(sensors)).toThrow(
      expect.objectContaining({ code: 'record-missing', message: expect.stringContaining('TC2 excluded') }),
    );
  });
});

describe('sideOfPlace', () => {
  it.each([
    ['bag side, root', 'part', 'bag'],
    ['Tool side', 'part', 'tool'],
    ['under the caul', 'part', 'bag'],
    ['embedded at ply 40', 'part', 'inside'],
    ['mid-plane', 'part', 'inside'],
    ['lag', 'part', 'surface'],
    ['middle', 'part', 'surface'],
    [null, 'part', 'surface'],
    [null, 'tool', 'tool'],
  ] as const)('%s of a %s thermocouple: %s', (place, role, side) => {
    expect(sideOfPlace(place, role)).toBe(side);
  });
});

describe('filmRange', () => {
  // Ranges: common practice, from memory; they are said to be so wherever they are used.
  it.each([
    ['oven', null, [5, 40]],
    ['autoclave', 0, [20, 60]],
    ['autoclave', 6.5, [60, 200]],
    ['autoclave', 3, [20, 200]],
    ['autoclave', null, [20, 200]],
  ] as const)('%s at %s bar', (vessel, gaugeBar, [least, most]) => {
    expect(filmRange(vessel, gaugeBar)).toMatchObject({ least, most });
  });

  it('is none where no air carries the heat', () => {
    expect(filmRange('press', null)).toBeNull();
    expect(filmRange('heat-blanket', 6)).toBeNull();
  });
});
