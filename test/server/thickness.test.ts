import { describe, expect, it } from 'vitest';
import { readReference, recalledResin } from '../reference/cure/reference-sets.ts';
import { type LiveApp, liveApp } from './live-app.ts';
import { bringInResin, type MadeChannel, recordMade } from './made-thickness.ts';

// Source: test/reference/cure/thermal.json (SciPy Radau on 401 nodes, extrapolated).
type Row = Record<string, number>;
const reference = readReference<{
  air_vertices_s_C: [number, number][];
  cases: Record<
    '5mm' | '25mm',
    { peak_anywhere: { t_s: number; T_C: number; x_from_tool_m: number }; richardson: Row[] }
  >;
  checks: { thick_glass_polyester_fixed_faces: { rows: Row[]; face_vertices_s_C: [number, number][] } };
}>('thermal.json');

const AIR: MadeChannel = { name: 'AIR', role: 'air', corners: reference.air_vertices_s_C };
const EPOXY = {
  name: 'carbon/epoxy of the reference case',
  densityKgM3: 1580,
  specificHeatJKgK: 1080,
  conductivityWMK: 0.65,
  resinDensityKgM3: 1300,
  source: 'the reference case',
};
const INVAR = { name: 'Invar', densityKgM3: 8150, specificHeatJKgK: 515, conductivityWMK: 11, source: 'the case' };
const HEAT = { heatOfReaction: 540_000, basis: 'resin' } as const;
const LAYUP = { tool: 'T-25', thicknessMm: 25, fibreFraction: 0.573, laminate: EPOXY };

async function withRecords(app: LiveApp, layup: object = LAYUP): Promise<void> {
  const tool = await app.post('/api/tools/T-25', { title: 'Flat mould', thicknessMm: 10, material: INVAR });
  expect(tool.status, tool.text).toBe(201);
  const laid = await app.post('/api/parts/SR-0501/layup', layup);
  expect(laid.status, laid.text).toBe(201);
}

const thickness = (app: LiveApp, run: number, query: string) =>
  app.get(`/api/parts/SR-0501/runs/${run}/thickness?${query}`);

describe('a part between two films of air', () => {
  it.each(['25mm', '5mm'] as const)('%s: peak, place and degree as the reference has them', async (name) => {
    const app = await liveApp();
    const run = await recordMade(app, [AIR]);
    const thicknessMm = name === '25mm' ? 25 : 5;
    await withRecords(app, { ...LAYUP, thicknessMm });
    const resin = await bringInResin(app, recalledResin('hubert_8552'), HEAT);
    const { status, body, text } = await thickness(app, run, `resin=${resin}&bag=AIR&tool=AIR&bagFilm=80&toolFilm=50`);
    expect(status, text).toBe(200);
    const [only] = body.cases;
    const { peak_anywhere: peak, richardson } = reference.cases[name];
    expect(body.cases).toHaveLength(1);
    expect(Math.abs(only.peak.temperatureC - peak.T_C)).toBeLessThan(0.05);
    expect(Math.abs((Date.parse(only.peak.at) - Date.parse(body.from)) / 1000 - peak.t_s)).toBeLessThan(15);
    expect(Math.abs(thicknessMm - only.peak.depthMm - 1000 * peak.x_from_tool_m)).toBeLessThan(0.3);
    const last = richardson.at(-1);
    expect(last?.t_s ?? 18_000).toBe(18_000);
    expect(Math.abs(only.degree[0] - (last?.a_bag ?? 0))).toBeLessThan(1e-3);
    expect(Math.abs(only.middle.degree - (last?.a_mid ?? 0))).toBeLessThan(1e-3);
    expect(Math.abs(only.degree.at(-1) - (last?.a_tool ?? 0))).toBeLessThan(1e-3);
  });
});

describe('a part between two thermocouples', () => {
  it('is as the reference has it, and the thermocouples’ sides may be named by their places', async () => {
    const { rows, face_vertices_s_C: corners } = reference.checks.thick_glass_polyester_fixed_faces;
    const app = await liveApp();
    const run = await recordMade(app, [
      { name: 'TC1', role: 'part', corners, place: 'bag side, root' },
      { name: 'TC2', role: 'part', corners, place: 'tool side, root' },
    ]);
    await withRecords(app, {
      thicknessMm: 25.4,
      laminate: {
        ...EPOXY,
        densityKgM3: 1890,
        specificHeatJKgK: 1260,
        conductivityWMK: 0.2163,
        resinDensityKgM3: null,
      },
    });
    const set = recalledResin('bogetti_polyester');
    const resin = await bringInResin(app, set, { heatOfReaction: 77_500, basis: 'composite' });
    const { status, body, text } = await thickness(app, run, `resin=${resin}`);
    expect(status, text).toBe(200);
    expect(body.cases.map(({ name }: never) => name)).toEqual(['TC1 on the bag side, TC2 on the tool side']);
    const [only] = body.cases;
    const last = rows.at(-1);
    expect(last?.t_s).toBe(7200);
    expect(Math.abs(only.middle.degree - (last?.a_mid ?? 0))).toBeLessThan(1e-3);
    expect(Math.abs(only.middleC.at(-1) - (last?.T_mid ?? 0))).toBeLessThan(0.05);
    expect(body.assumptions.join(' ')).toContain('77.50 kJ for each kg of laminate');
  });
});

