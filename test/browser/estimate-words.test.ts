import { describe, expect, it } from 'vitest';
import type { CureEstimate } from '../../models/evaluation/evaluation.ts';
import { degreeWords, gelWords, intervalSentences, tgWords } from '../../web/words/estimates.ts';

const estimate: CureEstimate = {
  channel: 'TC1',
  degree: 0.9133,
  tgC: 172.4,
  gelAt: '2026-03-02T10:46:10.000Z',
  vitrifiesAt: null,
  degreeInterval: [0.9013, 0.9253],
  tgIntervalC: [169.3, 175.5],
  gelInterval: ['2026-03-02T10:44:10.000Z', '2026-03-02T10:48:10.000Z'],
};
const unknown: CureEstimate = {
  ...estimate,
  ...{ channel: 'TC3', degreeInterval: null, tgIntervalC: null, gelInterval: null },
};

describe('an estimate in words', () => {
  it('bears its expanded uncertainty, in the unit of whoever looks', () => {
    expect(degreeWords(estimate)).toBe('0.913 ± 0.012');
    expect(tgWords(estimate, '°C')).toBe('172 ± 3');
    // 172.4 °C is 342.3 °F, and 3.1 °C of difference 5.6 °F.
    expect(tgWords(estimate, '°F')).toBe('342 ± 6');
    expect(gelWords(estimate, 'UTC')).toBe('10:46 ± 2.0 min');
  });

  it('never rounds an uncertainty away', () => {
    expect(degreeWords({ ...estimate, degreeInterval: [0.9131, 0.9135] })).toBe('0.9133 ± 0.0002');
    expect(tgWords({ ...estimate, tgIntervalC: [172, 172.8] }, '°C')).toBe('172.4 ± 0.4');
  });

  it('is the figure alone where none is known, and says for whom', () => {
    expect([degreeWords(unknown), tgWords(unknown, '°C'), gelWords(unknown, 'UTC')]).toEqual(['0.913', '172', '10:46']);
    expect(tgWords({ ...estimate, tgC: null, tgIntervalC: null }, '°C')).toBe('–');
    expect(gelWords({ ...estimate, gelAt: null, gelInterval: null }, 'UTC')).toBe('not seen');
    expect(intervalSentences([unknown], false)).toEqual(['No uncertainty of TC3 is on record, so no ± is given.']);
  });

  it('says what the ± is made of, and where gel may not have come', () => {
    expect(intervalSentences([estimate, unknown], false)[0]).toContain('the set gives no covariance of its constants');
    expect(intervalSentences([estimate], true)[0]).toContain('and the covariance of the set’s constants');
    expect(intervalSentences([{ ...estimate, gelInterval: null }], true)[1]).toBe(
      'Within its uncertainty TC1 may not have gelled by the log’s end.',
    );
  });

  it('says of a judgement from before there were intervals that it is one', () => {
    const { degreeInterval: _, ...old } = estimate;
    expect(intervalSentences([old], false)).toEqual([expect.stringContaining('judge the run again')]);
    expect(degreeWords(old)).toBe('0.913');
  });
});
