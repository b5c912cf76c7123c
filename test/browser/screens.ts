/** Every screen there is, each with an address where it has something to show. Runs by the case they were recorded from. */
export function screensOf(
  runs: ReadonlyMap<string, number>,
  waiting: number,
  live: { readonly run: number; readonly vessel: string },
): Readonly<Record<string, string>> {
  const run = (name: string) => {
    const number = runs.get(name);
    if (number === undefined) throw new Error(`no run was recorded from ${name}`);
    return `/runs/${number}`;
  };
  return {
    now: '/',
    'all-vessels': '/live',
    'run-live': `/runs/${live.run}`,
    vessel: `/vessels/${encodeURIComponent(live.vessel)}`,
    begin: `/vessels/${encodeURIComponent('Autoclave 1')}/begin`,
    'begin-loading': `/vessels/${encodeURIComponent('Oven 8')}/begin`,
    warnings: '/warnings',
    import: '/import',
    'import-file': `/imports/${waiting}`,
    runs: '/runs',
    'runs-filtered-to-nothing': '/runs?vessel=Autoclave+1&part=none',
    'run-conforms': run('sound'),
    'run-does-not-conform': run('short-for-the-lagging'),
    'run-to-decide': run('stuck'),
    'run-with-a-gap': run('gap-in-dwell'),
    'run-of-two-parts': run('mixed-load'),
    'run-with-a-dip': run('dip-forgiven'),
    'run-with-estimates': run('cure-estimates'),
    load: `${run('mixed-load')}/load`,
    'read-again': `${run('sound')}/sources/1`,
    parts: '/parts',
    part: `/parts/${encodeURIComponent('part of short-for-the-lagging')}`,
    layup: `/parts/${encodeURIComponent('part of sound')}/layup`,
    tools: '/tools',
    materials: '/materials',
    instruments: '/instruments',
    questions: '/ask',
    material: '/materials/tape',
    roll: '/rolls/K-17',
    'kit-out-of-life': '/kits/K-17-1',
    cycles: '/cycles',
    cycle: '/cycles/SR-180/B-sound',
    'cycle-import': '/cycles/import',
    resins: '/resins',
    resin: '/resins/skerry-180',
    recorders: '/recorders',
    recorder: `/recorders/${encodeURIComponent('recorder of sound')}`,
    audit: '/audit',
    workshop: '/workshop',
    find: '/find?code=SR',
    'no-such-run': '/runs/9999',
    nowhere: '/no/such/page',
  };
}

export const CASES = [
  'sound',
  'short-for-the-lagging',
  'stuck',
  'gap-in-dwell',
  'mixed-load',
  'dip-forgiven',
  'cure-estimates',
];

/** What the browser complains of on purpose: the run that is not there. */
export const EXPECTED_COMPLAINT = /status of 404 .*\/api\/runs\/9999/;
