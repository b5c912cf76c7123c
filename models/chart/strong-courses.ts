import type { LineRole } from './chart.ts';
import type { CureCourse } from './chart-inputs.ts';

/** The courses of the leading and the lagging sensor; where there is neither, the first. */
export function strongCourses(
  courses: readonly CureCourse[],
  roleOf: (channel: string) => LineRole,
): readonly CureCourse[] {
  const strong = courses.filter(({ channel }) => ['leading', 'lagging'].includes(roleOf(channel)));
  return strong.length > 0 ? strong : courses.slice(0, 1);
}
