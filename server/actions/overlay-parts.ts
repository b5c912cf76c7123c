import { longestGapMs } from '../../models/chart/longest-gap.ts';
import { type OverlaidCourse, overlayOf } from '../../models/chart/overlay.ts';
import type { Overlaid, OverlayEvent, OverlayQuery, OverlayStrip } from '../contract/comparison.ts';
import { type Db, readDatabase } from '../store/database.ts';
import { findLatestEvaluation } from '../store/evaluations.ts';
import { type ChosenPart, chooseParts } from './compared-parts.ts';
import { cureCourses } from './cure-courses.ts';
import { coursesOf, type JudgedCourse, type PartCure, ventMs } from './features-of-cure.ts';
import { gatherInputs } from './run-inputs.ts';

export interface OverlayAsked {
  readonly path: string;
  readonly at: string;
  readonly query: OverlayQuery;
}

export type OverlayParts = (asked: OverlayAsked) => Promise<Overlaid>;

/** More sound runs make the band no surer to the eye, and every one of them is read scan by scan. */
const MOST_SOUND = 200;
const PA_PER_BAR = 1e5;
const STRIPS = { coldest: '°C', vacuum: 'bar', pressure: 'bar', degree: '' } as const;

/** Failed and sound runs laid over each other by an event; reads the database for itself. */
export function overlayParts({ path, at, query }: OverlayAsked): Overlaid {
  return readDatabase(path, at, (db) => overlayIn(db, query));
}

function overlayIn(db: Db, query: OverlayQuery): Overlaid {
  const { parts, leftOut } = chooseParts(db, query);
  const allSound = parts.filter(({ failed }) => !failed);
  const sound = spread(allSound, MOST_SOUND);
  const drawn = [...parts.filter(({ failed }) => failed), ...sound];
  const unaligned: Overlaid['leftOut'] = [];
  const courses: Record<OverlayStrip['what'], OverlaidCourse[]> = { coldest: [], vacuum: [], pressure: [], degree: [] };
  for (const run of new Set(drawn.map((part) => part.run))) {
    const own = drawn.filter((part) => part.run === run);
    for (const { part, course } of coursesOfRun(db, run, own, query.event)) {
      if (course === null) {
        unaligned.push({ serial: part.serial, because: `${EVENT_WORDS[query.event]} is not on record in run ${run}` });
      } else for (const [what, one] of course) courses[what].push(one);
    }
  }
  return {
    event: query.event,
    failed: courses.coldest.filter(({ failed }) => failed).length,
    sound: courses.coldest.filter(({ failed }) => !failed).length,
    soundInScope: allSound.length,
    leftOut: [...leftOut, ...unaligned],
    strips: (Object.keys(STRIPS) as OverlayStrip['what'][]).flatMap((what) =>
      courses[what].some(({ failed }) => failed)
        ? [{ what, unit: STRIPS[what], overlay: overlayOf(courses[what]) }]
        : [],
    ),
  };
}

const EVENT_WORDS: Readonly<Record<OverlayEvent, string>> = {
  'heat-on': 'heat-on',
  'dwell-opens': 'the opening of a dwell',
  gel: 'an estimated gel',
  vent: 'the venting of its bag',
};

interface CoursesOfPart {
  readonly part: ChosenPart;
  /** Null where the event did not come. */
  readonly course: readonly (readonly [OverlayStrip['what'], OverlaidCourse])[] | null;
}

function coursesOfRun(db: Db, run: number, parts: readonly ChosenPart[], event: OverlayEvent): CoursesOfPart[] {
  const inputs = gatherInputs(db, run);
  const evaluation = findLatestEvaluation(db, run)?.document ?? null;
  if (inputs === null || evaluation === null) return parts.map((part) => ({ part, course: null }));
  const { readings } = inputs.readLog();
  const gapMs = longestGapMs(inputs.cycle, readings.timeMs);
  return parts.map((part): CoursesOfPart => {
    const judged = evaluation.parts.find((one) => one.part === part.serial);
    if (judged === undefined) return { part, course: null };
    const cure: PartCure = { readings, load: inputs.load, part: judged, sensors: evaluation.sensors };
    const read = coursesOf(cure);
    const eventMs = instantOf(event, cure, read);
    if (eventMs === null) return { part, course: null };
    const about = { part: part.serial, run, failed: part.failed, eventMs, longestGapMs: gapMs };
    const over = (values: Float64Array) => ({ ...about, timeMs: readings.timeMs, values });
    const valuesOf = (role: JudgedCourse['role']) =>
      read.filter((one) => one.role === role).map(({ values }) => values);
    const inBar = (values: Float64Array) => values.map((pa) => pa / PA_PER_BAR);
    const degree = inputs.resin === null ? [] : cureCourses(readings, inputs.load, inputs.resin, judged).courses;
    const least = degree.toSorted((a, b) => (a.degree.at(-1) ?? 0) - (b.degree.at(-1) ?? 0))[0];
    return {
      part,
      course: [
        ['coldest', over(leastOf(valuesOf('temperature')))],
        ...valuesOf('vacuum')
          .slice(0, 1)
          .map((values) => ['vacuum', over(inBar(values))] as const),
        ...valuesOf('pressure')
          .slice(0, 1)
          .map((values) => ['pressure', over(inBar(values))] as const),
        ...(least === undefined
          ? []
          : [['degree', { ...about, timeMs: least.timeMs, values: least.degree, longestGapMs: Infinity }] as const]),
      ],
    };
  });
}

function instantOf(event: OverlayEvent, { part, readings }: PartCure, courses: readonly JudgedCourse[]): number | null {
  if (event === 'vent') return ventMs(readings.timeMs, courses.find(({ role }) => role === 'vacuum')?.values ?? null);
  const iso = {
    'heat-on': part.heatOn,
    'dwell-opens': part.stages.find(({ kind }) => kind === 'dwell')?.opens ?? null,
    gel: part.cure.flatMap(({ gelAt }) => gelAt ?? []).sort()[0] ?? null,
  }[event];
  return iso === null ? null : Date.parse(iso);
}

function leastOf(courses: readonly Float64Array[]): Float64Array {
  const length = courses[0]?.length ?? 0;
  return Float64Array.from({ length }, (_, i) => {
    const present = courses.map((values) => values[i] ?? Number.NaN).filter((value) => !Number.isNaN(value));
    return present.length === 0 ? Number.NaN : Math.min(...present);
  });
}

/** Up to so many, evenly over all. */
function spread<T>(all: readonly T[], most: number): T[] {
  if (all.length <= most) return [...all];
  return Array.from({ length: most }, (_, i) => all[Math.floor((i * all.length) / most)]).filter(
    (one) => one !== undefined,
  );
}
