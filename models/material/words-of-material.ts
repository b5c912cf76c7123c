import { durationWords } from './ledger-order.ts';
import type { Material } from './material.ts';

/** What an issue of a material document says, and what it leaves to a default, as sentences. */
export function wordsOfMaterial(material: Material): { readonly rules: string[]; readonly defaults: string[] } {
  const { storage, out, tack, thaw, refreezing, equivalent, extension, ageing, units } = material;
  const degrees = (figure: number) => `${String(figure).replace('-', '−')} ${units.temperature}`;
  const days = (figure: number) => durationWords(figure * 1440);
  const least = storage.atLeast === undefined ? '' : `, and no colder than ${degrees(storage.atLeast)}`;
  const humid = out.humidityAtMost === undefined ? '' : ` and ${out.humidityAtMost} % RH`;
  const rules = [
    `Shelf life: ${days(storage.lifeDays)} from manufacture, kept at ${degrees(storage.atMost)} or colder${least}; never beyond the maker's own last day.`,
    `Out-life: ${days(out.lifeDays)} in a room of at most ${degrees(out.atMost)}${humid}.`,
  ];
  const defaults: string[] = [];
  const warm = storage.outAbove ?? storage.atMost;
  (storage.outAbove === undefined ? defaults : rules).push(`A freezer warmer than ${degrees(warm)} counts as out.`);
  if (thaw?.from === 'temperature') {
    rules.push(
      `Out-time begins when the material has warmed to ${degrees(thaw.above)}; at removal where nobody wrote that down.`,
    );
  } else {
    (thaw === undefined ? defaults : rules).push('Out-time begins as it leaves the freezer: thawing counts.');
  }
  if (tack !== undefined)
    rules.push(
      `Tack: ${days(tack.lifeDays)} out of the freezer from the opening of its wrapping to the end of lay-up.`,
    );
  if (refreezing === undefined) defaults.push('How often it may be re-frozen is not limited.');
  else
    rules.push(
      refreezing.atMost === 0 ? 'It may not be re-frozen.' : `It may be re-frozen ${refreezing.atMost} times.`,
    );
  if (equivalent === undefined) {
    defaults.push(
      `No rule for warmer rooms is approved: a minute is a minute up to ${degrees(out.atMost)}, and above it nothing can be told.`,
    );
  } else {
    const [basis, reach] =
      equivalent.rule === 'two-lives'
        ? [
            `${days(equivalent.lives[0][1])} at ${degrees(equivalent.lives[0][0])} are worth ${days(equivalent.lives[1][1])} at ${degrees(equivalent.lives[1][0])}`,
            equivalent.lives[1][0],
          ]
        : [`by Arrhenius with ${equivalent.E} J/mol`, equivalent.atMost];
    rules.push(
      `Equivalent time, approved by ${equivalent.approvedBy}: ${basis}; nothing is told above ${degrees(reach)}.`,
    );
    const colder = equivalent.colderCountsLess === true ? 'counts for less, by the same rule' : 'counts in full';
    (equivalent.colderCountsLess === undefined ? defaults : rules).push(
      `Time colder than ${degrees(out.atMost)} ${colder}.`,
    );
  }
  if (extension === undefined) defaults.push('It provides for no extension by re-test.');
  else
    rules.push(
      `May be extended ${extension.times === 1 ? 'once' : `${extension.times} times`} by a named authority, on ${extension.tests.join(', ')}.`,
    );
  if (ageing !== undefined) {
    rules.push(
      `Degree of cure: ${ageing.freshDegree} fresh, ${ageing.degreeAtOutLife} at the end of its out-life (${ageing.source}).`,
    );
  }
  return { rules, defaults };
}
