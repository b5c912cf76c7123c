import { listOf, number, object, oneOf, type Read, refuse } from '../document.ts';
import type { Isoconversional, Kinetics } from './resin.ts';

const LAWS = [
  'nth-order',
  'autocatalytic',
  'kamal-sourour',
  'lee-loos-springer',
  'two-term',
  'isoconversional',
] as const;

const factor = number({ above: 0 });
const order = number({ above: 0, atMost: 60 });
const exponent = number({ atLeast: 0, atMost: 60 });

/** E in J/mol. Less than 5 kJ/mol is a figure in kJ or kcal; more than 1 MJ/mol breaks bonds that no resin has. */
const energy: Read<number> = (value, path) => {
  const E = number()(value, path);
  return E >= 5000 && E <= 1e6
    ? E
    : refuse(path, 'an activation energy in J/mol, 5000 to 1000000 (1 kJ/mol is 1000, 1 kcal/mol 4184)', value);
};

/** Reads `kinetics`: the law by its name, then its own keys and no others. */
export const readKinetics: Read<Kinetics> = object((fields) => {
  const law = fields.required('law', oneOf(LAWS));
  const A = (key: string) => fields.required(key, factor);
  const E = (key: string) => fields.required(key, energy);
  const m = (key: string) => fields.required(key, exponent);
  const n = (key: string) => fields.required(key, order);
  switch (law) {
    case 'nth-order':
      return { law, A: A('A'), E: E('E'), n: n('n') };
    case 'autocatalytic':
      return { law, A: A('A'), E: E('E'), m: m('m'), n: n('n') };
    case 'kamal-sourour':
      return { law, A1: A('A1'), E1: E('E1'), A2: A('A2'), E2: E('E2'), m: m('m'), n: n('n') };
    case 'lee-loos-springer': {
      const switchDegree = fields.required('switchDegree', number({ above: 0, below: 1 }));
      return {
        law,
        A1: A('A1'),
        E1: E('E1'),
        A2: fields.required('A2', number()),
        E2: E('E2'),
        A3: A('A3'),
        E3: E('E3'),
        B: fields.required('B', number({ above: switchDegree, atMost: 10 })),
        switchDegree,
      };
    }
    case 'two-term':
      return {
        law,
        A1: A('A1'),
        E1: E('E1'),
        m1: m('m1'),
        n1: n('n1'),
        A2: A('A2'),
        E2: E('E2'),
        m2: m('m2'),
        n2: n('n2'),
        D: fields.required('D', number({ above: 0, atMost: 1000 })),
        alphaC0: fields.required('alphaC0', number({ atLeast: -20, atMost: 20 })),
        alphaCT: fields.required('alphaCT', number({ atLeast: 0, atMost: 0.1 })),
      };
    case 'isoconversional': {
      const degree = fields.required('degree', listOf(number({ atLeast: 0, atMost: 1 }), { atLeast: 2 }));
      const table: Isoconversional = {
        law,
        degree,
        E: fields.required('E', listOf(energy, { atLeast: degree.length, atMost: degree.length })),
        lnAf: fields.required('lnAf', listOf(number(), { atLeast: degree.length, atMost: degree.length })),
      };
      for (let i = 1; i < degree.length; i += 1) {
        if (degree[i]! <= degree[i - 1]!) refuse(`${fields.pathOf('degree')}[${i}]`, 'rising degrees', degree[i]);
      }
      return table;
    }
  }
});
