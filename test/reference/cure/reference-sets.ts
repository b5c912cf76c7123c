import { readFileSync } from 'node:fs';
import type { Kinetics, Resin } from '../../../models/cure/resin.ts';

/** Parameter sets and solutions computed outside this project; what they are and how exact stands in their `source`. */

interface ReferenceCase {
  history_s_C?: [number, number][];
  t_s: number[];
  alpha: number[];
  Tg_C: number[];
  events_s: { gel?: number; vitrification?: number; switch?: number };
  final_alpha: number;
  final_Tg_C: number;
}

interface ReferenceSet {
  params: { form: string; a0: number; a_gel: number; dib: { Tg0: number; Tginf: number; lam: number } } & Record<
    string,
    unknown
  >;
  cases: Record<string, ReferenceCase>;
}

const here = new URL('.', import.meta.url);

export function readReference<T>(name: string): T {
  return JSON.parse(readFileSync(new URL(name, here), 'utf8')) as T;
}

export const referenceSets = readReference<{ sets: Record<string, ReferenceSet> }>('kinetics.json').sets;

/** The resin document of a reference set: from memory, for tests only. */
export function recalledResin(name: string): Resin {
  const { params } = referenceSets[name]!;
  const p = params as unknown as Record<string, number>;
  return {
    format: 'dwellbook-resin/1',
    code: name,
    name,
    source: { citation: 'reference set', status: 'recalled' },
    initialDegree: params.a0,
    gasConstant: 8.314462618,
    kinetics: kineticsOf(params.form, p),
    ...(params.form === 'autocat_diff'
      ? { diffusion: { law: 'logistic', C: p.C!, alphaC0: p.aC0!, alphaCT: p.aCT! } }
      : {}),
    glassTransition: { law: 'dibenedetto', tg0C: params.dib.Tg0, tgInfC: params.dib.Tginf, lambda: params.dib.lam },
    gel: { degree: params.a_gel },
  };
}

/** [times in s, temperatures in K] of a case. The noisy trace is the one its `trace` formula describes. */
export function historyOf(set: string, name: string): [Float64Array, Float64Array] {
  if (name === 'noisy_two_dwell_1Hz') return noisyTwoDwell(set);
  const vertices = referenceSets[set]!.cases[name]!.history_s_C!;
  return [Float64Array.from(vertices, ([s]) => s), Float64Array.from(vertices, ([, c]) => c + 273.15)];
}

function noisyTwoDwell(set: string): [Float64Array, Float64Array] {
  const vertices = referenceSets[set]!.cases.two_dwell!.history_s_C!;
  const timeS = Float64Array.from({ length: 18001 }, (_, i) => i);
  const turn = 2 * Math.PI;
  const temperatureK = timeS.map(
    (i) =>
      straightLine(vertices, i) +
      273.15 +
      0.8 * Math.sin((turn * i) / 97) +
      0.45 * Math.sin((turn * i) / 23 + 1) +
      0.25 * Math.sin((turn * i) / 7.3 + 2),
  );
  return [timeS, temperatureK];
}

function straightLine(vertices: [number, number][], atS: number): number {
  const next = Math.max(
    1,
    vertices.findIndex(([s]) => s >= atS),
  );
  const [[s0, c0], [s1, c1]] = [vertices[next - 1]!, vertices[next]!];
  return c0 + ((c1 - c0) * (atS - s0)) / (s1 - s0);
}

function kineticsOf(form: string, p: Record<string, number>): Kinetics {
  switch (form) {
    case 'nth':
      return { law: 'nth-order', A: p.A!, E: p.E!, n: p.n! };
    case 'autocat':
    case 'autocat_diff':
      return { law: 'autocatalytic', A: p.A!, E: p.E!, m: p.m!, n: p.n! };
    case 'kamal':
      return { law: 'kamal-sourour', A1: p.A1!, E1: p.E1!, A2: p.A2!, E2: p.E2!, m: p.m!, n: p.n! };
    case 'piecewise_lls':
      return {
        law: 'lee-loos-springer',
        A1: p.A1!,
        E1: p.E1!,
        A2: p.A2!,
        E2: p.E2!,
        A3: p.A3!,
        E3: p.E3!,
        B: p.B!,
        switchDegree: p.a_switch!,
      };
    case 'two_term_diff':
      return {
        law: 'two-term',
        A1: p.A1!,
        E1: p.E1!,
        m1: p.m1!,
        n1: p.n1!,
        A2: p.A2!,
        E2: p.E2!,
        m2: p.m2!,
        n2: p.n2!,
        D: p.D!,
        alphaC0: p.aC0!,
        alphaCT: p.aCT!,
      };
    default:
      throw new Error(`no law for ${form}`);
  }
}