const PLATEAU: [number, number][] = [
  [0, 20],
  [3600, 120],
  [14_400, 120],
];
const cooler = PLATEAU.map(([s, c]): [number, number] => [s, c - 0.15 * (c - 20)]);

async function askedOf(channels: readonly MadeChannel[], layup: object = LAYUP, query = '', load = {}) {
  const app = await liveApp();
  const run = await recordMade(app, channels, { load });
  await withRecords(app, layup);
  const resin = await bringInResin(app, recalledResin('hubert_8552'), HEAT);
  const answer = await thickness(app, run, `resin=${resin}${query}`);
  return { app, run, answer, body: answer.body };
}

describe('a part whose thermocouples’ sides nobody named', () => {
  it('lies between each of them on both faces; the range is told', async () => {
    const { answer, body } = await askedOf([
      { name: 'TC1', role: 'part', corners: PLATEAU, place: 'lead' },
      { name: 'TC2', role: 'part', corners: cooler, place: 'lag' },
    ]);
    expect(answer.status, answer.text).toBe(200);
    expect(body.cases.map(({ name }: never) => name)).toEqual(['TC2 on both faces', 'TC1 on both faces']);
    const [cold, hot] = body.cases;
    expect(body.peakC).toEqual([cold.peak.temperatureC, hot.peak.temperatureC]);
    expect(body.middleDegree).toEqual([cold.middle.degree, hot.middle.degree]);
    expect(cold.middle.degree).toBeLessThan(hot.middle.degree);
    expect(body.assumptions[0]).toContain('does not say on which side TC1, TC2 lie');
  });
});

describe('what a thick part does', () => {
  const TC: MadeChannel = { name: 'TC1', role: 'part', corners: reference.air_vertices_s_C };
  const sides = '&bag=TC1&tool=TC1';

  it('lags behind its surface and overshoots it, by more the thicker it is', async () => {
    const thick = (await askedOf([TC], LAYUP, sides)).body.cases[0];
    const thin = (await askedOf([TC], { ...LAYUP, thicknessMm: 4 }, sides)).body.cases[0];
    expect(thick.overshootC).toBeGreaterThan(15);
    expect(thin.overshootC).toBeLessThan(4);
    // Conduction alone: the middle lags by rate × L² / (8 k/(ρ c)): Carslaw & Jaeger, Conduction of Heat in Solids, §3.3.
    // The few per cent that react on the way take a little off it.
    for (const [lagC, thicknessM] of [
      [thick.lagC, 0.025],
      [thin.lagC, 0.004],
    ]) {
      const conductionK = ((90 / 2700) * thicknessM ** 2 * 1580 * 1080) / (8 * 0.65);
      expect(lagC).toBeLessThan(conductionK + 0.01);
      expect(lagC).toBeGreaterThan(0.97 * conductionK);
    }
    // With equal faces the middle is the hottest and the most cured.
    expect(Math.abs(thick.peak.depthMm - 12.5)).toBeLessThan(0.4);
    expect(thick.most.depthMm).toBeCloseTo(12.5, 6);
    expect(thick.least.depthMm === 0 || thick.least.depthMm === 25).toBe(true);
  });

  it('takes its start from the load where the load says one', async () => {
    const load = { parts: [{ part: 'SR-0501', startDegree: 0.2 }] };
    const { body } = await askedOf([TC], LAYUP, sides, load);
    expect(body.startDegree).toEqual({ degree: 0.2, from: 'load' });
    const cold = await askedOf([TC], LAYUP, sides);
    expect(cold.body.startDegree).toEqual({ degree: recalledResin('hubert_8552').initialDegree, from: 'resin' });
    expect(body.peakC[0]).toBeLessThan(cold.body.peakC[0]);
  });
});

describe('what the answer cannot be given without', () => {
  it('is named, with what to do', async () => {
    const app = await liveApp();
    const run = await recordMade(app, [{ name: 'TC1', role: 'part', corners: PLATEAU }, AIR]);
    const refusal = async (query = '') => {
      const { status, body } = await thickness(app, run, query);
      return [status, body.type, body.facts?.record, body.detail];
    };
    const lay = (layup: object) => app.post('/api/parts/SR-0501/layup', { ...layup, reason: 'more is known now' });
    const missing = '/problems/record-missing';
    expect(await refusal()).toEqual([409, missing, 'lay-up', expect.stringContaining('write its lay-up down')]);
    await lay({ plies: 100 });
    expect(await refusal()).toEqual([409, missing, 'thickness', expect.stringContaining('thickness of part SR-0501')]);
    await lay({ thicknessMm: 25 });
    expect(await refusal()).toEqual([409, missing, 'laminate', expect.stringContaining('choose a laminate')]);
    await lay({ ...LAYUP, fibreFraction: null });
    expect(await refusal()).toEqual([409, missing, 'resin', expect.stringContaining('names no resin set')]);
    const { glassTransition: _tg, ...bare } = recalledResin('hubert_8552');
    await bringInResin(app, { ...bare, code: 'no-heat' }, undefined);
    expect(await refusal('resin=no-heat')).toEqual([
      409,
      missing,
      'resin',
      expect.stringContaining('no heat of reaction'),
    ]);
    await bringInResin(app, { ...bare, code: 'set' }, HEAT);
    expect(await refusal('resin=set')).toEqual([409, missing, 'laminate', expect.stringContaining('fibre fraction')]);
    await lay(LAYUP);
    expect(await refusal('resin=set&bag=TC1&tool=AIR')).toEqual([
      409,
      missing,
      'tool',
      expect.stringContaining('tool T-25'),
    ]);
    expect((await thickness(app, run, 'resin=set')).body.cases).toHaveLength(4);
    expect((await refusal('resin=set&bag=TC7')).slice(0, 2)).toEqual([422, '/problems/channel-unknown']);
    expect((await refusal('resin=nobody')).slice(0, 2)).toEqual([404, '/problems/not-found']);
    expect((await app.get(`/api/parts/SR-0502/runs/${run}/thickness`)).body.type).toBe('/problems/part-unknown');
    await app.post('/api/tools/T-25', { thicknessMm: 10, material: INVAR });
    expect((await thickness(app, run, 'resin=set&bag=TC1&tool=AIR')).body.cases).toHaveLength(2);
  });

  it('is a thermocouple on its surface', async () => {
    const { answer, body } = await askedOf([AIR]);
    expect(answer.status).toBe(409);
    expect(body).toMatchObject({ type: '/problems/record-missing', facts: { record: 'thermocouple' } });
  });
});

describe('a hole in the readings', () => {
  it('is bridged and said, and what was reached cannot be told', async () => {
    const app = await liveApp();
    const corners: [number, number][] = [...PLATEAU.slice(0, 2), [5400, 120], [5460, Number.NaN], [9000, Number.NaN]];
    const TC: MadeChannel = { name: 'TC1', role: 'part', corners: [...corners, [9060, 120], [14_400, 120]] };
    const run = await recordMade(app, [TC, AIR]);
    await withRecords(app);
    const resin = await bringInResin(app, recalledResin('hubert_8552'), HEAT);
    const { body } = await thickness(app, run, `resin=${resin}&bag=TC1&tool=TC1`);
    expect(body.assumptions.join(' ')).toContain('TC1 has no reading for 62 min');
  });
});

describe('the answer', () => {
  it('is worked out once while nothing it stands on changes', async () => {
    let asked = 0;
    const { throughPart } = await import('../../models/cure/heat/through-part.ts');
    const app = await liveApp({
      cureThroughPart: async (question) => {
        asked += 1;
        return throughPart(question);
      },
    });
    const run = await recordMade(app, [{ name: 'TC1', role: 'part', corners: PLATEAU }]);
    await withRecords(app);
    const resin = await bringInResin(app, recalledResin('hubert_8552'), HEAT);
    const first = await thickness(app, run, `resin=${resin}`);
    expect((await thickness(app, run, `resin=${resin}`)).body).toEqual(first.body);
    expect(asked).toBe(1);
    await app.post('/api/parts/SR-0501/layup', { ...LAYUP, thicknessMm: 20, reason: 'measured again' });
    expect((await thickness(app, run, `resin=${resin}`)).body.peakC).not.toEqual(first.body.peakC);
    expect(asked).toBe(2);
  });
});
